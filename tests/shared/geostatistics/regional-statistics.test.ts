import { describe, expect, it } from 'vitest'
import { differenceOfMeans } from '#shared/geostatistics/compare-means.ts'
import { cellWeights, decluster } from '#shared/geostatistics/declustering.ts'
import { normalScores, plottingPosition } from '#shared/geostatistics/probability-plot.ts'
import { robustScores } from '#shared/geostatistics/robust.ts'
import { krigedMean, statisticsOf } from '#shared/geostatistics/statistics.ts'
import { trendOf } from '#shared/geostatistics/trend.ts'
import means from '../../reference/gstat-means.json'
import reference from '../../reference/regional-statistics.json'
import { dataOf, gstat, largestDifference, placesOf } from './gstat-data.ts'

/** numpy and scipy on the data of R's sp and gstat; tool, version and script are in the files' provenance. */
const cases = ['meuse', 'jura'] as const
const halves = (name: (typeof cases)[number]) => {
  const { x, z } = gstat[name].data
  const sorted = [...x].sort((a, b) => a - b)
  const n = sorted.length
  const middle = (sorted[Math.floor((n - 1) / 2)]! + sorted[Math.ceil((n - 1) / 2)]!) / 2
  return [z.filter((_, i) => x[i]! > middle), z.filter((_, i) => x[i]! <= middle)] as const
}

describe.each(cases)('statistics of the %s data', (name) => {
  const { x, z } = gstat[name].data
  const places = placesOf(gstat[name].data)
  const { declustered, robust, normalScores: scores, positions, line } = reference[name]

  it('are declustered as numpy does it, with the same cell size chosen from the same scan', () => {
    const found = decluster(places, z)
    expect(found.cellSize).toBeCloseTo(declustered.cellSize, 8)
    expect(found.mean).toBeCloseTo(declustered.mean, 10)
    expect(largestDifference(cellWeights(places, declustered.cellSize), declustered.weights)).toBeLessThan(1e-9)
    expect(statisticsOf(dataOf(gstat[name].data)).declustered.deviation).toBeCloseTo(declustered.deviation, 10)
  })

  it('name the outliers that scipy’s median absolute deviation names', () => {
    const found = robustScores([...z, ...robust.planted])
    expect(largestDifference(found, robust.scores)).toBeLessThan(1e-9)
    expect(found.flatMap((score, i) => (Math.abs(score) > 3.5 ? [i] : []))).toEqual(robust.outliers)
  })

  it('stand on a normal probability plot at Hazen’s positions', () => {
    expect(largestDifference(normalScores(z), scores)).toBeLessThan(1e-9)
    expect(largestDifference(z.map((_, i) => plottingPosition(i + 1, z.length)), positions)).toBeLessThan(1e-12) // prettier-ignore
  })

  it('have the trend and its interval of scipy’s linregress', () => {
    const found = trendOf(x, z)!
    const { slope, slopeLow, slopeHigh, intercept, explained } = found
    expect(largestDifference([slope, slopeLow, slopeHigh].map((v) => v * 1e4), [line.slope, line.low, line.high].map((v) => v * 1e4))).toBeLessThan(1e-8) // prettier-ignore
    expect(intercept).toBeCloseTo(line.intercept, 6)
    expect(explained).toBeCloseTo(line.explained, 9)
  })

  it('differ between east and west as R’s Welch test says', () => {
    const { difference, low, high } = differenceOfMeans(...halves(name))
    const expected = means.welch[name]
    expect(largestDifference([difference, low, high], [expected.difference, expected.low, expected.high])).toBeLessThan(
      1e-9,
    )
  })
})

describe('the mean by generalised least squares', () => {
  it('and its variance are those of gstat', () => {
    const meuse = dataOf(gstat.meuse.data)
    const found = [
      krigedMean(meuse, { model: 'spherical', nugget: 0.05, sill: 0.59, range: 897 }),
      krigedMean(meuse, { model: 'exponential', nugget: 0.03, sill: 0.7, range: 1200 }),
      krigedMean(dataOf(gstat.jura.data), { model: 'exponential', nugget: 0.004, sill: 0.03, range: 1.2 }),
    ]
    const expected = [means.spherical, means.exponential, means.jura]
    expect(largestDifference(found.map(({ mean }) => mean), expected.map(({ mean }) => mean))).toBeLessThan(1e-9) // prettier-ignore
    expect(largestDifference(found.map(({ variance }) => variance), expected.map(({ variance }) => variance))).toBeLessThan(1e-9) // prettier-ignore
  })
})

describe('comparisons without an answer', () => {
  it('are refused: a group of one, groups without scatter', () => {
    expect(() => differenceOfMeans([1], [1, 2])).toThrow('two values')
    expect(() => differenceOfMeans([1, 1], [2, 2])).toThrow('scatter')
  })

  it('give no trend for two points or for one abscissa', () => {
    expect(trendOf([1, 2], [1, 2])).toBeNull()
    expect(trendOf([1, 1, 1], [1, 2, 3])).toBeNull()
  })
})
