import { studentCdf } from '#shared/numerics/student.ts'
import { normalDensity, normalProbability, studentDensity } from './distributions.ts'
import { GeostatisticsError } from './errors.ts'

/** One part of a mixture: a normal distribution, or Student's t when `df` is given, moved to `mean` and scaled by `sd`. */
export interface Component {
  weight: number
  mean: number
  sd: number
  df: number | null
}

/** Probability that a draw lies below x. Weights sum to 1. A part with sd 0 is a step. */
export function mixtureProbability(components: readonly Component[], x: number): number {
  let total = 0
  for (const { weight, mean, sd, df } of components) {
    if (sd === 0) total += x >= mean ? weight : 0
    else total += weight * (df === null ? normalProbability((x - mean) / sd) : studentCdf((x - mean) / sd, df))
  }
  return total
}

function mixtureDensity(components: readonly Component[], x: number): number {
  let total = 0
  for (const { weight, mean, sd, df } of components) {
    if (sd > 0)
      total += (weight / sd) * (df === null ? normalDensity((x - mean) / sd) : studentDensity((x - mean) / sd, df))
  }
  return total
}

export const mixtureMean = (components: readonly Component[]): number =>
  components.reduce((total, c) => total + c.weight * c.mean, 0)

function bracket(components: readonly Component[], p: number): [number, number] {
  const widest = Math.max(...components.map((c) => c.sd))
  let low = Math.min(...components.map((c) => c.mean)) - widest
  let high = Math.max(...components.map((c) => c.mean)) + widest
  while (widest > 0 && mixtureProbability(components, low) > p) low -= 4 * widest
  while (widest > 0 && mixtureProbability(components, high) < p) high += 4 * widest
  return [low, high]
}

/** The value below which a share `p` (0 < p < 1) of the mixture lies; Newton's steps kept inside a bracket. */
export function mixtureQuantile(components: readonly Component[], p: number): number {
  if (!(p > 0 && p < 1) || components.length === 0)
    throw new GeostatisticsError('bad-input', 'quantile needs 0 < p < 1')
  let [low, high] = bracket(components, p)
  let x = (low + high) / 2
  for (let i = 0; i < 100 && high - low > 1e-12 * Math.max(1, Math.abs(x)); i++) {
    const excess = mixtureProbability(components, x) - p
    if (excess > 0) high = x
    else low = x
    const newton = x - excess / mixtureDensity(components, x)
    if (Math.abs(newton - x) < 1e-13) return newton
    x = newton > low && newton < high ? newton : (low + high) / 2
  }
  return x
}
