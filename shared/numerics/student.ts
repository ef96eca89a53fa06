import { incompleteBeta } from './gamma-beta.ts'
import { normalQuantile } from './normal.ts'

/** Distribution function of Student's t with `freedom` > 0 degrees of freedom (need not be whole). */
export function studentCdf(t: number, freedom: number): number {
  if (!(freedom > 0)) throw new RangeError(`Student's t needs positive degrees of freedom, not ${freedom}`)
  // Near the centre the complement keeps the digits that 1 - I_x would lose.
  const square = t * t
  const tail =
    square < freedom
      ? 0.5 - 0.5 * incompleteBeta(square / (freedom + square), 0.5, freedom / 2)
      : 0.5 * incompleteBeta(freedom / (freedom + square), freedom / 2, 0.5)
  return t > 0 ? 1 - tail : tail
}

/**
 * Quantile of Student's t, 0 < probability < 1, degrees of freedom > 0 (need not be whole: an effective number of
 * readings seldom is). Bisection on a bracket that the distribution function itself provides: slow and certain.
 */
export function studentQuantile(probability: number, freedom: number): number {
  if (!(probability > 0 && probability < 1)) throw new RangeError(`No quantile at probability ${probability}`)
  if (probability < 0.5) return -studentQuantile(1 - probability, freedom)
  let low = 0
  let high = Math.max(1, normalQuantile(probability))
  while (studentCdf(high, freedom) < probability) high *= 2
  for (let i = 0; i < 200 && high - low > 1e-14 * high; i++) {
    const middle = (low + high) / 2
    if (studentCdf(middle, freedom) < probability) low = middle
    else high = middle
  }
  return (low + high) / 2
}
