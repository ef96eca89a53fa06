import { describe, expect, it } from 'vitest'
import { invertSymmetric, solveSymmetric } from '#shared/numerics/small-matrix.ts'

describe('small matrices', () => {
  it('inverts, with the determinant, whatever the units of the parameters', () => {
    const { inverse, singular, logDeterminant } = invertSymmetric([
      [4e12, 2],
      [2, 3e-12],
    ])
    expect(singular).toBe(false)
    expect(logDeterminant).toBeCloseTo(Math.log(8), 10)
    const expected = [3e-12 / 8, -2 / 8, -2 / 8, 4e12 / 8]
    inverse.flat().forEach((value, i) => expect(value / (expected[i] as number)).toBeCloseTo(1, 10))
  })

  it('names a singular matrix and inverts what can be inverted', () => {
    const { inverse, singular } = invertSymmetric([
      [1, 1],
      [1, 1],
    ])
    expect(singular).toBe(true)
    inverse.flat().forEach((value) => expect(value).toBeCloseTo(0.25, 12))
    expect(
      invertSymmetric([
        [1, 0],
        [0, 0],
      ]),
    ).toMatchObject({
      singular: true,
      inverse: [
        [1, 0],
        [0, 0],
      ],
    })
  })

  it('solves a positive definite system and refuses another', () => {
    expect(
      solveSymmetric(
        [
          [4, 2],
          [2, 3],
        ],
        [8, 8],
      ),
    ).toEqual([expect.closeTo(1, 12), expect.closeTo(2, 12)])
    expect(
      solveSymmetric(
        [
          [1, 2],
          [2, 1],
        ],
        [1, 1],
      ),
    ).toBeNull()
  })
})
