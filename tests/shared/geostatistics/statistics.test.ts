import { describe, expect, it } from 'vitest'
import { cellWeights, decluster } from '#shared/geostatistics/declustering.ts'
import { inverseDistance } from '#shared/geostatistics/inverse-distance.ts'
import type { KrigingData } from '#shared/geostatistics/kriging.ts'
import { robustScores } from '#shared/geostatistics/robust.ts'
import { krigedMean, statisticsOf } from '#shared/geostatistics/statistics.ts'

const makeData = (overrides: Partial<KrigingData> = {}): KrigingData => ({
  x: [0, 10_000, 20_000, 30_000, 40_000],
  y: [0, 0, 0, 0, 0],
  z: [-3, -2.8, -2.6, -2.4, -2.2],
  errorVariance: null,
  ...overrides,
})

describe('statistics of log values', () => {
  it('give mean, median, deviation and P10–P90', () => {
    // By hand; quantiles as numpy.quantile (type 7).
    const s = statisticsOf(makeData())
    expect(s.mean).toBeCloseTo(-2.6, 12)
    expect(s.median).toBeCloseTo(-2.6, 12)
    expect(s.deviation).toBeCloseTo(Math.sqrt(0.1), 12)
    expect(s.p10).toBeCloseTo(-2.92, 12)
    expect(s.p90).toBeCloseTo(-2.28, 12)
    expect([s.least, s.most]).toEqual([-3, -2.2])
  })

  it("give the mean's interval by Student's t if wells were independent", () => {
    // t(0.975; 4) = 2.7764451 (scipy); standard error √(0.1/5)
    const { meanIfIndependent } = statisticsOf(makeData())
    expect(meanIfIndependent!.high).toBeCloseTo(-2.6 + 2.7764451051977987 * Math.sqrt(0.02), 8)
  })

  it('widen the interval of the mean where wells are correlated', () => {
    const far = krigedMean(makeData(), { model: 'spherical', nugget: 0, sill: 0.1, range: 1000 })
    const near = krigedMean(makeData(), { model: 'spherical', nugget: 0, sill: 0.1, range: 60_000 })
    expect(far.variance).toBeCloseTo(0.02, 12)
    expect(near.variance).toBeGreaterThan(0.04)
  })

  it('name outliers by robust z above 3.5', () => {
    const data = makeData({ x: [0, 1, 2, 3, 4, 5], y: [0, 0, 0, 0, 0, 0], z: [-2.5, -2.4, -2.6, -2.45, -2.55, 1] })
    expect(statisticsOf(data).outliers).toEqual([5])
  })

  it('find no outlier when most values are equal', () => {
    expect(robustScores([1, 1, 1, 1, 9])).toEqual([0, 0, 0, 0, 0])
  })

  it('have no interval for one value and refuse none', () => {
    expect(statisticsOf(makeData({ x: [1], y: [1], z: [-2] })).meanIfIndependent).toBeNull()
    expect(() => statisticsOf(makeData({ x: [], y: [], z: [] }))).toThrow('need a value')
  })
})

/** Ten wells at a town with high values, ten spread over the region with low ones. */
const crowded = [
  ...Array.from({ length: 10 }, (_, i) => ({ x: 100 + i, y: 100, z: -2 })),
  ...Array.from({ length: 10 }, (_, i) => ({ x: 1000 + 4000 * i, y: 20_000, z: -3 })),
]

describe('declustering', () => {
  it('gives weights that sum to one and crowds less', () => {
    const weights = cellWeights(crowded, 3000)
    expect(weights.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 12)
    expect(weights[0]).toBeLessThan(weights[12]! / 5)
  })

  it('brings the mean towards the wells that stand alone', () => {
    const { mean } = decluster(crowded, crowded.map((p) => p.z)) // prettier-ignore
    expect(mean).toBeLessThan(-2.85)
  })

  it('changes little for an even spread and nothing for a single place', () => {
    const even = Array.from({ length: 9 }, (_, i) => ({ x: (i % 3) * 1000, y: Math.floor(i / 3) * 1000 }))
    expect(decluster(even, even.map((_, i) => i)).mean).toBeCloseTo(4, 0) // prettier-ignore
    expect(decluster([{ x: 1, y: 1 }], [-2])).toEqual({ weights: [1], cellSize: 0, mean: -2 })
  })

  it('refuses cells without size and an empty list', () => {
    expect(() => cellWeights(crowded, 0)).toThrow('above zero')
    expect(() => decluster([], [])).toThrow('needs a value')
  })
})

describe('inverse distance', () => {
  it('weighs by the square of the distance', () => {
    expect(inverseDistance([100, 200], [1, 6])).toBeCloseTo((4 * 1 + 6) / 5, 14)
  })

  it('is the value itself where there is one', () => {
    expect(inverseDistance([0, 10, 0], [1, 50, 3])).toBe(2)
  })

  it('refuses to work without values', () => {
    expect(() => inverseDistance([], [])).toThrow('needs a value')
  })
})
