import type { AnalysisInputs, Interval, Series } from './analysis.ts'
import { radiusOf } from './wells.ts'

/** Where a response is wanted, as seen from the pumped well, and what is built there. */
export interface ResponsePlace {
  /** The level inside the pumped well itself. */
  pumped: boolean
  /** Distance from the axis of the pumped well; in the pumped well its radius. */
  distance_m: number
  /** Direction from the pumped well, degrees clockwise from north; null: not known. */
  bearing_deg: number | null
  /** Radius of the pumped well. */
  wellRadius_m: number | null
  /** Radius of the casing in which the pumped well's level moves, the riser's area taken off. */
  casingRadius_m: number | null
  /** Saturated thickness of the aquifer. */
  thickness_m: number | null
  /** Open part of the pumped well below the aquifer's top; null: all of it. */
  pumpedScreen: Interval | null
  /** Open part of the well at this place, top and bottom alike for a point; null: all of it. */
  observedScreen: Interval | null
}

/** The place of a series. @throws AnalysisError at distance zero */
export function placeOf(series: Series, { series: all, pumpedWell, thickness_m }: AnalysisInputs): ResponsePlace {
  const pumped = pumpedWell ?? all.find(({ role }) => role === 'pumped')
  return {
    pumped: series.role === 'pumped',
    distance_m: radiusOf(series),
    bearing_deg: series.bearing_deg ?? null,
    wellRadius_m: pumped?.wellRadius_m ?? null,
    casingRadius_m: pumped?.casingRadius_m ?? null,
    thickness_m,
    pumpedScreen: pumped?.screen ?? null,
    observedScreen: series.screen ?? null,
  }
}
