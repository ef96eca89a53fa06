/**
 * Akaike's criterion for small samples, n ln(σ²) + 2k + 2k(k+1)/(n − k − 1), the scatter itself counted among the k.
 * It compares fits of the same readings under the same objective; it says nothing about geology.
 * @param meanSquare mean squared residual of the objective
 * @param n effective number of independent readings
 * @param unknowns fitted parameters
 * @returns null where n is too small for the correction, or the fit is exact
 * Source: Hurvich & Tsai 1989.
 */
export function smallSampleCriterion(meanSquare: number, n: number, unknowns: number): number | null {
  const k = unknowns + 1
  if (!(n > k + 1) || !(meanSquare > 0)) return null
  return n * Math.log(meanSquare) + 2 * k + (2 * k * (k + 1)) / (n - k - 1)
}
