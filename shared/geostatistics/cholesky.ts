/** Dot product of the first `n` entries of two rows of one array; four sums, so that additions need not wait in line. */
function rowDot(a: Float64Array, p: number, q: number, n: number): number {
  let [s0, s1, s2, s3] = [0, 0, 0, 0]
  let k = 0
  for (; k + 3 < n; k += 4) {
    s0 += a[p + k]! * a[q + k]!
    s1 += a[p + k + 1]! * a[q + k + 1]!
    s2 += a[p + k + 2]! * a[q + k + 2]!
    s3 += a[p + k + 3]! * a[q + k + 3]!
  }
  for (; k < n; k++) s0 += a[p + k]! * a[q + k]!
  return s0 + s1 + (s2 + s3)
}

/**
 * Cholesky factor of a symmetric matrix in place: `a` is n × n row by row, only its lower triangle is read and written.
 * Returns false when the matrix is not safely positive definite, which is how coincident values show themselves.
 */
export function choleskyInPlace(a: Float64Array, n: number): boolean {
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) a[i * n + j] = (a[i * n + j]! - rowDot(a, i * n, j * n, j)) / a[j * n + j]!
    const diagonal = a[i * n + i]!
    const left = diagonal - rowDot(a, i * n, i * n, i)
    if (!(left > 1e-13 * diagonal)) return false
    a[i * n + i] = Math.sqrt(left)
  }
  return true
}

/** Solves L y = b in place. */
export function forwardSolve(l: Float64Array, n: number, b: Float64Array): void {
  for (let i = 0; i < n; i++) {
    let sum = b[i]!
    for (let k = 0; k < i; k++) sum -= l[i * n + k]! * b[k]!
    b[i] = sum / l[i * n + i]!
  }
}

/** Solves Lᵀ y = b in place. */
export function backSolve(l: Float64Array, n: number, b: Float64Array): void {
  for (let i = n - 1; i >= 0; i--) {
    const value = b[i]! / l[i * n + i]!
    b[i] = value
    for (let k = 0; k < i; k++) b[k]! -= l[i * n + k]! * value
  }
}

/** Σ ln of the diagonal, twice: the log determinant of the matrix that was factored. */
export function logDeterminant(l: Float64Array, n: number): number {
  let sum = 0
  for (let i = 0; i < n; i++) sum += Math.log(l[i * n + i]!)
  return 2 * sum
}
