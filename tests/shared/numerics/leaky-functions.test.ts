import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { aquitardH, aquitardWellFunction } from '#shared/numerics/aquitard-well-function.ts'
import { besselK0 } from '#shared/numerics/bessel.ts'
import { erfcScaled } from '#shared/numerics/complementary-error.ts'
import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import { gaussLegendre } from '#shared/numerics/gauss-legendre.ts'
import { leakyW, leakyWellFunction } from '#shared/numerics/leaky-well-function.ts'
import reference from '../../reference/leaky-functions.json'

const relative = (value: number, expected: number) => Math.abs(value / expected - 1)
const logarithmic = (min: number, max: number) =>
  fc.double({ min: Math.log(min), max: Math.log(max), noNaN: true }).map(Math.exp)

/** W(u, r/B) as Hantush's table is printed in the handbooks; from memory. */
const printedW: [u: number, rho: number, text: string][] = [
  [0, 0.1, '4.8541'],
  [1e-3, 0.1, '4.8292'],
  [0.01, 0.1, '3.8150'],
  [0.1, 0.1, '1.8050'],
  [0.01, 0.5, '1.8486'],
  [0.1, 1, '0.8190'],
  [1, 1, '0.1855'],
]

describe('leaky well function', () => {
  it('equals mpmath to 1e-10 for u from 1e-15 to 50 and r/B from 1e-6 to 10 (fixtures: leaky-functions.py)', () => {
    expect(reference.leaky.length).toBeGreaterThan(150)
    for (const { u, rho, value } of reference.leaky) {
      expect(relative(leakyW(u, rho), value), `u = ${u}, r/B = ${rho}`).toBeLessThan(1e-10)
    }
  })

  it('equals the inversion of 2·K0(√(4up + (r/B)²))/p by mpmath', () => {
    expect(reference.leakyInverted.length).toBe(9)
    for (const { u, rho, value } of reference.leakyInverted) expect(relative(leakyW(u, rho), value)).toBeLessThan(1e-10)
  })

  it.each(printedW)('agrees with the printed table at u = %s and r/B = %s', (u, rho, text) => {
    expect(Math.abs(leakyW(u || 1e-15, rho) - Number(text))).toBeLessThanOrEqual(0.51e-4)
  })

  it('has the derivatives that central differences show', () => {
    fc.assert(
      fc.property(logarithmic(1e-8, 20), logarithmic(1e-4, 8), (u, rho) => {
        const out = new Float64Array(3)
        leakyWellFunction(rho)(u, out)
        const [value = NaN, byU = NaN, byRho = NaN] = out
        const h = 1e-4
        const slopeU = (leakyW(u * Math.exp(h), rho) - leakyW(u * Math.exp(-h), rho)) / (2 * h)
        const slopeRho = (leakyW(u, rho * Math.exp(h)) - leakyW(u, rho * Math.exp(-h))) / (2 * h)
        expect(Math.abs(slopeU - byU)).toBeLessThan(1e-6 * (value + Math.abs(byU)))
        expect(Math.abs(slopeRho - byRho)).toBeLessThan(1e-6 * (value + Math.abs(byRho)))
      }),
    )
  })

  it('joins its ways of evaluation without a step', () => {
    const joints = [
      [0.5, 1],
      [1, 2],
      [4, 0.3],
      [2, 2 * Math.SQRT2],
    ] as const
    for (const [u, rho] of joints)
      expect(relative(leakyW(u * (1 - 1e-12), rho), leakyW(u * (1 + 1e-12), rho))).toBeLessThan(1e-10)
  })

  it('tends to W(u) as r/B falls, and to 2·K0(r/B) as u falls', () => {
    fc.assert(
      fc.property(logarithmic(1e-6, 20), (u) => {
        expect(relative(leakyW(u, 1e-7 * Math.sqrt(u)), exponentialIntegral(u))).toBeLessThan(1e-10)
      }),
    )
    fc.assert(
      fc.property(logarithmic(1e-3, 10), (rho) => {
        expect(relative(leakyW(1e-3 * rho * rho, rho), 2 * besselK0(rho))).toBeLessThan(1e-12)
      }),
    )
  })

  it('falls as u grows and as r/B grows', () => {
    fc.assert(
      fc.property(logarithmic(1e-3, 20), logarithmic(0.05, 5), (u, rho) => {
        fc.pre((rho * rho) / (4 * u) < 20)
        expect(leakyW(1.01 * u, rho)).toBeLessThan(leakyW(u, rho))
        expect(leakyW(u, 1.01 * rho)).toBeLessThan(leakyW(u, rho))
      }),
    )
  })

  it('refuses what is not positive', () => {
    for (const bad of [0, -1, NaN]) {
      expect(() => leakyW(bad, 0.1)).toThrow(RangeError)
      expect(() => leakyW(0.1, bad)).toThrow(RangeError)
    }
  })

  it('underflows to zero instead of failing', () => {
    expect(leakyW(1e4, 0.1)).toBe(0)
    expect(leakyW(1e-3, 1e4)).toBe(0)
  })
})

describe('well function with storage of the aquitard', () => {
  it('equals mpmath to 1e-8 for u from 1e-15 to 50 and β from 1e-4 to 100 (fixtures: leaky-functions.py)', () => {
    expect(reference.aquitard.length).toBeGreaterThan(50)
    for (const { u, beta, value } of reference.aquitard) {
      // Below this the reference itself is no number.
      if (value < 1e-300) expect(aquitardH(u, beta)).toBeLessThan(1e-299)
      else expect(relative(aquitardH(u, beta), value), `u = ${u}, β = ${beta}`).toBeLessThan(1e-8)
    }
  })

  it('equals the inversion of 2·K0(√(σ + 4β√σ))/p, σ = 4up, by mpmath', () => {
    expect(reference.aquitardInverted.length).toBe(9)
    for (const { u, beta, value } of reference.aquitardInverted) {
      expect(relative(aquitardH(u, beta), value)).toBeLessThan(1e-10)
    }
  })

  it('has the derivatives that central differences show', () => {
    fc.assert(
      fc.property(logarithmic(1e-8, 5), logarithmic(1e-3, 10), (u, beta) => {
        const out = new Float64Array(3)
        aquitardWellFunction(u, beta, out)
        const [value = NaN, byU = NaN, byBeta = NaN] = out
        const h = 1e-3
        const slopeU = (aquitardH(u * Math.exp(h), beta) - aquitardH(u * Math.exp(-h), beta)) / (2 * h)
        const slopeBeta = (aquitardH(u, beta * Math.exp(h)) - aquitardH(u, beta * Math.exp(-h))) / (2 * h)
        expect(Math.abs(slopeU - byU)).toBeLessThan(1e-4 * (value + Math.abs(byU)))
        expect(Math.abs(slopeBeta - byBeta)).toBeLessThan(1e-4 * (value + Math.abs(byBeta)))
      }),
    )
  })

  it('is W(u) without aquitard, derivatives included, and tends to it as β falls', () => {
    fc.assert(
      fc.property(logarithmic(1e-6, 20), (u) => {
        const out = new Float64Array(3)
        aquitardWellFunction(u, 0, out)
        expect([...out]).toEqual([exponentialIntegral(u), -Math.exp(-u), 0])
        expect(relative(aquitardH(u, 1e-13), exponentialIntegral(u))).toBeLessThan(1e-9)
      }),
    )
  })

  it('is less the more the aquitard gives, and the later the more', () => {
    fc.assert(
      fc.property(logarithmic(1e-6, 5), logarithmic(1e-3, 5), (u, beta) => {
        expect(aquitardH(u, 1.01 * beta)).toBeLessThan(aquitardH(u, beta))
        expect(aquitardH(1.01 * u, beta)).toBeLessThan(aquitardH(u, beta))
      }),
    )
  })

  it('refuses what is not positive', () => {
    for (const bad of [0, -1, NaN]) expect(() => aquitardH(bad, 0.1)).toThrow(RangeError)
    for (const bad of [-1, NaN]) expect(() => aquitardH(0.1, bad)).toThrow(RangeError)
    expect(() => erfcScaled(-0.1)).toThrow(RangeError)
  })
})

describe('scaled complementary error function', () => {
  it('equals mpmath to 1e-14', () => {
    expect(reference.erfcScaled.length).toBeGreaterThan(10)
    for (const { x, value } of reference.erfcScaled) expect(relative(erfcScaled(x), value)).toBeLessThan(1e-14)
  })
})

describe('Gauss–Legendre quadrature', () => {
  it('is exact for polynomials up to degree 2n − 1', () => {
    for (const order of [1, 2, 5, 16]) {
      const { nodes, weights } = gaussLegendre(order)
      for (let degree = 0; degree < 2 * order; degree++) {
        const sum = nodes.reduce((total, node, i) => total + (weights[i] as number) * node ** degree, 0)
        expect(sum * (degree + 1)).toBeCloseTo(1, 12)
      }
    }
  })
})
