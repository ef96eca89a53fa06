/** Complex arithmetic for formulas that are read more often than they run; inner loops write out real and imaginary parts. */
export interface Complex {
  readonly re: number
  readonly im: number
}

export const complex = (re: number, im = 0): Complex => ({ re, im })
export const plus = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im })
export const minus = (a: Complex, b: Complex): Complex => ({ re: a.re - b.re, im: a.im - b.im })
export const scaled = (factor: number, a: Complex): Complex => ({ re: factor * a.re, im: factor * a.im })
export const times = (a: Complex, b: Complex): Complex => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
})
export const squared = (a: Complex): Complex => times(a, a)

/** a/b, with b scaled so that its square cannot overflow or underflow. */
export function over(a: Complex, b: Complex): Complex {
  const size = Math.hypot(b.re, b.im)
  const [re, im] = [b.re / size, b.im / size]
  return { re: (a.re * re + a.im * im) / size, im: (a.im * re - a.re * im) / size }
}

/** Root with a positive real part, for arguments off the negative real axis. */
export function squareRoot({ re, im }: Complex): Complex {
  const size = Math.sqrt((Math.hypot(re, im) + Math.abs(re)) / 2)
  if (re >= 0) return { re: size, im: im / (2 * size) }
  return { re: Math.abs(im) / (2 * size), im: im < 0 ? -size : size }
}

export function exponential({ re, im }: Complex): Complex {
  const size = Math.exp(re)
  return { re: size * Math.cos(im), im: size * Math.sin(im) }
}

/** The complex number whose real part is at an index, its imaginary part after it. */
export const complexAt = (values: Float64Array, index: number): Complex => ({
  re: values[index] as number,
  im: values[index + 1] as number,
})

/** Writes complex numbers one after another as Re, Im. */
export function writeComplex(values: readonly Complex[], out: Float64Array): void {
  values.forEach(({ re, im }, k) => {
    out[2 * k] = re
    out[2 * k + 1] = im
  })
}
