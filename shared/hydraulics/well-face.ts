import { complexKScaled } from '#shared/numerics/complex-bessel.ts'
import {
  complexAt,
  exponential,
  minus,
  over,
  scaled,
  squared,
  squareRoot,
  times,
  type Complex,
} from '#shared/numerics/complex.ts'

/** Flow at the face of a well, in Laplace space, as wells that store water and slug tests need it. */
export interface WellFace {
  /** q = r_w·√(pS/T) */
  q: Complex
  /** e^q·K1(q) */
  K1: Complex
  /** G = K0(q)/(q·K1(q)): drawdown at the face is G/(2πT) times the flow from the aquifer. */
  G: Complex
  /** dG/d ln q = q²G² − 1 */
  slope: Complex
}

const values = new Float64Array(4)

/** @param radius_m where the aquifer begins */
export function wellFace(p: Complex, T: number, S: number, radius_m: number): WellFace {
  const q = scaled(radius_m * Math.sqrt(S / T), squareRoot(p))
  complexKScaled(q.re, q.im, values)
  const K1 = complexAt(values, 2)
  const ratio = over(complexAt(values, 0), K1)
  const { re, im } = squared(ratio)
  return { q, K1, G: over(ratio, q), slope: { re: re - 1, im } }
}

/**
 * Beyond the face drawdown is V/(2πT) times the flow from the aquifer: V = K0(m)/(q·K1(q)) with m = r·√(pS/T).
 * `rise` = d ln V/d ln q = q²G and `fall` = −d ln V/d ln m = m·K1(m)/K0(m).
 */
export function beyondFace(p: Complex, T: number, S: number, distance_m: number, { q, K1, G }: WellFace) {
  const m = scaled(distance_m * Math.sqrt(S / T), squareRoot(p))
  complexKScaled(m.re, m.im, values)
  const K0 = complexAt(values, 0)
  const fall = over(times(m, complexAt(values, 2)), K0)
  return { V: times(exponential(minus(q, m)), over(K0, times(q, K1))), rise: times(squared(q), G), fall }
}
