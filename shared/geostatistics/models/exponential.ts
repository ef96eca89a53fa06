import type { VariogramModel } from './model.ts'

/** Exponential model (Journel & Huijbregts 1978, III.A.2). Its practical range, where 95 % of the sill is reached, is 3a. */
export const exponential = {
  id: 'exponential',
  name: 'Exponential',
  practicalRangeFactor: 3,
  correlation: (u) => Math.exp(-3 * u),
} as const satisfies VariogramModel
