import { lagOneAutocorrelation } from '#shared/numerics/autocorrelation.ts'
import { correlatedCovariance } from '#shared/numerics/correlated-residuals.ts'
import { describeLine, lineFreedom, linearRegression, type LineFit } from '#shared/numerics/linear-regression.ts'
import { normalQuantile } from '#shared/numerics/normal.ts'
import { studentQuantile } from '#shared/numerics/student.ts'
import { AnalysisError } from './analysis-error.ts'
import type { FitSummary, HandLine, Residual } from './analysis.ts'
import type { Selected } from './selection.ts'

/**
 * A line of drawdown on a logarithmic axis, with its covariance widened for residuals that are not independent, and of a
 * line drawn by hand for how far least squares would move it.
 */
export interface StraightLine {
  slope: number
  intercept: number
  /** Covariance of (intercept, slope), in drawdown and drawdown per factor of ten. */
  covariance: LineFit['covariance']
  /** How far least squares would move the slope of a line drawn by hand. */
  slopeShift: number
  freedom: number
  residuals: number[]
  summary: FitSummary
}

interface LineOptions {
  /** A line drawn by hand takes the place of the regression. */
  hand?: HandLine | null
  /** Times of the readings in order, for the likeness of residuals; left out where readings have no order in time. */
  time_s?: number[]
  /** False where drawdown falls along x, as it does with distance. */
  rising?: boolean
}

/** The side of a 95 % interval. */
const TWO_SIDED = 0.975
/** A rise along the line that is a smaller part of the drawdown than this is rounding: the log is level. */
const LEAST_RISE = 1e-9

function isLevel(x: number[], drawdown: number[], slope: number): boolean {
  const span =
    x.reduce((most, value) => Math.max(most, value), -Infinity) -
    x.reduce((least, value) => Math.min(least, value), Infinity)
  const largest = drawdown.reduce((most, value) => Math.max(most, Math.abs(value)), 0)
  return Math.abs(slope) * span < LEAST_RISE * largest
}

/**
 * Regression of drawdown on x, or the description of a line drawn by hand over the same readings.
 * @throws AnalysisError when all x are equal, or when the line is level or slopes the wrong way
 */
export function straightLine(
  x: number[],
  drawdown: number[],
  { hand = null, time_s, rising = true }: LineOptions = {},
): StraightLine {
  if (x.every((value) => value === x[0])) throw new AnalysisError('analysis/times-equal')
  if (hand && !(Number.isFinite(hand.slope) && Number.isFinite(hand.intercept))) {
    throw new AnalysisError('analysis/bad-option', { option: 'line' })
  }
  const line = regressionLine(x, drawdown, { hand, ...(time_s ? { time_s } : {}) })
  if (isLevel(x, drawdown, line.slope) || !(rising ? line.slope > 0 : line.slope < 0)) {
    throw new AnalysisError('analysis/slope-not-positive', { slope: rising ? line.slope : -line.slope })
  }
  return line
}

/** The same without a judgement of the slope: a level that no longer changes is a line too. */
export function regressionLine(
  x: number[],
  drawdown: number[],
  { hand = null, time_s }: Omit<LineOptions, 'rising'> = {},
): StraightLine {
  const found = linearRegression(x, drawdown)
  const fit = hand ? describeLine(x, drawdown, hand.slope, hand.intercept) : found
  const slopeShift = found.slope - fit.slope
  const { covariance, effectiveNumber } = lineCovariance(x, fit.residuals, time_s)
  return {
    slope: fit.slope,
    intercept: fit.intercept,
    covariance: hand ? withShift(covariance, [found.intercept - fit.intercept, slopeShift], x.length) : covariance,
    slopeShift,
    freedom: lineFreedom(fit.count),
    residuals: fit.residuals,
    summary: {
      n: fit.count,
      effectiveN: effectiveNumber,
      rmse_m: Math.sqrt(fit.sumOfSquares / fit.count),
      autocorrelation: time_s ? lagOneAutocorrelation([fit.residuals]) : 0,
      iterations: hand ? 0 : 1,
      converged: true,
      singular: false,
      objective: fit.sumOfSquares,
    },
  }
}

/** Found for the height at the middle of the readings, which no unit of x moves, and turned into that of the intercept. */
function lineCovariance(x: number[], residuals: number[], time_s: number[] | undefined) {
  const middle = x.reduce((sum, value) => sum + value, 0) / x.length
  const jacobian = x.flatMap((value) => [1, value - middle])
  const squares = x.reduce((sum, value) => sum + (value - middle) ** 2, 0)
  const inverse = [
    [1 / x.length, 0],
    [0, 1 / squares],
  ]
  const axes = time_s ? [time_s, time_s.map(Math.log)] : []
  const { covariance, effectiveNumber } = correlatedCovariance([{ residuals, jacobian, axes }], inverse)
  const [[height = NaN, both = NaN] = [], [, slope = NaN] = []] = covariance
  const joint = both - middle * slope
  const ofIntercept: LineFit['covariance'] = [
    [height - 2 * middle * both + middle * middle * slope, joint],
    [joint, slope],
  ]
  return { covariance: ofIntercept, effectiveNumber }
}

/**
 * Holds how far least squares would move a line drawn by hand beside the scatter of the readings about it, which does not
 * show it: the likeness of readings that all lie to one side of the line is taken for noise. Covariances are multiplied
 * by Student's t later; the move counts like every error that the readings do not show, by the normal distribution.
 */
function withShift(
  [[aa, ab], [ba, bb]]: LineFit['covariance'],
  [da, db]: [intercept: number, slope: number],
  count: number,
): LineFit['covariance'] {
  const weight = (normalQuantile(TWO_SIDED) / studentQuantile(TWO_SIDED, lineFreedom(count))) ** 2
  return [
    [aa + weight * da * da, ab + weight * da * db],
    [ba + weight * da * db, bb + weight * db * db],
  ]
}

/** Residuals of a line through the readings of one well. */
export function lineResiduals({ residuals }: StraightLine, { series, elapsed_s }: Selected): Residual[] {
  return elapsed_s.map((elapsed, i) => ({
    wellId: series.wellId,
    elapsed_s: elapsed,
    residual_m: residuals[i] as number,
  }))
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
