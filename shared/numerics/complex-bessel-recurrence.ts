import { timesInverseRoot } from './complex-pair.ts'

const ROUNDING = 1e-17
const MOST_LEVELS = 500

/**
 * e^z·K0(z), e^z·K1(z) for |z| > 2: Steed's evaluation of the second continued fraction with Temme's normalising sum.
 * Source: Temme 1975, J. Comput. Phys. 19, 324–337; Thompson & Barnett 1987, Comput. Phys. Commun. 47, 245–257.
 */
export function fractionK(re: number, im: number, out: Float64Array): void {
  let bRe = 2 * (1 + re)
  const bIm = 2 * im
  let square = bRe * bRe + bIm * bIm
  let [dRe, dIm] = [bRe / square, -bIm / square]
  let [stepRe, stepIm, fractionRe, fractionIm] = [dRe, dIm, dRe, dIm]
  let [beforeRe, beforeIm, nowRe, nowIm] = [0, 0, 1, 0]
  let [a, c, qRe, qIm] = [-0.25, 0.25, 0.25, 0]
  let [sumRe, sumIm] = [1 + 0.25 * stepRe, 0.25 * stepIm]
  for (let i = 2; i < MOST_LEVELS; i++) {
    a -= 2 * (i - 1)
    c = (-a * c) / i
    const nextRe = (beforeRe - (bRe * nowRe - bIm * nowIm)) / a
    const nextIm = (beforeIm - (bRe * nowIm + bIm * nowRe)) / a
    ;[beforeRe, beforeIm, nowRe, nowIm] = [nowRe, nowIm, nextRe, nextIm]
    qRe += c * nextRe
    qIm += c * nextIm
    bRe += 2
    const [wholeRe, wholeIm] = [bRe + a * dRe, bIm + a * dIm]
    square = wholeRe * wholeRe + wholeIm * wholeIm
    dRe = wholeRe / square
    dIm = -wholeIm / square
    const factorRe = bRe * dRe - bIm * dIm - 1
    const factorIm = bRe * dIm + bIm * dRe
    const real = stepRe * factorRe - stepIm * factorIm
    stepIm = stepRe * factorIm + stepIm * factorRe
    stepRe = real
    fractionRe += stepRe
    fractionIm += stepIm
    const [partRe, partIm] = [qRe * stepRe - qIm * stepIm, qRe * stepIm + qIm * stepRe]
    sumRe += partRe
    sumIm += partIm
    if (Math.abs(partRe) + Math.abs(partIm) < ROUNDING * (Math.abs(sumRe) + Math.abs(sumIm))) break
  }
  out[0] = sumRe
  out[1] = sumIm
  // K1/K0 = (z + 1/2 − fraction/4)/z
  out[2] = re + 0.5 - fractionRe / 4
  out[3] = im - fractionIm / 4
  fromSum(re, im, out)
}

/** From the normalising sum and z·K1/K0 to e^z·K0 and e^z·K1. */
function fromSum(re: number, im: number, out: Float64Array): void {
  const [sumRe = 0, sumIm = 0, topRe = 0, topIm = 0] = out
  const square = sumRe * sumRe + sumIm * sumIm
  const [zeroRe, zeroIm] = [sumRe / square, -sumIm / square]
  const modulus = re * re + im * im
  const ratioRe = (topRe * re + topIm * im) / modulus
  const ratioIm = (topIm * re - topRe * im) / modulus
  out[0] = zeroRe
  out[1] = zeroIm
  out[2] = zeroRe * ratioRe - zeroIm * ratioIm
  out[3] = zeroRe * ratioIm + zeroIm * ratioRe
  timesInverseRoot(Math.sqrt(Math.PI / 2), re, im, out)
}

/**
 * e^-z·I0(z), e^-z·I1(z) for 2 < |z| < 20: Miller's backward recurrence I(k−1) = I(k+1) + (2k/z)·I(k), normalised by
 * e^z = I0 + 2ΣI(k), in which nothing cancels while Re z > 0.
 * Source: Abramowitz & Stegun 1964, 9.6.26, 9.6.37 and example 9.12; DLMF 10.74(iv).
 */
export function recurrenceI(re: number, im: number, out: Float64Array): void {
  const square = re * re + im * im
  const [inverseRe, inverseIm] = [re / square, -im / square]
  let [aboveRe, aboveIm, hereRe, hereIm, sumRe, sumIm] = [0, 0, 1, 0, 0, 0]
  // So high that the first term left out is below 1e-17 of the sum for every |z| of the range.
  for (let k = Math.ceil(20 + 2.2 * Math.sqrt(square)); k > 0; k--) {
    sumRe += 2 * hereRe
    sumIm += 2 * hereIm
    const belowRe = aboveRe + 2 * k * (inverseRe * hereRe - inverseIm * hereIm)
    const belowIm = aboveIm + 2 * k * (inverseRe * hereIm + inverseIm * hereRe)
    aboveRe = hereRe
    aboveIm = hereIm
    hereRe = belowRe
    hereIm = belowIm
  }
  sumRe += hereRe
  sumIm += hereIm
  const size = sumRe * sumRe + sumIm * sumIm
  out[0] = (hereRe * sumRe + hereIm * sumIm) / size
  out[1] = (hereIm * sumRe - hereRe * sumIm) / size
  out[2] = (aboveRe * sumRe + aboveIm * sumIm) / size
  out[3] = (aboveIm * sumRe - aboveRe * sumIm) / size
}
