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

const LANCZOS = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
  12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
]

/** ln Γ(x) for x > 0.5 (Lanczos 1964, g = 7; coefficients from memory, checked against scipy in the tests). */
export function logGamma(x: number): number {
  const t = x + 6.5
  const sum = LANCZOS.reduce((total, c, i) => total + (i === 0 ? c : c / (x - 1 + i)), 0)
  return 0.5 * Math.log(2 * Math.PI) + (x - 0.5) * Math.log(t) - t + Math.log(sum)
}

const away = (x: number): number => (Math.abs(x) < 1e-300 ? 1e-300 : x)

/** Continued fraction of the incomplete beta function, by Lentz's rule (NIST DLMF 8.17.22). */
function betaFraction(a: number, b: number, x: number): number {
  let d = 1 / away(1 - ((a + b) * x) / (a + 1))
  let c = 1
  let h = d
  for (let m = 1; m < 300; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m))
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1))
    let change = 1
    for (const numerator of [even, odd]) {
      d = 1 / away(1 + numerator * d)
      c = away(1 + numerator / c)
      change = d * c
      h *= change
    }
    if (Math.abs(change - 1) < 1e-15) break
  }
  return h
}

/** Regularised incomplete beta function I_x(a, b). */
export function betaProbability(x: number, a: number, b: number): number {
  if (x <= 0) return 0
  if (x >= 1) return 1
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x))
  return x < (a + 1) / (a + b + 2) ? (front * betaFraction(a, b, x)) / a : 1 - (front * betaFraction(b, a, 1 - x)) / b
}

/** Student's t with `df` degrees of freedom: probability below x. */
export function studentProbability(x: number, df: number): number {
  const tail = 0.5 * betaProbability(df / (df + x * x), df / 2, 0.5)
  return x > 0 ? 1 - tail : tail
}

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
