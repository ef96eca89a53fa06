import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  EULER_GAMMA,
  exponentialIntegral,
  exponentialIntegralDerivative,
  inverseExponentialIntegral,
} from '#shared/numerics/exponential-integral.ts'
import reference from '../../reference/numerics-functions.json'

/** W(u) as Wenzel's table is printed in the handbooks (US Geological Survey Water-Supply Paper 887); from memory. */
const printed: [u: number, W: string][] = [
  [1e-15, '33.9616'],
  [1e-10, '22.4486'],
  [1e-6, '13.2383'],
  [1e-4, '8.6332'],
  [1e-3, '6.3315'],
  [1e-2, '4.0379'],
  [5e-2, '2.4679'],
  [0.1, '1.8229'],
  [0.5, '0.5598'],
  [1, '0.2194'],
  [2, '0.04890'],
  [5, '0.001148'],
]

const argument = fc.double({ min: Math.log(1e-15), max: Math.log(50), noNaN: true }).map(Math.exp)

describe('exponential integral', () => {
  it('equals mpmath to 1e-10 for u from 1e-15 to 50 and beyond', () => {
    expect(reference.exponentialIntegral.length).toBeGreaterThan(200)
    for (const { u, value } of reference.exponentialIntegral) {
      expect(Math.abs(exponentialIntegral(u) / value - 1), `u = ${u}`).toBeLessThan(1e-10)
    }
  })

  it.each(printed)('agrees with the printed table at u = %s', (u, text) => {
    const lastDigit = 10 ** -(text.split('.')[1] ?? '').length
    expect(Math.abs(exponentialIntegral(u) - Number(text))).toBeLessThanOrEqual(0.51 * lastDigit)
  })

  it('has the derivative that central differences show', () => {
    fc.assert(
      fc.property(argument, (u) => {
        const step = 1e-5 * u
        const difference = (exponentialIntegral(u + step) - exponentialIntegral(u - step)) / (2 * step)
        expect(Math.abs(exponentialIntegralDerivative(u) / difference - 1)).toBeLessThan(1e-6)
      }),
    )
  })

  it('falls as u grows and tends to −γ − ln u for small u', () => {
    fc.assert(
      fc.property(argument, (u) => {
        expect(exponentialIntegral(u * 1.001)).toBeLessThan(exponentialIntegral(u))
      }),
    )
    expect(exponentialIntegral(1e-12)).toBeCloseTo(-EULER_GAMMA - Math.log(1e-12), 11)
  })

  it('lies between its bounds ½e^-u·ln(1 + 2/u) and e^-u·ln(1 + 1/u) (Abramowitz & Stegun 5.1.20)', () => {
    fc.assert(
      fc.property(argument, (u) => {
        expect(exponentialIntegral(u)).toBeGreaterThan(0.5 * Math.exp(-u) * Math.log1p(2 / u))
        expect(exponentialIntegral(u)).toBeLessThan(Math.exp(-u) * Math.log1p(1 / u))
      }),
    )
  })

  it('is undone by its inverse', () => {
    fc.assert(
      fc.property(argument, (u) => {
        expect(Math.abs(inverseExponentialIntegral(exponentialIntegral(u)) / u - 1)).toBeLessThan(1e-9)
      }),
    )
  })

  it('refuses arguments that are not positive', () => {
    for (const u of [0, -1, NaN]) {
      expect(() => exponentialIntegral(u)).toThrow(RangeError)
      expect(() => exponentialIntegralDerivative(u)).toThrow(RangeError)
      expect(() => inverseExponentialIntegral(u)).toThrow(RangeError)
    }
    expect(() => inverseExponentialIntegral(Infinity)).toThrow(RangeError)
  })

  it('underflows to zero instead of failing for huge u, and the inverse to the smallest number', () => {
    expect(exponentialIntegral(1e4)).toBe(0)
    expect(inverseExponentialIntegral(1e3)).toBe(Number.MIN_VALUE)
  })
})
