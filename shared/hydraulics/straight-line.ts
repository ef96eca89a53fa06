import { effectiveNumber, lagOneAutocorrelation, residualFreedom } from '#shared/numerics/autocorrelation.ts'
import { describeLine, linearRegression, type LineFit } from '#shared/numerics/linear-regression.ts'
import { AnalysisError, type FitSummary, type HandLine } from './analysis.ts'

const UNKNOWNS = 2

/** A line of drawdown on a logarithmic axis, with its covariance widened for residuals that are not independent. */
export interface StraightLine {
  slope: number
  intercept: number
  /** Covariance of (intercept, slope), in drawdown and drawdown per factor of ten. */
  covariance: LineFit['covariance']
  freedom: number
  residuals: number[]
  summary: FitSummary
}

/**
 * Regression of drawdown on x, or the description of a line drawn by hand over the same readings.
 * @param ordered false when residuals have no order in time (one per well), so that autocorrelation means nothing
 * @throws AnalysisError when all x are equal, or when the slope is not positive
 */
export function straightLine(
  x: number[],
  drawdown: number[],
  { hand = null, ordered = true, rising = true }: { hand?: HandLine | null; ordered?: boolean; rising?: boolean } = {},
): StraightLine {
  if (x.every((value) => value === x[0])) throw new AnalysisError('analysis/times-equal')
  if (hand && !(Number.isFinite(hand.slope) && Number.isFinite(hand.intercept))) {
    throw new AnalysisError('analysis/bad-option', { option: 'line' })
  }
  const fit = hand ? describeLine(x, drawdown, hand.slope, hand.intercept) : linearRegression(x, drawdown)
  if (!(rising ? fit.slope > 0 : fit.slope < 0)) {
    throw new AnalysisError('analysis/slope-not-positive', { slope: rising ? fit.slope : -fit.slope })
  }
  const rho = ordered ? lagOneAutocorrelation([fit.residuals], UNKNOWNS) : 0
  const effectiveN = effectiveNumber(fit.count, rho)
  const freedom = residualFreedom(effectiveN, UNKNOWNS)
  const widening = residualFreedom(fit.count, UNKNOWNS) / freedom
  return {
    slope: fit.slope,
    intercept: fit.intercept,
    covariance: fit.covariance.map((row) => row.map((value) => value * widening)) as LineFit['covariance'],
    freedom,
    residuals: fit.residuals,
    summary: {
      n: fit.count,
      effectiveN,
      rmse_m: Math.sqrt(fit.sumOfSquares / fit.count),
      autocorrelation: rho,
      iterations: hand ? 0 : 1,
      converged: true,
      singular: false,
      objective: fit.sumOfSquares,
    },
  }
}

/** Abscissa at which the line reaches zero drawdown, as log10. */
export const zeroAbscissa = ({ slope, intercept }: StraightLine) => -intercept / slope

/** Standard deviation of a function of the line whose gradient in (intercept, slope) is given. */
export function propagated({ covariance: [[aa, ab], [, bb]] }: StraightLine, da: number, db: number): number {
  return Math.sqrt(Math.max(0, da * da * aa + 2 * da * db * ab + db * db * bb))
}

/** Relative standard deviation of the slope: that of T. */
export const slopeSd = (line: StraightLine) => propagated(line, 0, 1 / line.slope)

/** Standard deviation of ln of the zero abscissa. */
export function zeroSd(line: StraightLine): number {
  return Math.LN10 * propagated(line, -1 / line.slope, line.intercept / line.slope ** 2)
}

/**
 * Standard deviation of ln of S, which goes as T times the zero abscissa to a power: 1 for time, −2 for distance.
 * T and the zero share the slope's error, so they are propagated together.
 */
export function storageSd(line: StraightLine, power: number): number {
  const { slope, intercept } = line
  const k = power * Math.LN10
  return propagated(line, -k / slope, -1 / slope + (k * intercept) / slope ** 2)
}
