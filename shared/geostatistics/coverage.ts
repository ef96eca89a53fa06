import { binomialTest } from './distributions.ts'
import { deviationOf, meanOf, quantileOf, rising } from './robust.ts'

/** One value foretold without itself, its test and its surroundings. Logarithms, base 10. */
export interface Residual {
  id: string
  x: number
  y: number
  observed: number
  predicted: number
  /** Standard deviation of the forecast of the true value, σ_K. */
  deviation: number
  /** The value's own error, e. */
  error: number
  /** (z − ẑ) / √(σ_K² + e²). */
  standardised: number
  /** Probability that the forecast gave to lying below the observed value; coverage is read from it. */
  probability: number
  width80: number
  width95: number
}

export interface Coverage {
  inside: number
  n: number
  /** inside / n. */
  share: number
  /** Exact binomial probability of a count so far from the nominal one. */
  p: number
  /** Mean width of the interval, log10. */
  meanWidth: number
}

export interface CrossValidation {
  n: number
  meanError: number
  rmse: number
  standardisedMean: number
  standardisedDeviation: number
  coverage80: Coverage
  coverage95: Coverage
  residuals: Residual[]
}

function coverage(residuals: readonly Residual[], level: number, width: (r: Residual) => number): Coverage {
  const n = residuals.length
  const inside = residuals.filter((r) => Math.abs(r.probability - 0.5) <= level / 2).length
  return { inside, n, share: inside / n, p: binomialTest(inside, n, level), meanWidth: meanOf(residuals.map(width)) }
}

/** What cross-validation shows: bias, scatter, and whether the intervals hold. `residuals` must not be empty. */
export function crossValidationOf(residuals: Residual[]): CrossValidation {
  const errors = residuals.map((r) => r.observed - r.predicted)
  const standardised = residuals.map((r) => r.standardised)
  return {
    n: residuals.length,
    meanError: meanOf(errors),
    rmse: Math.sqrt(meanOf(errors.map((e) => e * e))),
    standardisedMean: meanOf(standardised),
    standardisedDeviation: deviationOf(standardised),
    coverage80: coverage(residuals, 0.8, (r) => r.width80),
    coverage95: coverage(residuals, 0.95, (r) => r.width95),
    residuals,
  }
}

export const RESCALE_FROM = 30
const SIGNIFICANT = 0.05
const NARROWEST = 0.9

/** Factor on σ_K at which a value would lie just at the end of its 95 % interval, its own error kept as it is. */
function factorToReach(r: Residual): number {
  const needed = ((r.observed - r.predicted) / 1.959964) ** 2 - r.error ** 2
  return r.deviation > 0 ? Math.sqrt(Math.max(0, needed)) / r.deviation : 0
}

/**
 * Factor for the standard deviation of estimates: 1 unless at least 30 values were foretold and the 95 % interval
 * covered so many or so few that chance is unlikely (exact binomial p < 0.05). Then 95 % of the values are reached;
 * it widens freely and narrows by a tenth at most.
 */
export function rescalingFactor(residuals: readonly Residual[]): number {
  if (residuals.length < RESCALE_FROM) return 1
  if (coverage(residuals, 0.95, (r) => r.width95).p >= SIGNIFICANT) return 1
  return Math.max(NARROWEST, quantileOf(rising(residuals.map(factorToReach)), 0.95))
}
