/**
 * Decaying complex exponentials and their means, for inner loops: numbers lie in one array, Re at the index given and Im
 * after it, and nothing is allocated. Means keep their figures where arguments are small.
 */

/** An exponential below e^-40 adds nothing. */
const SPENT = 40
/** Differences of exponentials of arguments below this are summed as series. */
const SERIES_BELOW = 0.1
const SERIES_TERMS = 9

/** e^(−ηc). */
export function decay(values: Float64Array, etaRe: number, etaIm: number, length: number, at: number): void {
  if (etaRe * length > SPENT) {
    values[at] = 0
    values[at + 1] = 0
    return
  }
  const size = Math.exp(-etaRe * length)
  values[at] = size * Math.cos(etaIm * length)
  values[at + 1] = -size * Math.sin(etaIm * length)
}

/** (1 − e^-v)/v, the mean of e^-u from 0 to v. */
export function meanDecay(values: Float64Array, vRe: number, vIm: number, at: number): void {
  decay(values, vRe, vIm, 1, at)
  meanOf(values, vRe, vIm, at, at)
}

/** The same from e^-v. */
export function meanOf(values: Float64Array, vRe: number, vIm: number, from: number, at: number): void {
  const size = vRe * vRe + vIm * vIm
  if (size < SERIES_BELOW * SERIES_BELOW) return series(values, vRe, vIm, 1, 0, at)
  const [re, im] = [1 - (values[from] as number), -(values[from + 1] as number)]
  values[at] = (re * vRe + im * vIm) / size
  values[at + 1] = (im * vRe - re * vIm) / size
}

/** order!·Σ (−v)^k·(1 + k·rising)/(k + order)!: the means above for small v. */
export function series(
  values: Float64Array,
  vRe: number,
  vIm: number,
  order: number,
  rising: number,
  at: number,
): void {
  let [termRe, termIm] = [1, 0]
  let [re, im] = [1, 0]
  for (let k = 1; k < SERIES_TERMS; k++) {
    const real = -(termRe * vRe - termIm * vIm) / (k + order)
    termIm = -(termRe * vIm + termIm * vRe) / (k + order)
    termRe = real
    re += termRe * (1 + k * rising)
    im += termIm * (1 + k * rising)
  }
  values[at] = re
  values[at + 1] = im
}

export function times(values: Float64Array, at: number, re: number, im: number): void {
  const [real, imaginary] = [values[at] as number, values[at + 1] as number]
  values[at] = real * re - imaginary * im
  values[at + 1] = real * im + imaginary * re
}
