import { logGamma } from '#shared/numerics/gamma-beta.ts'
import { GeostatisticsError } from './errors.ts'

const ROOT_TWO_PI = Math.sqrt(2 * Math.PI)

export const normalDensity = (x: number): number => Math.exp(-0.5 * x * x) / ROOT_TWO_PI

/** Standard normal probability below x, absolute error under 1e-14 (series of Marsaglia 2004, JSS 11(4)). */
export function normalProbability(x: number): number {
  if (x > 8) return 1
  if (x < -8) return 0
  let sum = x
  let term = x
  for (let k = 3; Math.abs(term) > 1e-17 * Math.abs(sum); k += 2) {
    term *= (x * x) / k
    sum += term
  }
  return 0.5 + sum * normalDensity(x)
}

/** Density of Student's t with `df` degrees of freedom. */
export function studentDensity(x: number, df: number): number {
  const log = logGamma((df + 1) / 2) - logGamma(df / 2) - 0.5 * Math.log(df * Math.PI)
  return Math.exp(log - ((df + 1) / 2) * Math.log1p((x * x) / df))
}

/**
 * Exact two-sided binomial test: the probability, under success rate `p`, of every count no likelier than `k` of `n`.
 */
export function binomialTest(k: number, n: number, p: number): number {
  if (!(n > 0) || k < 0 || k > n) throw new GeostatisticsError('bad-input', 'binomialTest needs 0 ≤ k ≤ n, n > 0')
  const log = (i: number): number =>
    logGamma(n + 1) - logGamma(i + 1) - logGamma(n - i + 1) + i * Math.log(p) + (n - i) * Math.log1p(-p)
  const limit = log(k) + 1e-9
  let total = 0
  for (let i = 0; i <= n; i++) if (log(i) <= limit) total += Math.exp(log(i))
  return Math.min(1, total)
}
