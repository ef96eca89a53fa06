import { timesExponential, timesInverseRoot } from './complex-pair.ts'

const ROUNDING = 1e-17
const MOST_TERMS = 100

/** Second exponential of I, made from K. */
const second = new Float64Array(4)

/** e^z·K0(z), e^z·K1(z) for large |z|. Source: DLMF 10.40.2. */
export function asymptoticK(re: number, im: number, out: Float64Array): void {
  series(re, im, out)
  timesInverseRoot(Math.sqrt(Math.PI / 2), re, im, out)
}

/**
 * e^-z·I0(z), e^-z·I1(z) for large |z|, with the second exponential that matters near the imaginary axis.
 * Source: DLMF 10.40.5.
 */
export function asymptoticI(re: number, im: number, out: Float64Array): void {
  series(-re, -im, out)
  timesInverseRoot(1 / Math.sqrt(2 * Math.PI), re, im, out)
  asymptoticK(re, im, second)
  timesExponential(-2 * re, -2 * im, second)
  const share = (im >= 0 ? 1 : -1) / Math.PI
  // ±i·K0/π for order 0, and ∓i·K1/π for order 1, because e^(±iπ) = −1.
  out[0] = (out[0] as number) - share * (second[1] as number)
  out[1] = (out[1] as number) + share * (second[0] as number)
  out[2] = (out[2] as number) + share * (second[3] as number)
  out[3] = (out[3] as number) - share * (second[2] as number)
}

/** Σ a(k)/z^k for orders 0 and 1, up to the smallest term. Source: DLMF 10.17.1 (the coefficients). */
function series(re: number, im: number, out: Float64Array): void {
  // 1/z by way of 1/|z| so that |z|² cannot overflow.
  const modulus = Math.hypot(re, im)
  const [inverseRe, inverseIm] = [re / modulus / modulus, -im / modulus / modulus]
  let [zeroRe, zeroIm, oneRe, oneIm] = [1, 0, 1, 0]
  let [termZeroRe, termZeroIm, termOneRe, termOneIm] = [1, 0, 1, 0]
  for (let k = 1; k < MOST_TERMS; k++) {
    const odd = (2 * k - 1) ** 2
    const [factorZero, factorOne] = [-odd / (8 * k), (4 - odd) / (8 * k)]
    const realZero = factorZero * (termZeroRe * inverseRe - termZeroIm * inverseIm)
    termZeroIm = factorZero * (termZeroRe * inverseIm + termZeroIm * inverseRe)
    termZeroRe = realZero
    const realOne = factorOne * (termOneRe * inverseRe - termOneIm * inverseIm)
    termOneIm = factorOne * (termOneRe * inverseIm + termOneIm * inverseRe)
    termOneRe = realOne
    zeroRe += termZeroRe
    zeroIm += termZeroIm
    oneRe += termOneRe
    oneIm += termOneIm
    // Past its smallest term the series grows again.
    if (Math.abs(termZeroRe) + Math.abs(termZeroIm) < ROUNDING || odd > 8 * k * modulus) break
  }
  out[0] = zeroRe
  out[1] = zeroIm
  out[2] = oneRe
  out[3] = oneIm
}
