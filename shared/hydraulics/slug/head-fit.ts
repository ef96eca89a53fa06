import { lagOneAutocorrelation } from '#shared/numerics/autocorrelation.ts'
import { correlatedCovariance } from '#shared/numerics/correlated-residuals.ts'
import type { FitUnknown } from '#shared/numerics/least-squares-problem.ts'
import { levenbergMarquardt } from '#shared/numerics/levenberg-marquardt.ts'
import { thinLogarithmically } from '#shared/numerics/logarithmic-thinning.ts'
import { AnalysisError } from '../analysis-error.ts'
import type { FitSummary, Residual } from '../analysis.ts'
import type { Heads } from './slug-test.ts'

/** Default of SlugOptions.readingsPerCycle. */
const READINGS_PER_CYCLE = 50

/** A model of normalised heads: its unknowns, and the heads at the times for given unknowns. */
export interface HeadModel {
  unknowns: FitUnknown[]
  heads: (parameters: ArrayLike<number>, time_s: number[]) => number[]
  /** Heads with their derivatives by the transformed unknowns, one row a time; left out, they are taken numerically. */
  derivatives?: (parameters: ArrayLike<number>, time_s: number[]) => { head: number; by: number[] }[]
}

export interface HeadFit {
  parameters: number[]
  /** Covariance of the transformed parameters (ln on a log scale), for Student's t at `freedom`. */
  covariance: number[][]
  freedom: number
  atBound: number[]
  singular: boolean
  residuals: Residual[]
  summary: FitSummary
}

/**
 * Least squares of normalised heads of one repeat.
 * @throws AnalysisError with no more readings than unknowns, or where no start gives a finite head
 */
export function fitHeads({ repeat, time_s, head }: Heads, model: HeadModel, starts: number[][]): HeadFit {
  const needed = model.unknowns.length + 1
  if (time_s.length < needed) throw new AnalysisError('analysis/too-few-readings', { needed, found: time_s.length })
  const fit = solve(time_s, head, model, starts)
  const jacobian = fit.jacobian
  const { covariance, effectiveNumber } = correlatedCovariance(
    [{ residuals: fit.residuals, jacobian, axes: [time_s, time_s.map(Math.log)] }],
    fit.normalInverse,
  )
  const residuals = time_s.map((time, i) => ({
    wellId: repeat.id,
    elapsed_s: time,
    residual_m: -(fit.residuals[i] as number) * repeat.initial_m,
  }))
  return {
    parameters: fit.parameters,
    covariance,
    freedom: Math.max(1, time_s.length - model.unknowns.length),
    atBound: fit.atBound,
    singular: fit.singular,
    residuals,
    summary: {
      n: time_s.length,
      effectiveN: effectiveNumber,
      rmse_m: Math.abs(repeat.initial_m) * Math.sqrt(fit.objective / time_s.length),
      autocorrelation: lagOneAutocorrelation([fit.residuals]),
      iterations: fit.iterations,
      converged: fit.converged,
      singular: fit.singular,
      objective: fit.objective,
    },
  }
}

function solve(time_s: number[], head: number[], model: HeadModel, starts: number[][]) {
  const { unknowns, heads, derivatives } = model
  const residuals = (parameters: ArrayLike<number>, out: Float64Array) => {
    const modelled = heads(parameters, time_s)
    head.forEach((value, i) => (out[i] = (modelled[i] as number) - value))
  }
  const jacobian = (parameters: ArrayLike<number>, out: Float64Array, rows: Float64Array) =>
    derivatives?.(parameters, time_s).forEach((one, i) => {
      out[i] = one.head - (head[i] as number)
      rows.set(one.by, i * unknowns.length)
    })
  const problem = { count: head.length, unknowns, residuals, ...(derivatives ? { jacobian } : {}) }
  try {
    return levenbergMarquardt(problem, { starts })
  } catch (error) {
    if (error instanceof RangeError) throw new AnalysisError('analysis/no-fit')
    throw error
  }
}

/** The one of many starting points from which the fewest squares are left to go. */
export function bestStart({ time_s, head }: Heads, { heads }: HeadModel, starts: number[][]): number[] {
  const squares = starts.map((start) => {
    const sum = heads(start, time_s).reduce((total, value, i) => total + (value - (head[i] as number)) ** 2, 0)
    return Number.isFinite(sum) ? sum : Infinity
  })
  return starts[squares.indexOf(Math.min(...squares))] as number[]
}

/** Heads thinned logarithmically, so that a slow tail of thousands of readings does not outvote the fall. */
export function thinnedHeads(heads: Heads, perCycle: number | null | undefined): Heads {
  const kept = thinLogarithmically(heads.time_s, perCycle === undefined ? READINGS_PER_CYCLE : perCycle)
  return {
    repeat: heads.repeat,
    time_s: kept.map((i) => heads.time_s[i] as number),
    head: kept.map((i) => heads.head[i] as number),
  }
}

/** Standard deviation of a transformed parameter; without end where the readings leave it open. */
export const headSd = ({ covariance, atBound, singular }: HeadFit, k: number) =>
  singular || atBound.includes(k) ? Infinity : Math.sqrt(Math.max(0, (covariance[k] as number[])[k] as number))
