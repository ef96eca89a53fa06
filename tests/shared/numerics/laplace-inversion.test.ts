import { describe, expect, it } from 'vitest'
import { besselK0 } from '#shared/numerics/bessel.ts'
import { complexK } from '#shared/numerics/complex-bessel.ts'
import { complex, complexAt, exponential, over, scaled, squareRoot, squared, times } from '#shared/numerics/complex.ts'
import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import { hankelRule } from '#shared/numerics/hankel-transform.ts'
import { laplaceInverse, laplaceInverter, type LaplaceTransform } from '#shared/numerics/laplace-inversion.ts'

interface Pair {
  name: string
  transform: (p: { re: number; im: number }) => { re: number; im: number }
  original: (time: number) => number
}

const bessel = new Float64Array(4)
const besselOf = (z: { re: number; im: number }) => {
  complexK(z.re, z.im, bessel)
  return complexAt(bessel, 0)
}
/** Sources: Abramowitz & Stegun 1964, 29.3.1, 29.3.2, 29.3.4, 29.3.8, 29.3.82 and 29.3.120. */
const pairs: Pair[] = [
  { name: '1/p', transform: (p) => over(complex(1), p), original: () => 1 },
  { name: '1/p²', transform: (p) => over(complex(1), squared(p)), original: (t) => t },
  { name: '1/√p', transform: (p) => over(complex(1), squareRoot(p)), original: (t) => 1 / Math.sqrt(Math.PI * t) },
  {
    name: '1/(p + 2)',
    transform: ({ re, im }) => over(complex(1), complex(re + 2, im)),
    original: (t) => Math.exp(-2 * t),
  },
  {
    name: 'e^-√p',
    transform: (p) => exponential(scaled(-1, squareRoot(p))),
    original: (t) => Math.exp(-1 / (4 * t)) / Math.sqrt(4 * Math.PI * t ** 3),
  },
  {
    name: 'K0(√p)/p',
    transform: (p) => over(besselOf(squareRoot(p)), p),
    original: (t) => exponentialIntegral(1 / (4 * t)) / 2,
  },
]

const asTransform =
  (value: Pair['transform']): LaplaceTransform =>
  (re, im, out) => {
    const { re: real, im: imaginary } = value({ re, im })
    out[0] = real
    out[1] = imaginary
  }

describe('Laplace inversion', () => {
  it.each(pairs)('of $name is right to 1e-9, at one time and with a contour shared by many', (pair) => {
    const transform = asTransform(pair.transform)
    const many = laplaceInverter(transform, 1)
    const out = new Float64Array(1)
    for (const time of [0.1, 0.13, 0.27, 0.9, 1, 1.1, 4, 100, 1e6]) {
      const expected = pair.original(time)
      // The error is relative to the transform's scale p·F(p) at p = 1/t, or to the original if that is more.
      const { re, im } = times(pair.transform(complex(1 / time)), complex(1 / time))
      const scale = Math.max(Math.abs(expected), Math.hypot(re, im))
      laplaceInverse(transform, 1, time, out)
      expect(Math.abs((out[0] as number) - expected)).toBeLessThan(1e-10 * scale)
      many(time, out)
      expect(Math.abs((out[0] as number) - expected)).toBeLessThan(2e-9 * scale)
    }
  })

  it('keeps its error relative on a falling flank where the front is known', () => {
    const transform = asTransform((p) => over(besselOf(squareRoot(p)), p))
    const out = new Float64Array(1)
    const invert = laplaceInverter(transform, 1, { front: 1 / 4 })
    for (const u of [0.5, 1.9, 2.1, 5, 10, 20, 50, 100]) {
      invert(1 / (4 * u), out)
      expect(Math.abs((2 * (out[0] as number)) / exponentialIntegral(u) - 1)).toBeLessThan(u > 20 ? 1e-6 : 1e-8)
    }
    invert(1 / 4000, out)
    expect(out[0]).toBe(0)
  })

  it('inverts several transforms at once', () => {
    const out = new Float64Array(2)
    const both: LaplaceTransform = (re, im, values) => {
      const one = over(complex(1), complex(re, im))
      const two = squared(one)
      values.set([one.re, one.im, two.re, two.im])
    }
    laplaceInverse(both, 2, 3, out)
    expect(out[0]).toBeCloseTo(1, 9)
    expect(out[1]).toBeCloseTo(3, 9)
    laplaceInverter(both, 2)(3, out)
    expect(out[0]).toBeCloseTo(1, 8)
    expect(out[1]).toBeCloseTo(3, 8)
  })
})

describe('Hankel quadrature', () => {
  const { y, weight, slopeWeight } = hankelRule()
  const transform = (weights: Float64Array, rho: number, F: (x: number) => number) =>
    y.reduce((sum, value, j) => sum + (weights[j] as number) * F(value / rho), 0) / rho ** 2

  it('gives ∫x·J0(xρ)/(x² + a²)dx = K0(aρ) and its slope to 1e-9 (Abramowitz & Stegun 1964, 11.4.44)', () => {
    for (const rho of [1e-4, 0.01, 0.3, 1, 6]) {
      for (const a of [1e-5, 0.01, 1, 3]) {
        const F = (x: number) => 1 / (x * x + a * a)
        expect(Math.abs(transform(weight, rho, F) - besselK0(a * rho))).toBeLessThan(1e-9)
        const h = 1e-4
        const slope = (besselK0(a * rho * (1 + h)) - besselK0(a * rho * (1 - h))) / (2 * h)
        expect(Math.abs(transform(slopeWeight, rho, F) - slope)).toBeLessThan(3e-8)
      }
    }
  })

  it('gives ∫e^(-xz)·J0(xρ)dx = 1/√(ρ² + z²) to 1e-9 (Abramowitz & Stegun 1964, 29.3.55)', () => {
    for (const rho of [0.01, 0.3, 3]) {
      for (const z of [0.01, 0.5, 1]) {
        const exact = 1 / Math.hypot(rho, z)
        expect(Math.abs(transform(weight, rho, (x) => Math.exp(-x * z) / x) / exact - 1)).toBeLessThan(1e-9)
      }
    }
  })
})
