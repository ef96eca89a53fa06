import { invertSymmetric } from '#shared/numerics/small-matrix.ts'

export interface Regression {
  coefficients: number[]
  /** Standard deviations for independent residuals. */
  sd: number[]
  squares: number
  /** Share of the squares about the mean that the model explains; 0 where nothing moves. */
  explained: number
  singular: boolean
}

/**
 * Ordinary least squares of y on the columns of `rows`, columns scaled to unit length; directions that the readings do
 * not determine are left at zero.
 */
export function regression(rows: number[][], y: number[]): Regression {
  const size = rows[0]?.length ?? 0
  const column = (i: number) => rows.map((row) => row[i] as number)
  const scale = Array.from({ length: size }, (_, i) => Math.hypot(...column(i)) || 1)
  const normal = scale.map((a, i) => scale.map((b, j) => dot(column(i), column(j)) / (a * b)))
  const right = scale.map((a, i) => dot(column(i), y) / a)
  const { inverse, singular } = invertSymmetric(normal)
  const scaled = inverse.map((row) => dot(row, right))
  const coefficients = scaled.map((value, i) => value / (scale[i] as number))
  const squares = rows.reduce((sum, row, k) => sum + ((y[k] as number) - dot(row, coefficients)) ** 2, 0)
  const mean = y.reduce((sum, value) => sum + value, 0) / y.length
  const about = y.reduce((sum, value) => sum + (value - mean) ** 2, 0)
  const variance = squares / Math.max(1, y.length - size)
  return {
    coefficients,
    sd: inverse.map((row, i) => Math.sqrt(Math.max(0, variance * (row[i] as number))) / (scale[i] as number)),
    squares,
    explained: about > 0 ? Math.max(0, 1 - squares / about) : 0,
    singular,
  }
}

const dot = (a: number[], b: number[]) => a.reduce((sum, value, i) => sum + value * (b[i] as number), 0)
