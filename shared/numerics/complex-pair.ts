/** Two complex numbers as Re, Im, Re, Im in one array; the operations change it in place. */
export type ComplexPair = Float64Array

/** Multiplies both numbers by e^(re + i·im). */
export function timesExponential(re: number, im: number, pair: ComplexPair): void {
  const size = Math.exp(re)
  timesComplex(size * Math.cos(im), size * Math.sin(im), pair)
}

/** Multiplies both numbers by factor/√z, the root with a positive real part. */
export function timesInverseRoot(factor: number, re: number, im: number, pair: ComplexPair): void {
  const size = factor / Math.sqrt(Math.hypot(re, im))
  const angle = -Math.atan2(im, re) / 2
  timesComplex(size * Math.cos(angle), size * Math.sin(angle), pair)
}

function timesComplex(re: number, im: number, pair: ComplexPair): void {
  for (let k = 0; k < 4; k += 2) {
    const real = pair[k] as number
    const imaginary = pair[k + 1] as number
    pair[k] = real * re - imaginary * im
    pair[k + 1] = real * im + imaginary * re
  }
}
