import { studentQuantile } from '#shared/numerics/student.ts'
import { GeostatisticsError } from './errors.ts'
import { deviationOf, meanOf } from './robust.ts'

export interface Difference {
  difference: number
  low: number
  high: number
}

/** Fewest values of a group whose scatter says anything (common practice). */
export const FEWEST_TO_COMPARE = 5

/**
 * Difference of the means of two groups of independent values with its 95 % interval; their variances need not be equal
 * (Welch 1947, Biometrika 34). @throws GeostatisticsError where a group has fewer than two values, or none of them scatters
 */
export function differenceOfMeans(a: readonly number[], b: readonly number[]): Difference {
  if (a.length < 2 || b.length < 2) throw new GeostatisticsError('too-few', 'a mean needs two values for its error')
  const [va, vb] = [deviationOf(a) ** 2 / a.length, deviationOf(b) ** 2 / b.length]
  if (!(va + vb > 0)) throw new GeostatisticsError('bad-input', 'values without scatter give no interval')
  const freedom = (va + vb) ** 2 / (va ** 2 / (a.length - 1) + vb ** 2 / (b.length - 1))
  const difference = meanOf(a) - meanOf(b)
  const half = studentQuantile(0.975, freedom) * Math.sqrt(va + vb)
  return { difference, low: difference - half, high: difference + half }
}
