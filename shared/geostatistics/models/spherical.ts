import type { VariogramModel } from './model.ts'

/** Spherical model (Matheron 1963; Journel & Huijbregts 1978, III.A.2). Reaches its sill at the range. */
export const spherical = {
  id: 'spherical',
  name: 'Spherical',
  practicalRangeFactor: 1,
  correlation: (u) => (u >= 1 ? 0 : 1 - u * (1.5 - 0.5 * u * u)),
} as const satisfies VariogramModel
