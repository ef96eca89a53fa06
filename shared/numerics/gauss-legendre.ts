/** Nodes on (0, 1) and weights that sum to 1: ∫f over (0, L) ≈ L·Σ weights·f(L·nodes). */
export interface Quadrature {
  nodes: Float64Array
  weights: Float64Array
}

/**
 * Gauss–Legendre quadrature of any order, exact for polynomials up to degree 2n − 1.
 * Nodes are zeros of the Legendre polynomial by Newton's method from Tricomi's guess.
 * Source: Abramowitz & Stegun 1964, 22.16.6 and 25.4.29.
 */
export function gaussLegendre(order: number): Quadrature {
  const nodes = new Float64Array(order)
  const weights = new Float64Array(order)
  for (let i = 0; i < order; i++) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (order + 0.5))
    let slope = 1
    for (let step = 1; Math.abs(step) > 1e-15; x -= step) {
      const [value, derivative] = legendre(order, x)
      slope = derivative
      step = value / derivative
    }
    nodes[i] = (1 - x) / 2
    weights[i] = 1 / ((1 - x * x) * slope * slope)
  }
  return { nodes, weights }
}

/** Legendre polynomial and its derivative, by the three-term recurrence. */
function legendre(order: number, x: number): [value: number, derivative: number] {
  let [before, value] = [1, x]
  for (let n = 2; n <= order; n++) [before, value] = [value, ((2 * n - 1) * x * value - (n - 1) * before) / n]
  return [value, (order * (before - x * value)) / (1 - x * x)]
}
