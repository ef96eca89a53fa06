import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { incompleteBeta, logGamma } from '#shared/numerics/gamma-beta.ts'
import { normalQuantile } from '#shared/numerics/normal.ts'
import { mixtureQuantile } from '#shared/numerics/student-mixture.ts'
import { studentCdf, studentQuantile } from '#shared/numerics/student.ts'
import reference from '../../reference/numerics-functions.json'

const near = (value: number, expected: number, tolerance: number) =>
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(tolerance * Math.max(1, Math.abs(expected)))

const probability = fc.double({ min: 1e-6, max: 1 - 1e-6, noNaN: true })
const freedom = fc.double({ min: 0.8, max: 500, noNaN: true })

describe('quantiles and the functions under them', () => {
  it('equal mpmath', () => {
    for (const { x, value } of reference.logGamma) near(logGamma(x), value, 1e-13)
    for (const { x, a, b, value } of reference.incompleteBeta) near(incompleteBeta(x, a, b) / value, 1, 1e-11)
    for (const { p, value } of reference.normalQuantile) near(normalQuantile(p), value, 1e-13)
    for (const { p, freedom: f, value } of reference.studentQuantile) near(studentQuantile(p, f) / value, 1, 1e-10)
  })

  it("give the normal quantile as the limit of Student's", () => {
    fc.assert(
      fc.property(probability, (p) => {
        near(studentQuantile(p, 1e8), normalQuantile(p), 1e-6)
      }),
    )
  })

  it('give the Cauchy distribution, known in closed form, at one degree of freedom', () => {
    fc.assert(
      fc.property(fc.double({ min: -50, max: 50, noNaN: true }), (t) => {
        near(studentCdf(t, 1), 0.5 + Math.atan(t) / Math.PI, 1e-13)
      }),
    )
  })

  it('give, mixed, the share asked for below the quantile, and between the narrowest and the widest part', () => {
    const part = fc.record({
      share: fc.double({ min: 0.01, max: 1, noNaN: true }),
      sd: fc.double({ min: 1e-3, max: 10, noNaN: true }),
    })
    fc.assert(
      fc.property(fc.array(part, { minLength: 1, maxLength: 6 }), freedom, (parts, f) => {
        const found = mixtureQuantile(0.975, parts, f)
        const total = parts.reduce((sum, { share }) => sum + share, 0)
        near(parts.reduce((sum, { share, sd }) => sum + share * studentCdf(found / sd, f), 0) / total, 0.975, 1e-11)
        const sds = parts.map(({ sd }) => sd)
        expect(found).toBeGreaterThanOrEqual(Math.min(...sds) * studentQuantile(0.975, f) * (1 - 1e-9))
        expect(found).toBeLessThanOrEqual(Math.max(...sds) * studentQuantile(0.975, f) * (1 + 1e-9))
      }),
    )
  })

  it('keep the limits of the beta function, and its straight line where both parameters are 1', () => {
    expect([incompleteBeta(0, 2, 3), incompleteBeta(1, 2, 3)]).toEqual([0, 1])
    near(incompleteBeta(0.3, 1, 1), 0.3, 1e-14)
  })

  it('are undone by the distribution function and are symmetric', () => {
    fc.assert(
      fc.property(probability, freedom, (p, f) => {
        near(studentCdf(studentQuantile(p, f), f), p, 1e-11)
        near(studentQuantile(1 - p, f), -studentQuantile(p, f), 1e-9)
      }),
    )
  })

  it('refuse what is no probability, and freedom that is not positive', () => {
    for (const p of [0, 1, -0.1, NaN]) {
      expect(() => normalQuantile(p)).toThrow(RangeError)
      expect(() => studentQuantile(p, 3)).toThrow(RangeError)
    }
    expect(() => studentCdf(1, 0)).toThrow(RangeError)
    expect(() => logGamma(0)).toThrow(RangeError)
    expect(() => incompleteBeta(1.1, 1, 1)).toThrow(RangeError)
  })
})
