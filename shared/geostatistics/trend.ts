import { linearRegression } from '#shared/numerics/linear-regression.ts'
import { studentQuantile } from '#shared/numerics/student.ts'

/** A straight line through points by least squares, with the 95 % interval of its slope if points were independent. */
export interface Trend {
  n: number
  slope: number
  slopeLow: number
  slopeHigh: number
  intercept: number
  /** Standard deviation of the points about the line. */
  scatter: number
  /** Share of the variance that the line explains. */
  explained: number
}

/** Two points are a line for certain: three are the fewest of which it can be judged. */
const FEWEST = 3

/** Ordinary least squares of y on x (Draper & Smith 1998, 1); null for fewer than three points, or all x alike. */
export function trendOf(x: readonly number[], y: readonly number[]): Trend | null {
  if (x.length < FEWEST || x.every((value) => value === x[0])) return null
  const { slope, intercept, covariance, sumOfSquares, count } = linearRegression(x, y)
  const half = studentQuantile(0.975, count - 2) * Math.sqrt(covariance[1][1])
  const mean = y.reduce((sum, value) => sum + value / count, 0)
  const total = y.reduce((sum, value) => sum + (value - mean) ** 2, 0)
  return {
    n: count,
    slope,
    slopeLow: slope - half,
    slopeHigh: slope + half,
    intercept,
    scatter: Math.sqrt(sumOfSquares / (count - 2)),
    explained: total > 0 ? 1 - sumOfSquares / total : 0,
  }
}
