/** Lanczos coefficients (g = 7, n = 9), relative error about 1e-15. Source: Godfrey's set, from memory; tested against mpmath. */
const LANCZOS = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
  12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
]

/** ln Γ(x) for x > 0. */
export function logGamma(x: number): number {
  if (!(x > 0)) throw new RangeError(`ln Γ needs a positive argument, not ${x}`)
  if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - logGamma(1 - x)
  const z = x - 1
  const t = z + 7.5
  let sum = LANCZOS[0] as number
  for (let i = 1; i < LANCZOS.length; i++) sum += (LANCZOS[i] as number) / (z + i)
  return 0.5 * Math.log(2 * Math.PI) + (z + 0.5) * Math.log(t) - t + Math.log(sum)
}

/**
 * Regularised incomplete beta function I_x(a, b), a and b > 0, x in 0…1.
 * Source: Abramowitz & Stegun 1964, 26.5.8 (continued fraction).
 */
export function incompleteBeta(x: number, a: number, b: number): number {
  if (!(a > 0 && b > 0 && x >= 0 && x <= 1)) throw new RangeError(`I_x(a, b) is not defined at ${x}, ${a}, ${b}`)
  if (x === 0 || x === 1) return x
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x))
  // The fraction converges quickly only on this side of the mean; the other side follows by symmetry.
  return x < (a + 1) / (a + b + 2) ? (front * betaFraction(x, a, b)) / a : 1 - (front * betaFraction(1 - x, b, a)) / b
}

function betaFraction(x: number, a: number, b: number): number {
  const tiny = 1e-300
  let c = 1
  let d = 1 / nonZero(1 - ((a + b) * x) / (a + 1), tiny)
  let h = d
  for (let m = 1; m < 500; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m))
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1))
    let change = 1
    for (const coefficient of [even, odd]) {
      d = 1 / nonZero(1 + coefficient * d, tiny)
      c = nonZero(1 + coefficient / c, tiny)
      change = c * d
      h *= change
    }
    if (Math.abs(change - 1) < 1e-15) break
  }
  return h
}

const nonZero = (value: number, tiny: number) => (Math.abs(value) < tiny ? tiny : value)
