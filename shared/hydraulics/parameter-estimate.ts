import { normalQuantile } from '#shared/numerics/normal.ts'
import { studentQuantile } from '#shared/numerics/student.ts'
import type { ParameterEstimate } from './analysis.ts'

/** An interval wider than this factor leaves T, or S, undetermined. */
export const UNDETERMINED_FACTOR = { T: 10, S: 30 }

/** Half-widths in ln beyond this (a factor of 1e30) say nothing more and would overflow. */
const WIDEST = Math.log(1e30)
/** The same for a quantity on a linear scale. */
const WIDEST_LINEAR = 1e30
const TWO_SIDED = 0.975

/** Uncertainty of the natural logarithm of a parameter, by origin. */
export interface LogUncertainty {
  /** Standard deviation from the scatter of the readings, with its degrees of freedom. */
  fitSd: number
  freedom: number
  /** Standard deviation from rate, distance and other things that the readings do not show. */
  otherSd: number
}

/** A parameter with its 95 % interval: Student's t for the scatter, normal for the rest, added in quadrature. */
export function parameterEstimate(value: number, uncertainty: LogUncertainty, widestFactor: number): ParameterEstimate {
  const { fitSd, otherSd } = uncertainty
  const half = halfWidth(uncertainty)
  const width = Number.isFinite(half) ? Math.min(half, WIDEST) : WIDEST
  const logSd = Math.min(Math.hypot(fitSd, otherSd), WIDEST) / Math.LN10
  return {
    value,
    low: value * Math.exp(-width),
    high: value * Math.exp(width),
    logSd: Number.isFinite(logSd) ? logSd : WIDEST / Math.LN10,
    determined: 2 * width <= Math.log(widestFactor),
  }
}

/** Half-width of an interval from both origins of uncertainty, in the transformed unknown. */
const halfWidth = ({ fitSd, freedom, otherSd }: LogUncertainty) =>
  Math.hypot(studentQuantile(TWO_SIDED, freedom) * fitSd, normalQuantile(TWO_SIDED) * otherSd)

/** A quantity on a linear scale, such as skin, with its 95 % interval; determined while that is finite. */
export function linearEstimate(value: number, uncertainty: LogUncertainty) {
  const half = halfWidth(uncertainty)
  const width = Number.isFinite(half) ? Math.min(half, WIDEST_LINEAR) : WIDEST_LINEAR
  return { value, low: value - width, high: value + width, determined: width < WIDEST_LINEAR }
}

/** Hydraulic conductivity from transmissivity and thickness: relative errors √(e_T² + e_b²). */
export function conductivityEstimate(
  T: ParameterEstimate,
  thickness_m: number,
  thicknessError: number,
): ParameterEstimate {
  const value = T.value / thickness_m
  const half = Math.hypot(Math.log(T.high / T.value), normalQuantile(TWO_SIDED) * thicknessError)
  return {
    value,
    low: value * Math.exp(-half),
    high: value * Math.exp(half),
    logSd: Math.hypot(T.logSd, thicknessError / Math.LN10),
    determined: T.determined,
  }
}

/** Multiplies a parameter and its interval by a known factor. */
export function scaledEstimate(estimate: ParameterEstimate, factor: number): ParameterEstimate {
  const { value, low, high } = estimate
  return { ...estimate, value: value * factor, low: low * factor, high: high * factor }
}
