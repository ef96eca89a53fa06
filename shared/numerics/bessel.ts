import { EULER_GAMMA } from './exponential-integral.ts'

/** Up to here the power series of K loses at most one digit to cancellation and is short. */
const K_SERIES_LIMIT = 2
/** From here on the smallest term of the asymptotic series is below the rounding error: e^(-2x) < 1e-16. */
const ASYMPTOTIC_FROM = 18.5
const ROUNDING = 1e-17
const MOST_TERMS = 500

/** Values of orders 0 and 1, written by the routines below; nothing keeps it between calls. */
const pair = new Float64Array(2)

/** K0(x), modified Bessel function of the second kind; x > 0. Relative error ≤ 1e-14. @throws RangeError */
export const besselK0 = (x: number) => order(scaledK(x), 0) * Math.exp(-x)
/** K1(x); x > 0. Relative error ≤ 1e-14. @throws RangeError */
export const besselK1 = (x: number) => order(scaledK(x), 1) * Math.exp(-x)
/** e^x·K0(x); x > 0. @throws RangeError */
export const besselK0Scaled = (x: number) => order(scaledK(x), 0)
/** e^x·K1(x); x > 0. @throws RangeError */
export const besselK1Scaled = (x: number) => order(scaledK(x), 1)
/** I0(x), modified Bessel function of the first kind; x ≥ 0. Relative error ≤ 1e-14; infinite beyond about 709. */
export const besselI0 = (x: number) => order(scaledI(x), 0) * Math.exp(x)
/** I1(x); x ≥ 0. Relative error ≤ 1e-14; infinite beyond about 709. @throws RangeError */
export const besselI1 = (x: number) => order(scaledI(x), 1) * Math.exp(x)
/** e^-x·I0(x); x ≥ 0. @throws RangeError */
export const besselI0Scaled = (x: number) => order(scaledI(x), 0)
/** e^-x·I1(x); x ≥ 0. @throws RangeError */
export const besselI1Scaled = (x: number) => order(scaledI(x), 1)

const order = (values: Float64Array, index: 0 | 1) => values[index] as number

function scaledK(x: number): Float64Array {
  if (!(x > 0)) throw new RangeError(`K needs a positive argument, not ${x}`)
  if (x <= K_SERIES_LIMIT) seriesK(x)
  else if (x < ASYMPTOTIC_FROM) continuedFractionK(x)
  else asymptotic(x, 1, Math.sqrt(Math.PI / (2 * x)))
  return pair
}

function scaledI(x: number): Float64Array {
  if (!(x >= 0)) throw new RangeError(`I needs an argument of zero or more, not ${x}`)
  if (x < ASYMPTOTIC_FROM) seriesI(x)
  else asymptotic(x, -1, 1 / Math.sqrt(2 * Math.PI * x))
  return pair
}

/** Power series; all terms are positive. Source: Abramowitz & Stegun 1964, 9.6.10; DLMF 10.25.2. */
function seriesI(x: number): void {
  const quarter = (x * x) / 4
  let term = 1
  let zero = 1
  let one = 1
  for (let k = 1; k < MOST_TERMS; k++) {
    term *= quarter / (k * k)
    zero += term
    one += term / (k + 1)
    if (term < ROUNDING * zero) break
  }
  const decay = Math.exp(-x)
  pair[0] = zero * decay
  pair[1] = (x / 2) * one * decay
}

/** Power series with the logarithm. Source: Abramowitz & Stegun 1964, 9.6.11; DLMF 10.31.1 and 10.31.2. */
function seriesK(x: number): void {
  const quarter = (x * x) / 4
  const logarithm = Math.log(x / 2) + EULER_GAMMA
  let term = 1
  let harmonic = 0
  let zero = -logarithm
  let one = logarithm - 0.5
  for (let k = 1; k < MOST_TERMS; k++) {
    term *= quarter / (k * k)
    harmonic += 1 / k
    zero += term * (harmonic - logarithm)
    one += (term / (k + 1)) * (logarithm - harmonic - 0.5 / (k + 1))
    if (term * (1 + Math.abs(logarithm)) < ROUNDING) break
  }
  const growth = Math.exp(x)
  pair[0] = zero * growth
  pair[1] = (1 / x + (x / 2) * one) * growth
}

/**
 * Steed's evaluation of the second continued fraction with Temme's normalising sum.
 * Source: Temme 1975, J. Comput. Phys. 19, 324–337; Thompson & Barnett 1987, Comput. Phys. Commun. 47, 245–257.
 */
function continuedFractionK(x: number): void {
  let b = 2 * (1 + x)
  let d = 1 / b
  let step = d
  let fraction = d
  let [before, now] = [0, 1]
  let a = -0.25
  let c = 0.25
  let q = 0.25
  let sum = 1 + q * step
  for (let i = 2; i < MOST_TERMS; i++) {
    a -= 2 * (i - 1)
    c = (-a * c) / i
    const next = (before - b * now) / a
    before = now
    now = next
    q += c * next
    b += 2
    d = 1 / (b + a * d)
    step *= b * d - 1
    fraction += step
    sum += q * step
    if (Math.abs(q * step) < ROUNDING * Math.abs(sum)) break
  }
  const zero = Math.sqrt(Math.PI / (2 * x)) / sum
  pair[0] = zero
  pair[1] = (zero * (x + 0.5 - fraction / 4)) / x
}

/** Asymptotic series in 1/x for K (sign 1) or in −1/x for I (sign −1). Source: DLMF 10.40.1 and 10.40.2. */
function asymptotic(x: number, sign: 1 | -1, factor: number): void {
  let [termZero, termOne, zero, one] = [1, 1, 1, 1]
  for (let k = 1; k < MOST_TERMS; k++) {
    const odd = (2 * k - 1) ** 2
    const divisor = 8 * k * x * sign
    termZero *= -odd / divisor
    termOne *= (4 - odd) / divisor
    zero += termZero
    one += termOne
    // Past its smallest term the series grows again.
    if (Math.abs(termZero) < ROUNDING || odd > Math.abs(divisor)) break
  }
  pair[0] = factor * zero
  pair[1] = factor * one
}
