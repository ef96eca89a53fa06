import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { describeLine, linearRegression } from '#shared/numerics/linear-regression.ts'

/** Anscombe's first set: line 3.00 + 0.500x, standard errors 1.125 and 0.118 (Anscombe 1973; from memory). */
const anscombe = {
  x: [10, 8, 13, 9, 11, 14, 6, 4, 12, 7, 5],
  y: [8.04, 6.95, 7.58, 8.81, 8.33, 9.96, 7.24, 4.26, 10.84, 4.82, 5.68],
}

describe('linear regression', () => {
  it("gives the line and errors of Anscombe's first set", () => {
    const fit = linearRegression(anscombe.x, anscombe.y)
    expect(fit.intercept).toBeCloseTo(3.0001, 4)
    expect(fit.slope).toBeCloseTo(0.5001, 4)
    expect(Math.sqrt(fit.covariance[0][0])).toBeCloseTo(1.1247, 4)
    expect(Math.sqrt(fit.covariance[1][1])).toBeCloseTo(0.1179, 4)
    expect(fit.sumOfSquares).toBeCloseTo(13.763, 3)
  })

  it('leaves residuals that sum to zero and have no slope', () => {
    const pairs = fc.array(fc.tuple(fc.integer({ min: -99, max: 99 }), fc.double({ min: -9, max: 9, noNaN: true })), {
      minLength: 3,
    })
    fc.assert(
      fc.property(pairs, (points) => {
        const x = points.map(([value]) => value)
        fc.pre(new Set(x).size > 1)
        const { residuals } = linearRegression(
          x,
          points.map(([, value]) => value),
        )
        expect(residuals.reduce((sum, value) => sum + value, 0)).toBeCloseTo(0, 8)
        expect(residuals.reduce((sum, value, i) => sum + value * (x[i] as number), 0)).toBeCloseTo(0, 6)
      }),
    )
  })

  it('describes a line drawn by hand by its own residuals', () => {
    const drawn = describeLine([0, 1, 2], [1, 2, 4], 1, 1)
    expect(drawn.residuals).toEqual([0, 0, 1])
    expect(drawn.sumOfSquares).toBe(1)
  })

  it('refuses one point, unequal lengths and equal abscissas', () => {
    expect(() => linearRegression([1], [1])).toThrow(RangeError)
    expect(() => linearRegression([1, 2], [1])).toThrow(RangeError)
    expect(() => linearRegression([3, 3, 3], [1, 2, 3])).toThrow('equal')
  })
})
