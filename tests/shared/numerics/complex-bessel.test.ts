import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { besselI0Scaled, besselI1Scaled, besselK0Scaled, besselK1Scaled } from '#shared/numerics/bessel.ts'
import { complexI, complexIScaled, complexK, complexKScaled } from '#shared/numerics/complex-bessel.ts'
import reference from '../../reference/bessel-functions.json'

type Bessel = (re: number, im: number, out: Float64Array) => void

function values(bessel: Bessel, re: number, im: number): [number, number, number, number] {
  const out = new Float64Array(4)
  bessel(re, im, out)
  return [...out] as [number, number, number, number]
}

/** Largest error of the two numbers, each against its own modulus or, where asked, against the larger of both. */
function error(found: number[], expected: number[], common = false): number {
  const modulus = [0, 2].map((k) => Math.hypot(expected[k] as number, expected[k + 1] as number))
  const off = [0, 2].map((k) =>
    Math.hypot((found[k] as number) - (expected[k] as number), (found[k + 1] as number) - (expected[k + 1] as number)),
  )
  return Math.max(...off.map((value, k) => value / (common ? Math.max(...modulus) : (modulus[k] as number))))
}

const modulus = fc.double({ min: Math.log(1e-4), max: Math.log(1e3), noNaN: true }).map(Math.exp)
const angle = fc.double({ min: -1.57, max: 1.57, noNaN: true })

describe('modified Bessel functions of a complex argument', () => {
  it('equal mpmath to 1e-14 on rays of the right half-plane (fixtures: bessel-functions.py)', () => {
    expect(reference.complex.length).toBeGreaterThan(200)
    for (const { z, k, i } of reference.complex) {
      const [re, im] = z as [number, number]
      expect(error(values(complexKScaled, re, im), k), `K, z = ${z}`).toBeLessThan(1e-14)
      expect(error(values(complexIScaled, re, im), i, true), `I, z = ${z}`).toBeLessThan(1e-14)
    }
  })

  it('are the real ones on the real axis', () => {
    fc.assert(
      fc.property(modulus, (x) => {
        const k = values(complexKScaled, x, 0)
        const i = values(complexIScaled, x, 0)
        expect(error(k, [besselK0Scaled(x), 0, besselK1Scaled(x), 0])).toBeLessThan(1e-14)
        expect(error(i, [besselI0Scaled(x), 0, besselI1Scaled(x), 0])).toBeLessThan(1e-14)
      }),
    )
  })

  it('are conjugate for conjugate arguments', () => {
    fc.assert(
      fc.property(modulus, angle, (size, phi) => {
        const [re, im] = [size * Math.cos(phi), size * Math.sin(phi)]
        for (const bessel of [complexKScaled, complexIScaled]) {
          const [a, b, c, d] = values(bessel, re, im)
          expect(error(values(bessel, re, -im), [a, -b, c, -d])).toBeLessThan(1e-15)
        }
      }),
    )
  })

  it('keep the Wronskian I0·K1 + I1·K0 = 1/z', () => {
    fc.assert(
      fc.property(modulus, angle, (size, phi) => {
        const [re, im] = [size * Math.cos(phi), size * Math.sin(phi)]
        const [k0, k0i, k1, k1i] = values(complexKScaled, re, im)
        const [i0, i0i, i1, i1i] = values(complexIScaled, re, im)
        const sum = [i0 * k1 - i0i * k1i + i1 * k0 - i1i * k0i, i0 * k1i + i0i * k1 + i1 * k0i + i1i * k0] as const
        expect(sum[0] * re - sum[1] * im).toBeCloseTo(1, 12)
        expect(sum[0] * im + sum[1] * re).toBeCloseTo(0, 12)
      }),
    )
  })

  it('are the scaled forms times the exponential', () => {
    const [k, kScaled] = [values(complexK, 3, 4), values(complexKScaled, 3, 4)]
    const [i, iScaled] = [values(complexI, 3, 4), values(complexIScaled, 3, 4)]
    const turned = (pair: number[], sign: number) =>
      [0, 2].flatMap((n) => {
        const [re = NaN, im = NaN] = pair.slice(n)
        const [cosine, sine] = [Math.cos(4), sign * Math.sin(4)]
        return [re * cosine - im * sine, re * sine + im * cosine].map((part) => part * Math.exp(3 * sign))
      })
    expect(error(k, turned(kScaled, -1))).toBeLessThan(1e-14)
    expect(error(i, turned(iScaled, 1))).toBeLessThan(1e-14)
  })

  it('stay finite for the smallest and largest arguments', () => {
    for (const size of [1e-300, 1e-160, 1e160, 1e300]) {
      for (const bessel of [complexKScaled, complexIScaled]) {
        expect(values(bessel, size, size).every(Number.isFinite), `${size}`).toBe(true)
      }
    }
  })

  it('refuse the left half-plane and what is no number', () => {
    for (const [re, im] of [
      [0, 1],
      [-1, 0],
      [NaN, 0],
      [1, NaN],
      [1, Infinity],
    ] as const) {
      for (const bessel of [complexK, complexKScaled, complexI, complexIScaled]) {
        expect(() => values(bessel, re, im)).toThrow(RangeError)
      }
    }
  })
})
