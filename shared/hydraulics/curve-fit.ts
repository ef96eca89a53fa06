import { lagOneAutocorrelation } from '#shared/numerics/autocorrelation.ts'
import { correlatedCovariance, type CorrelatedCovariance } from '#shared/numerics/correlated-residuals.ts'
import type { ResidualSeries } from '#shared/numerics/fading-noise.ts'
import type { LeastSquaresProblem } from '#shared/numerics/least-squares-problem.ts'
import type { RobustFit } from '#shared/numerics/robust-least-squares.ts'
import type {
  AnalysisInputs,
  AnalysisOptions,
  FitSummary,
  OtherEstimate,
  ParameterEstimate,
  Residual,
} from './analysis.ts'
import { curveProblem, placed } from './curve-problem.ts'
import { smallSampleCriterion } from './information-criterion.ts'
import type { Unknown } from './method.ts'
import {
  linearEstimate,
  parameterEstimate,
  scaledEstimate,
  UNDETERMINED_FACTOR,
  type LogUncertainty,
} from './parameter-estimate.ts'
import type { OtherSource } from './other-wells.ts'
import type { ResponsePlace } from './place.ts'
import { profiledEstimate } from './profiled-estimate.ts'
import type { RateHistory } from './rates.ts'
import type { Selected } from './selection.ts'
import type { Solution } from './solution.ts'
import { thinningFactor } from './unconfined.ts'
import { distanceError } from './wells.ts'

/** Everything known once a curve is fitted. */
export interface Fitted {
  inputs: AnalysisInputs
  options: AnalysisOptions
  solution: Solution
  history: RateHistory
  wells: Selected[]
  places: ResponsePlace[]
  /** Other pumping wells, as each well feels them. */
  others: OtherSource[][]
  logarithmic: boolean
  problem: LeastSquaresProblem
  fit: RobustFit
}

/** Step in ln of a distance or rate for its effect on the residuals. */
const STEP = 1e-4

/** Measured − calculated drawdown of each reading, in metres whatever the objective. */
export function curveResiduals({ wells, fit, logarithmic }: Fitted): Residual[] {
  const readings = wells.flatMap(({ series, elapsed_s, drawdown_m }) =>
    elapsed_s.map((time, i) => ({ wellId: series.wellId, elapsed_s: time, drawdown_m: drawdown_m[i] as number })),
  )
  return readings.map(({ wellId, elapsed_s, drawdown_m }, i) => {
    const residual = fit.residuals[i] as number
    return { wellId, elapsed_s, residual_m: logarithmic ? -drawdown_m * Math.expm1(residual) : -residual }
  })
}

export function curveCovariance(fitted: Fitted): CorrelatedCovariance {
  return correlatedCovariance(residualSeries(fitted), fitted.fit.normalInverse)
}

export function curveSummary(fitted: Fitted, { covariance, effectiveNumber }: CorrelatedCovariance): FitSummary {
  const { fit } = fitted
  const n = fit.residuals.length
  const autocorrelation = lagOneAutocorrelation(residualSeries(fitted).map(({ residuals }) => residuals))
  const squares = curveResiduals(fitted).reduce((sum, { residual_m }) => sum + residual_m * residual_m, 0)
  const [[tt = 0, ts = 0] = [], [, ss = 0] = []] = covariance
  return {
    n,
    effectiveN: effectiveNumber,
    rmse_m: Math.sqrt(squares / n),
    autocorrelation,
    iterations: fit.iterations,
    converged: fit.converged,
    singular: fit.singular,
    objective: fit.objective,
    aicc: smallSampleCriterion(fit.objective / n, effectiveNumber, fit.parameters.length),
    ...(tt * ss > 0 ? { correlation: ts / Math.sqrt(tt * ss) } : {}),
    ...(fit.limit === null ? {} : { weighedLess: fit.residuals.filter(beyond(fit.limit)).length }),
  }
}

/** What is known of the unknowns of a fit: the values' scatter, and the errors of rate and distances. */
export function curveUncertainties(fitted: Fitted, { covariance }: CorrelatedCovariance): LogUncertainty[] {
  const { fit, solution, wells, options } = fitted
  const freedom = Math.max(1, fit.residuals.length - solution.unknowns.length)
  const shifts = [
    rateShift(fitted),
    ...wells.map((well, w) => distanceShift(fitted, well, w)),
    ...(options.match ? [laidShift(fitted)] : []),
  ]
  return solution.unknowns.map((_, k) => {
    const variance = (covariance[k] as number[])[k] as number
    return {
      fitSd: fit.singular || fit.atBound.includes(k) ? Infinity : Math.sqrt(variance),
      freedom,
      otherSd: Math.hypot(...shifts.map((shift) => shift[k] as number)),
    }
  })
}

/** One unknown on a log scale with its interval, null for an unknown that the solution does not have. */
export function curveEstimate(fitted: Fitted, known: LogUncertainty[], id: string): ParameterEstimate | null {
  const { fit, solution, inputs, options, wells } = fitted
  const k = solution.unknowns.findIndex((unknown) => unknown.id === id)
  if (k === -1) return null
  const widest = id === 'T' ? UNDETERMINED_FACTOR.T : UNDETERMINED_FACTOR.S
  const estimate = parameterEstimate(fit.parameters[k] as number, known[k] as LogUncertainty, widest)
  return id === 'S' ? scaledEstimate(estimate, thinningFactor(inputs, options, wells)) : estimate
}

/** The unknowns beside T and the storage that is reported as S. */
export function otherEstimates(fitted: Fitted, known: LogUncertainty[], reported: readonly string[]): OtherEstimate[] {
  return fitted.solution.unknowns.flatMap((unknown, k) =>
    reported.includes(unknown.id) ? [] : [otherEstimate(fitted, unknown, k, known[k] as LogUncertainty)],
  )
}

function otherEstimate(
  { fit, problem, options }: Fitted,
  { id, scale }: Unknown,
  index: number,
  known: LogUncertainty,
): OtherEstimate {
  const value = fit.parameters[index] as number
  const onLine = () =>
    // A curve laid by hand is at no minimum, from which a profile could rise.
    options.match ? linearEstimate(value, known) : profiledEstimate(problem, fit, index, known)
  const { low, high, determined } = scale === 'log' ? parameterEstimate(value, known, UNDETERMINED_FACTOR.S) : onLine()
  return { id, value, low, high, determined }
}

/**
 * How far least squares would move a curve that was laid by hand, to first order: what the readings say of the place that
 * the hand chose, which their scatter about the curve does not show.
 */
const laidShift = ({ fit }: Fitted) => parameterShift(fit, Array.from(fit.residuals))

/** Change of the fitted parameters when the rate of the pumped well is one standard deviation higher. */
function rateShift(fitted: Fitted): number[] {
  const { fit, wells, logarithmic, inputs } = fitted
  const measured = wells.flatMap((well) => well.drawdown_m)
  const effect = fitted.others.some((sources) => sources.length > 0)
    ? slopeOf((step) => residualsAt(fitted, { rates: Math.exp(step) }))
    : measured.map((value, i) => (logarithmic ? 1 : value + (fit.residuals[i] as number)))
  return parameterShift(fit, effect).map((shift) => shift * inputs.rateError)
}

/** Change of residuals with a logarithm, by central differences. */
function slopeOf(residuals: (step: number) => Float64Array): number[] {
  const [more, less] = [residuals(STEP), residuals(-STEP)]
  return Array.from(more, (value, i) => (value - (less[i] as number)) / (2 * STEP))
}

/** Change of the fitted parameters when one well's distance is one standard deviation longer. */
function distanceShift(fitted: Fitted, well: Selected, index: number): number[] {
  const error = distanceError(well.series)
  if (!(error > 0)) return fitted.solution.unknowns.map(() => 0)
  const effect = slopeOf((step) => residualsAt(fitted, { distance: { index, stretch: Math.exp(step) } }))
  return parameterShift(fitted.fit, effect).map((shift) => shift * error)
}

interface Moved {
  /** Factor on the rates of the pumped well. */
  rates?: number
  /** Factor on the distance of one well. */
  distance?: { index: number; stretch: number }
}

function residualsAt(
  { solution, wells, places, others, history, logarithmic, fit }: Fitted,
  { rates = 1, distance }: Moved,
): Float64Array {
  const moved = places.map((place, w) =>
    w === distance?.index ? { ...place, distance_m: place.distance_m * distance.stretch } : place,
  )
  const increments = history.increments.map((one) => ({ ...one, change_m3_s: one.change_m3_s * rates }))
  const problem = curveProblem(solution, placed(wells, moved, others), increments, logarithmic)
  const residuals = new Float64Array(problem.count)
  problem.residuals(fit.parameters, residuals)
  return residuals
}

const beyond = (limit: number) => (residual: number) => Math.abs(residual) > limit

/** First-order move −(J'J)⁻¹J'v of the minimum when residuals change by v; those beyond the limit pull no harder. */
function parameterShift({ normalInverse, jacobian, residuals, limit }: RobustFit, effect: number[]): number[] {
  const size = normalInverse.length
  const isBeyond = beyond(limit ?? Infinity)
  const pulling = effect.map((value, i) => (isBeyond(residuals[i] as number) ? 0 : value))
  const projected = normalInverse.map((_, k) =>
    pulling.reduce((sum, value, i) => sum + value * (jacobian[i * size + k] as number), 0),
  )
  return normalInverse.map((row) => -row.reduce((sum, value, k) => sum + value * (projected[k] as number), 0))
}

/** Residuals of each well apart, as far as they pull at the fit, alike along time or along its logarithm. */
function residualSeries({ fit, wells }: Fitted): ResidualSeries[] {
  const size = fit.normalInverse.length
  const limit = fit.limit ?? Infinity
  const residuals = fit.residuals.map((residual) => Math.max(-limit, Math.min(limit, residual)))
  let from = 0
  return wells.map(({ time_s }) => {
    const first = from
    from += time_s.length
    return {
      residuals: residuals.subarray(first, from),
      jacobian: fit.jacobian.subarray(first * size, from * size),
      axes: [time_s, time_s.map(Math.log)],
    }
  })
}
