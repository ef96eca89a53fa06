import { describe, expect, it } from 'vitest'
import { experimentalVariogram } from '#shared/geostatistics/experimental.ts'
import { fitLeastSquares } from '#shared/geostatistics/least-squares-fit.ts'
import { semivariance, type Variogram } from '#shared/geostatistics/variogram.ts'
import { dataOf, gstat, largestDifference } from './gstat-data.ts'

const { meuse } = gstat
const data = dataOf(meuse.data)
const bins = { cutoff: 1500, width: 100 }

describe('experimental variogram beside R gstat (fixtures: gstat-kriging.R)', () => {
  it.each([
    ['matheron', meuse.matheron],
    ['cressie-hawkins', meuse.robust],
  ] as const)('equals gstat lag by lag, %s', (estimator, theirs) => {
    const lags = experimentalVariogram(data, { ...bins, estimator })
    expect(lags.map((lag) => lag.pairs)).toEqual(theirs.pairs)
    expect(largestDifference(lags.map((l) => l.distance), theirs.distance)).toBeLessThan(1e-12) // prettier-ignore
    expect(largestDifference(lags.map((l) => l.gamma), theirs.gamma)).toBeLessThan(1e-12) // prettier-ignore
  })
})

describe('weighted least squares', () => {
  const lags = experimentalVariogram(data, bins)

  it.each(['spherical', 'exponential'] as const)(
    'finds at least as good a fit as gstat with the same weights, %s',
    (model) => {
      const ours = fitLeastSquares(lags, [model])[0]!
      const theirs = meuse.fits[model]
      expect(ours.objective).toBeLessThanOrEqual(theirs.objective * (1 + 1e-6))
      // gstat stops at a relative change of 1e-6 in its own iteration; the parameters agree to about 1e-3.
      const factor = model === 'exponential' ? 3 : 1
      expect(Math.abs(ours.variogram.range / (theirs.range * factor) - 1)).toBeLessThan(5e-3)
      expect(Math.abs(ours.variogram.sill / theirs.sill - 1)).toBeLessThan(5e-3)
    },
  )

  it('recovers a variogram from its own curve', () => {
    const truth: Variogram = { model: 'exponential', nugget: 0.05, sill: 0.4, range: 900 }
    const curve = lags.map((lag) => ({ ...lag, gamma: semivariance(truth, lag.distance) }))
    const [best] = fitLeastSquares(curve)
    expect(best!.variogram.model).toBe('exponential')
    expect(best!.variogram.range).toBeCloseTo(900, 3)
    expect(best!.variogram.nugget).toBeCloseTo(0.05, 7)
    expect(best!.explained).toBeCloseTo(1, 9)
    expect(best!.nuggetBelowZero).toBe(false)
  })

  it('holds the nugget at zero and says so when the assumed errors exceed the scatter', () => {
    const bold = { ...data, errorVariance: Array.from(data.z, () => 0.2) }
    const [best] = fitLeastSquares(experimentalVariogram(bold, bins), ['spherical'])
    expect(best!.variogram.nugget).toBe(0)
    expect(best!.nuggetBelowZero).toBe(true)
  })

  it('needs three lags', () => {
    expect(() => fitLeastSquares(lags.slice(0, 2))).toThrow('three lags')
  })
})

describe('known errors in the experimental variogram', () => {
  it("takes the pairs' mean of (e_i² + e_j²)/2 off each lag", () => {
    const two = { x: [0, 10], y: [0, 0], z: [1, 2], errorVariance: [0.01, 0.09] }
    const [lag] = experimentalVariogram(two, { cutoff: 20, width: 20 })
    expect(lag!.error).toBeCloseTo(0.05, 14)
    expect(lag!.gamma).toBeCloseTo(0.5 - 0.05, 14)
  })

  it('leaves out pairs that a barrier parts', () => {
    const three = { x: [0, 10, 20], y: [0, 0, 0], z: [1, 2, 9], errorVariance: null }
    const lags = experimentalVariogram(three, { cutoff: 30, width: 30, pair: (i, j) => i !== 2 && j !== 2 })
    expect(lags).toEqual([expect.objectContaining({ pairs: 1, gamma: 0.5 })])
  })

  it('refuses a single value and lags without width', () => {
    expect(() => experimentalVariogram({ x: [0], y: [0], z: [1], errorVariance: null })).toThrow('two values')
    expect(() => experimentalVariogram(data, { cutoff: 100, width: 0 })).toThrow('above zero')
  })
})
