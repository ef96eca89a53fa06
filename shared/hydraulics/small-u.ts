import { EULER_GAMMA, exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import type { Finding } from './analysis.ts'

/** Straight-line methods replace W(u) by −γ − ln u; above this u that is not good enough. */
export const LARGEST_U = 0.05

/** 4e^-γ, the 2.2458 (or 2.25) of the straight-line formulas. */
export const STRAIGHT_LINE_CONSTANT = 4 * Math.exp(-EULER_GAMMA)

/** u = r²S/(4Tt). Source: Theis 1935. */
export const theisU = (T: number, S: number, distance_m: number, time_s: number) =>
  (distance_m * distance_m * S) / (4 * T * time_s)

/** Time at which u has fallen to a value. */
export const timeOfU = (T: number, S: number, distance_m: number, u: number) =>
  (distance_m * distance_m * S) / (4 * T * u)

/**
 * Relative errors of the straight line against W(u): of drawdown, and of the local slope.
 * Source: Cooper & Jacob 1946; at u = 0.05 they are 2.0 % and 4.9 %.
 */
export function straightLineErrors(u: number): { drawdown: number; slope: number } {
  // A line with hardly any slope gives so large a T that u underflows; the straight line is then exact.
  if (u === 0) return { drawdown: 0, slope: 0 }
  const exact = exponentialIntegral(u)
  return { drawdown: (exact + EULER_GAMMA + Math.log(u)) / exact, slope: -Math.expm1(-u) }
}

/** Judges the largest u among the readings of a straight-line method. */
export function smallUFinding(u: number, validFrom_s: number): Finding {
  const errors = straightLineErrors(u)
  return {
    code: u <= LARGEST_U ? 'u-small' : 'u-large',
    severity: u <= LARGEST_U ? 'good' : 'caution',
    params: { u, limit: LARGEST_U, drawdownError: errors.drawdown, slopeError: errors.slope, validFrom_s },
  }
}
