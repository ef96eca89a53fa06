import type { ResponsePlace } from '#shared/hydraulics/place.ts'

/** An observation well open to all of the aquifer, 50 m from a pumped well of which nothing is known. */
export const makePlace = (overrides: Partial<ResponsePlace> = {}): ResponsePlace => ({
  pumped: false,
  distance_m: 50,
  bearing_deg: null,
  wellRadius_m: null,
  casingRadius_m: null,
  thickness_m: null,
  pumpedScreen: null,
  observedScreen: null,
  ...overrides,
})
