import { correlatedCovariance } from '#shared/numerics/correlated-residuals.ts'
import { invertSymmetric } from '#shared/numerics/small-matrix.ts'

export interface Regression {
  coefficients: number[]
  residuals: number[]
  squares: number
  /** (X'X)⁻¹ */
  normalInverse: number[][]
  singular: boolean
}

/**
 * Ordinary least squares of y on columns, which are scaled to unit length; directions that the readings do not determine
 * are left at zero.
 */
export function regression(columns: readonly (readonly number[])[], y: readonly number[]): Regression {
  const scale = columns.map((column) => Math.sqrt(dot(column, column)) || 1)
  const normal = columns.map((a, i) => columns.map((b, j) => dot(a, b) / ((scale[i] as number) * (scale[j] as number))))
  const right = columns.map((column, i) => dot(column, y) / (scale[i] as number))
  const { inverse, singular } = invertSymmetric(normal)
  const coefficients = inverse.map((row, i) => dot(row, right) / (scale[i] as number))
  const residuals = y.map((value, k) =>
    columns.reduce((left, column, i) => left - (coefficients[i] as number) * (column[k] as number), value),
  )
  return {
    coefficients,
    residuals,
    squares: dot(residuals, residuals),
    normalInverse: inverse.map((row, i) => row.map((value, j) => value / (scale[i] as number) / (scale[j] as number))),
    singular,
  }
}

/** Covariance of the coefficients, widened for residuals that stray together; `time_s` rises. */
export function regressionCovariance(
  { residuals, normalInverse }: Regression,
  columns: readonly (readonly number[])[],
  time_s: number[],
): number[][] {
  const jacobian = residuals.flatMap((_, k) => columns.map((column) => column[k] as number))
  return correlatedCovariance([{ residuals, jacobian, axes: [time_s] }], normalInverse).covariance
}

function dot(a: readonly number[], b: readonly number[]): number {
  let sum = 0
  for (let i = 0; i < a.length; i++) sum += (a[i] as number) * (b[i] as number)
  return sum
}
