import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  besselI0,
  besselI0Scaled,
  besselI1,
  besselI1Scaled,
  besselK0,
  besselK0Scaled,
  besselK1,
  besselK1Scaled,
} from '#shared/numerics/bessel.ts'
import reference from '../../reference/bessel-functions.json'

/** Abramowitz & Stegun 1964, tables 9.8 and 9.11; from memory. */
const printed: [name: string, value: number, text: string][] = [
  ['K0(0.1)', besselK0(0.1), '2.4270690'],
  ['K0(1)', besselK0(1), '0.4210244'],
  ['K1(1)', besselK1(1), '0.6019072'],
  ['K0(2)', besselK0(2), '0.1138939'],
  ['I0(1)', besselI0(1), '1.2660659'],
  ['I1(1)', besselI1(1), '0.5651591'],
  ['I0(2)', besselI0(2), '2.2795853'],
]

const argument = fc.double({ min: Math.log(1e-6), max: Math.log(600), noNaN: true }).map(Math.exp)

describe('modified Bessel functions', () => {
  it.each([
    ['k0', besselK0Scaled],
    ['k1', besselK1Scaled],
    ['i0', besselI0Scaled],
    ['i1', besselI1Scaled],
  ] as const)(
    '%s, scaled, equals mpmath to 5e-15 from 1e-300 to 1e6 (fixtures: bessel-functions.py)',
    (name, scaled) => {
      expect(reference.real.length).toBeGreaterThan(80)
      for (const values of reference.real) {
        expect(Math.abs(scaled(values.x) / values[name] - 1), `x = ${values.x}`).toBeLessThan(5e-15)
      }
    },
  )

  it.each(printed)('%s is %s, in the table %s', (_, value, text) => {
    expect(Math.abs(value - Number(text))).toBeLessThan(0.51e-7)
  })

  it('keeps the Wronskian I0·K1 + I1·K0 = 1/x', () => {
    fc.assert(
      fc.property(argument, (x) => {
        const sum = besselI0Scaled(x) * besselK1Scaled(x) + besselI1Scaled(x) * besselK0Scaled(x)
        expect(Math.abs(sum * x - 1)).toBeLessThan(1e-14)
      }),
    )
  })

  it('is the scaled form times the exponential', () => {
    fc.assert(
      fc.property(argument, (x) => {
        expect(besselK0(x)).toBe(besselK0Scaled(x) * Math.exp(-x))
        expect(besselK1(x)).toBe(besselK1Scaled(x) * Math.exp(-x))
        expect(besselI0(x)).toBe(besselI0Scaled(x) * Math.exp(x))
        expect(besselI1(x)).toBe(besselI1Scaled(x) * Math.exp(x))
      }),
    )
  })

  it('has −K1 as derivative of K0, and I1 as that of I0', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 50, noNaN: true }), (x) => {
        const h = 1e-5 * x
        const slopeK = (besselK0(x + h) - besselK0(x - h)) / (2 * h)
        const slopeI = (besselI0(x + h) - besselI0(x - h)) / (2 * h)
        expect(Math.abs(slopeK / besselK1(x) + 1)).toBeLessThan(1e-6)
        expect(Math.abs(slopeI / besselI1(x) - 1)).toBeLessThan(1e-6 * Math.max(1, 1 / (x * x)))
      }),
    )
  })

  it('starts from I0(0) = 1 and I1(0) = 0, and ends where numbers end', () => {
    expect([besselI0(0), besselI1(0)]).toEqual([1, 0])
    expect([besselK0(800), besselK1(800)]).toEqual([0, 0])
    expect([besselI0(800), besselI1(800)]).toEqual([Infinity, Infinity])
  })

  it('refuses arguments outside its domain', () => {
    for (const x of [0, -1, NaN]) for (const k of [besselK0, besselK1Scaled]) expect(() => k(x)).toThrow(RangeError)
    for (const x of [-1e-9, NaN]) for (const i of [besselI0, besselI1Scaled]) expect(() => i(x)).toThrow(RangeError)
  })
})
