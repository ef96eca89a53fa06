import { complex, exponential, minus, over, plus, scaled, squared, squareRoot, times, type Complex } from './complex.ts'

/** Half the order of the continued fraction. */
const ORDER = 40
/** Error of the Fourier series itself. */
const TOLERANCE = 1e-10
/** Half a period of the series over the longest time, and factor between times that share one series. */
const PERIOD = 1
const SPAN = 2

/**
 * Originals at many times of a transform whose poles may lie anywhere left of the imaginary axis, as those of a
 * swinging level do, which no contour about the negative real axis takes in. Times within a factor of two share
 * their values of the transform. Absolute error about 1e-8 of the original's scale (see the tests).
 * Source: de Hoog, Knight & Stokes 1982.
 */
export function deHoogInverse(transform: (p: Complex) => Complex, times_s: number[]): number[] {
  const blocks = new Map<number, (time: number) => number>()
  return times_s.map((time) => {
    const index = Math.ceil(Math.log(time) / Math.log(SPAN))
    const block = blocks.get(index) ?? seriesUntil(transform, SPAN ** index)
    blocks.set(index, block)
    return block(time)
  })
}

function seriesUntil(transform: (p: Complex) => Complex, end: number): (time: number) => number {
  const period = PERIOD * end
  const shift = -Math.log(TOLERANCE) / (2 * period)
  const values = Array.from({ length: 2 * ORDER + 1 }, (_, k) => transform(complex(shift, (k * Math.PI) / period)))
  values[0] = scaled(0.5, values[0] as Complex)
  const fraction = fractionOf(values)
  return (time) => {
    const angle = (Math.PI * time) / period
    return (Math.exp(shift * time) / period) * evaluated(fraction, exponential(complex(0, angle))).re
  }
}

/** Coefficients of the continued fraction of a power series, by the quotient-difference scheme. */
function fractionOf(values: Complex[]): Complex[] {
  const fraction = [values[0] as Complex]
  let quotients = values.slice(1).map((value, i) => over(value, values[i] as Complex))
  let differences = values.map(() => complex(0))
  for (let r = 1; r <= ORDER; r++) {
    fraction.push(scaled(-1, quotients[0] as Complex))
    const before = differences
    const current = quotients
    differences = current.slice(1).map((next, i) => plus(minus(next, current[i] as Complex), before[i + 1] as Complex))
    fraction.push(scaled(-1, differences[0] as Complex))
    const now = differences
    quotients = now.slice(1).map((next, i) => times(current[i + 1] as Complex, over(next, now[i] as Complex)))
  }
  return fraction
}

/** The fraction at z, its tail replaced by the remainder that the last two coefficients suggest. */
function evaluated(fraction: Complex[], z: Complex): Complex {
  let [a, aBefore] = [fraction[0] as Complex, complex(0)]
  let [b, bBefore] = [complex(1), complex(1)]
  for (let n = 1; n < fraction.length; n++) {
    const factor = n < fraction.length - 1 ? times(fraction[n] as Complex, z) : remainder(fraction, z)
    ;[a, aBefore] = [plus(a, times(factor, aBefore)), a]
    ;[b, bBefore] = [plus(b, times(factor, bBefore)), b]
  }
  return over(a, b)
}

function remainder(fraction: Complex[], z: Complex): Complex {
  const last = fraction.at(-1) as Complex
  const half = scaled(0.5, plus(complex(1), times(minus(fraction.at(-2) as Complex, last), z)))
  const root = squareRoot(plus(complex(1), over(times(last, z), squared(half))))
  return scaled(-1, times(half, minus(complex(1), root)))
}
