import { normalQuantile } from '#shared/numerics/normal.ts'

/** Share of all values below the i-th smallest of n, i from 1: (i − ½)/n (Hazen 1914; positions as in Cunnane 1978). */
export const plottingPosition = (i: number, n: number): number => (i - 0.5) / n

/**
 * How many standard deviations from the mean each value would stand if the values were normal, in the order given. On
 * the normal probability plot values lie along a straight line where they are.
 */
export function normalScores(values: readonly number[]): number[] {
  const order = values.map((_, i) => i).sort((a, b) => values[a]! - values[b]! || a - b)
  const scores = new Array<number>(values.length)
  order.forEach((at, rank) => (scores[at] = normalQuantile(plottingPosition(rank + 1, values.length))))
  return scores
}
