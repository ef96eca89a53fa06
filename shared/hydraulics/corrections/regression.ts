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

type Columns = readonly (readonly number[])[]

/**
 * Ordinary least squares of y on columns, which are scaled to unit length; directions that the readings do not determine
 * are left at zero.
 */
export const regression = (columns: Columns, y: readonly number[]): Regression => regressionBeside(columns, y)([])

/** The same on fixed columns and some more, for many choices of these: products of fixed columns are summed once. */
export function regressionBeside(fixed: Columns, y: readonly number[]): (added: Columns) => Regression {
  const products = fixed.map((a) => fixed.map((b) => dot(a, b)))
  const withY = fixed.map((column) => dot(column, y))
  return (added) => {
    const columns = [...fixed, ...added]
    const product = (i: number, j: number) =>
      products[i]?.[j] ?? dot(columns[i] as readonly number[], columns[j] as readonly number[])
    const scale = columns.map((_, i) => Math.sqrt(product(i, i)) || 1)
    const scaled = (value: number, i: number, j: number) => value / ((scale[i] as number) * (scale[j] as number))
    const { inverse, singular } = invertSymmetric(
      columns.map((_, i) => columns.map((_, j) => scaled(product(i, j), i, j))),
    )
    const right = columns.map((column, i) => (withY[i] ?? dot(column, y)) / (scale[i] as number))
    const coefficients = inverse.map((row, i) => dot(row, right) / (scale[i] as number))
    const residuals = residualsOf(columns, coefficients, y)
    return {
      coefficients,
      residuals,
      squares: dot(residuals, residuals),
      normalInverse: inverse.map((row, i) =>
        row.map((value, j) => value / (scale[i] as number) / (scale[j] as number)),
      ),
      singular,
    }
  }
}

/** Column by column, as the columns lie in memory. */
function residualsOf(columns: Columns, coefficients: number[], y: readonly number[]): number[] {
  const residuals = [...y]
  columns.forEach((column, i) => {
    const coefficient = coefficients[i] as number
    for (let k = 0; k < residuals.length; k++)
      residuals[k] = (residuals[k] as number) - coefficient * (column[k] as number)
  })
  return residuals
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
