import { describe, expect, it } from 'vitest'
import { crossValidationOf, rescalingFactor, type Residual } from '#shared/geostatistics/coverage.ts'
import { normalProbability } from '#shared/geostatistics/distributions.ts'

/** A forecast with mean 0 and unit spread that turned out to be u. */
const makeResidual = (u: number): Residual => ({
  id: `v${u}`,
  x: 0,
  y: 0,
  observed: u,
  predicted: 0,
  deviation: 1,
  error: 0,
  standardised: u,
  probability: normalProbability(u),
  width80: 2.563,
  width95: 3.92,
})

/** n outcomes spread evenly through a normal distribution of the given spread. */
const spreadOut = (n: number, spread: number): Residual[] =>
  Array.from({ length: n }, (_, i) => {
    const p = (i + 0.5) / n
    let u = 0
    for (let k = 0; k < 60; k++) u -= (normalProbability(u) - p) * 1.2
    return makeResidual(u * spread)
  })

describe('cross-validation statistics', () => {
  it('count what fell inside', () => {
    const { coverage95, coverage80, rmse, meanError } = crossValidationOf([-3, -1.5, 0, 1, 1.5].map(makeResidual))
    expect([coverage95.inside, coverage80.inside]).toEqual([4, 2 /* 0 and 1 */])
    expect(coverage95.share).toBeCloseTo(0.8, 14)
    expect(rmse).toBeCloseTo(Math.sqrt((9 + 2.25 + 0 + 1 + 2.25) / 5), 12)
    expect(meanError).toBeCloseTo(-0.4, 12)
  })
})

describe('rescaling of the spread', () => {
  it('leaves honest intervals alone', () => {
    expect(rescalingFactor(spreadOut(100, 1))).toBe(1)
  })

  it('widens intervals that are too narrow by what they lack', () => {
    expect(rescalingFactor(spreadOut(200, 2))).toBeCloseTo(2, 0)
  })

  it('leaves the errors of the values out of the factor', () => {
    // Twice the spread that was said, of which a variance of 0.25 is the values' own: (4 − 0.25) / 0.75.
    const own = spreadOut(200, 2).map((r) => ({ ...r, error: 0.5, deviation: Math.sqrt(0.75) }))
    expect(rescalingFactor(own)).toBeCloseTo(Math.sqrt(3.75 / 0.75), 0)
  })

  it('narrows by a tenth at most', () => {
    expect(rescalingFactor(spreadOut(400, 0.3))).toBe(0.9)
  })

  it('does nothing below 30 values, however bad they are', () => {
    expect(rescalingFactor(spreadOut(29, 5))).toBe(1)
  })
})
