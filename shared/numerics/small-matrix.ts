import { CholeskyDecomposition, EigenvalueDecomposition, Matrix } from 'ml-matrix'

/** Reciprocal condition number of a scaled normal matrix below which its directions cannot be told apart. */
const SINGULAR_BELOW = 1e-12

export interface SymmetricInverse {
  inverse: number[][]
  /** True when a direction carries no information; the inverse is then the pseudo-inverse over the others. */
  singular: boolean
  /** Logarithm of the determinant, over the determined directions when singular. */
  logDeterminant: number
}

/** Solves a small symmetric positive definite system by Cholesky; null when it is not positive definite. */
export function solveSymmetric(matrix: number[][], right: number[]): number[] | null {
  const cholesky = new CholeskyDecomposition(new Matrix(matrix))
  if (!cholesky.isPositiveDefinite()) return null
  return cholesky.solve(Matrix.columnVector(right)).to1DArray()
}

/**
 * Inverse of a symmetric positive semi-definite matrix (a normal matrix J'J), scaled to a unit diagonal first so that
 * units do not decide what is singular.
 */
export function invertSymmetric(matrix: number[][]): SymmetricInverse {
  const scale = matrix.map((row, i) => ((row[i] as number) > 0 ? 1 / Math.sqrt(row[i] as number) : 0))
  const scaled = matrix.map((row, i) => row.map((value, j) => value * (scale[i] as number) * (scale[j] as number)))
  const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(new Matrix(scaled), {
    assumeSymmetric: true,
  })
  const largest = Math.max(...realEigenvalues)
  const weak = realEigenvalues.map((value) => !(value > SINGULAR_BELOW * largest))
  const inverse = matrix.map((_, i) =>
    matrix.map((__, j) => {
      let sum = 0
      realEigenvalues.forEach((value, k) => {
        if (!weak[k]) sum += (eigenvectorMatrix.get(i, k) * eigenvectorMatrix.get(j, k)) / value
      })
      return sum * (scale[i] as number) * (scale[j] as number)
    }),
  )
  let logDeterminant = 0
  realEigenvalues.forEach((value, k) => {
    if (!weak[k]) logDeterminant += Math.log(value)
  })
  for (const factor of scale) if (factor > 0) logDeterminant -= 2 * Math.log(factor)
  return { inverse, singular: weak.some(Boolean), logDeterminant }
}
