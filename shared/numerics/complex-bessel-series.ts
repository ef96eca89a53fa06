import { timesExponential } from './complex-pair.ts'
import { EULER_GAMMA } from './exponential-integral.ts'

const ROUNDING = 1e-17
const MOST_TERMS = 100

/** e^-z·I0(z), e^-z·I1(z) by power series, |z| ≤ 2. Source: Abramowitz & Stegun 1964, 9.6.10; DLMF 10.25.2. */
export function seriesI(re: number, im: number, out: Float64Array): void {
  const quarterRe = (re * re - im * im) / 4
  const quarterIm = (re * im) / 2
  let [termRe, termIm, zeroRe, zeroIm, oneRe, oneIm] = [1, 0, 1, 0, 1, 0]
  for (let k = 1; k < MOST_TERMS; k++) {
    const real = (termRe * quarterRe - termIm * quarterIm) / (k * k)
    termIm = (termRe * quarterIm + termIm * quarterRe) / (k * k)
    termRe = real
    zeroRe += termRe
    zeroIm += termIm
    oneRe += termRe / (k + 1)
    oneIm += termIm / (k + 1)
    if (Math.abs(termRe) + Math.abs(termIm) < ROUNDING) break
  }
  out[0] = zeroRe
  out[1] = zeroIm
  out[2] = (re * oneRe - im * oneIm) / 2
  out[3] = (re * oneIm + im * oneRe) / 2
  timesExponential(-re, -im, out)
}

/** e^z·K0(z), e^z·K1(z) by power series, |z| ≤ 2. Source: Abramowitz & Stegun 1964, 9.6.11; DLMF 10.31.1 and 10.31.2. */
export function seriesK(re: number, im: number, out: Float64Array): void {
  const quarterRe = (re * re - im * im) / 4
  const quarterIm = (re * im) / 2
  const logRe = Math.log(Math.hypot(re, im) / 2) + EULER_GAMMA
  const logIm = Math.atan2(im, re)
  const large = 1 + Math.abs(logRe)
  let harmonic = 0
  let [termRe, termIm, zeroRe, zeroIm, oneRe, oneIm] = [1, 0, -logRe, -logIm, logRe - 0.5, logIm]
  for (let k = 1; k < MOST_TERMS; k++) {
    const real = (termRe * quarterRe - termIm * quarterIm) / (k * k)
    termIm = (termRe * quarterIm + termIm * quarterRe) / (k * k)
    termRe = real
    harmonic += 1 / k
    const rest = logRe - harmonic
    zeroRe -= termRe * rest - termIm * logIm
    zeroIm -= termRe * logIm + termIm * rest
    const restOne = rest - 0.5 / (k + 1)
    oneRe += (termRe * restOne - termIm * logIm) / (k + 1)
    oneIm += (termRe * logIm + termIm * restOne) / (k + 1)
    if ((Math.abs(termRe) + Math.abs(termIm)) * large < ROUNDING) break
  }
  // K1 = 1/z + (z/2)·(…); 1/z by way of 1/|z| so that |z|² cannot underflow.
  const modulus = Math.hypot(re, im)
  out[0] = zeroRe
  out[1] = zeroIm
  out[2] = re / modulus / modulus + (re * oneRe - im * oneIm) / 2
  out[3] = -im / modulus / modulus + (re * oneIm + im * oneRe) / 2
  timesExponential(re, im, out)
}
