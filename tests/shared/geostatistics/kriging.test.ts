import { describe, expect, it } from 'vitest'
import { GeostatisticsError } from '#shared/geostatistics/errors.ts'
import { ordinaryKriging, type KrigingData } from '#shared/geostatistics/kriging.ts'
import { createNeighbourhood } from '#shared/geostatistics/neighbourhood.ts'
import type { Point } from '#shared/geostatistics/planar.ts'
import type { Variogram } from '#shared/geostatistics/variogram.ts'
import { dataOf, gstat, largestDifference, placesOf } from './gstat-data.ts'

const { meuse, jura } = gstat
const meuseData = dataOf(meuse.data)

/** The models of gstat-kriging.R with practical ranges: 3 times gstat's range for the exponential. */
const MODELS = {
  spherical: { model: 'spherical', nugget: 0.05, sill: 0.59, range: 897 },
  exponential: { model: 'exponential', nugget: 0.03, sill: 0.7, range: 1200 },
  sphericalNoNugget: { model: 'spherical', nugget: 0, sill: 0.64, range: 800 },
} as const satisfies Record<string, Variogram>

const only = (data: KrigingData, indices: readonly number[]): KrigingData => ({
  x: indices.map((i) => data.x[i]!),
  y: indices.map((i) => data.y[i]!),
  z: indices.map((i) => data.z[i]!),
  errorVariance: data.errorVariance && indices.map((i) => data.errorVariance![i]!),
})

const nearest = (data: KrigingData, place: Point, k: number): KrigingData => {
  const points = Array.from({ length: data.z.length }, (_, i) => ({ x: data.x[i]!, y: data.y[i]! }))
  return only(data, createNeighbourhood(points).nearest(place, k))
}

function tied(data: KrigingData, place: Point, k: number): boolean {
  const { x, y } = nearest(data, place, k + 1)
  const far = [k - 1, k].map((i) => Math.hypot(x[i]! - place.x, y[i]! - place.y))
  return far[1]! - far[0]! < 1e-9
}

describe('ordinary kriging beside R gstat (fixtures: gstat-kriging.R)', () => {
  it.each(Object.entries(MODELS))('equals gstat from all meuse samples, %s', (name, variogram) => {
    const ours = placesOf(meuse.places).map((p) => ordinaryKriging(p, meuseData, variogram, { exact: true }))
    const theirs = meuse[name as keyof typeof MODELS].global
    expect(largestDifference(ours.map((r) => r.mean), theirs.mean)).toBeLessThan(1e-9) // prettier-ignore
    expect(largestDifference(ours.map((r) => r.variance), theirs.variance)).toBeLessThan(1e-9) // prettier-ignore
  })

  it.each(Object.entries(MODELS))('equals gstat from the nearest 12 meuse samples, %s', (name, variogram) => {
    const ours = placesOf(meuse.places).map((p) =>
      ordinaryKriging(p, nearest(meuseData, p, 12), variogram, { exact: true }),
    )
    const theirs = meuse[name as keyof typeof MODELS].nearest12
    expect(largestDifference(ours.map((r) => r.mean), theirs.mean)).toBeLessThan(1e-9) // prettier-ignore
    expect(largestDifference(ours.map((r) => r.variance), theirs.variance)).toBeLessThan(1e-9) // prettier-ignore
  })

  it.each(Object.entries(MODELS))('equals gstat in leave-one-out cross-validation, %s', (name, variogram) => {
    const all = Array.from(meuseData.z, (_, i) => i)
    const ours = placesOf(meuse.data).map(
      (place, i) =>
      ordinaryKriging(place, only(meuseData, all.filter((j) => j !== i)), variogram), // prettier-ignore
    )
    const theirs = meuse[name as keyof typeof MODELS].leaveOneOut
    const residuals = ours.map((r, i) => meuse.data.z[i]! - r.mean)
    expect(largestDifference(residuals, theirs.residual)).toBeLessThan(1e-9)
    expect(largestDifference(ours.map((r) => r.variance), theirs.variance)).toBeLessThan(1e-9) // prettier-ignore
  })

  it('equals gstat when one known error variance is filtered out', () => {
    const data = { ...meuseData, errorVariance: Array.from(meuseData.z, () => 0.04) }
    const variogram: Variogram = { model: 'spherical', nugget: 0.02, sill: 0.59, range: 897 }
    const ours = placesOf(meuse.places).slice(0, -1).map((p) => ordinaryKriging(p, data, variogram)) // prettier-ignore
    expect(largestDifference(ours.map((r) => r.mean), meuse.filtered.mean)).toBeLessThan(1e-9) // prettier-ignore
    // gstat's variance is that of the error-free value, the nugget included, as here.
    expect(largestDifference(ours.map((r) => r.variance), meuse.filtered.variance)).toBeLessThan(1e-9) // prettier-ignore
  })

  it('equals gstat at the jura validation places, from all and from the nearest 24 samples', () => {
    const data = dataOf(jura.data)
    const variogram: Variogram = { model: 'exponential', nugget: 0.004, sill: 0.03, range: 1.2 }
    const all = placesOf(jura.places).map((p) => ordinaryKriging(p, data, variogram))
    expect(largestDifference(all.map((r) => r.mean), jura.global.mean)).toBeLessThan(1e-9) // prettier-ignore
    expect(largestDifference(all.map((r) => r.variance), jura.global.variance)).toBeLessThan(1e-9) // prettier-ignore
    // The samples lie on a grid: where the 24th and 25th are equally far, which one is taken is a matter of taste.
    const clear = placesOf(jura.places).flatMap((p, i) => (tied(data, p, 24) ? [] : [i]))
    const near = clear.map((i) => placesOf(jura.places)[i]!).map((p) => ordinaryKriging(p, nearest(data, p, 24), variogram)) // prettier-ignore
    expect(clear.length).toBeGreaterThan(90)
    expect(largestDifference(near.map((r) => r.mean), clear.map((i) => jura.nearest24.mean[i]!))).toBeLessThan(1e-9) // prettier-ignore
    expect(largestDifference(near.map((r) => r.variance), clear.map((i) => jura.nearest24.variance[i]!))).toBeLessThan(1e-9) // prettier-ignore
  })
})

const makeData = (overrides: Partial<KrigingData> = {}): KrigingData => ({
  x: [0, 1000, 0, 1000],
  y: [0, 0, 1000, 1000],
  z: [-2, -3, -2.5, -2.2],
  errorVariance: null,
  ...overrides,
})
const variogram: Variogram = { model: 'spherical', nugget: 0.01, sill: 0.2, range: 2500 }

describe('ordinary kriging, limits and invariants', () => {
  it('gives weights that sum to one', () => {
    const { weights } = ordinaryKriging(
      { x: 300, y: 450 },
      makeData({ errorVariance: [0.01, 0.04, 0.16, 0.04] }),
      variogram,
    )
    expect(weights.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 12)
  })

  it('returns the value itself at a value without error when exact', () => {
    const at = ordinaryKriging({ x: 1000, y: 0 }, makeData(), variogram, { exact: true })
    expect(at.mean).toBeCloseTo(-3, 12)
    expect(at.variance).toBeCloseTo(0, 12)
  })

  it('does not honour a value exactly by default, because its nugget is its own', () => {
    const at = ordinaryKriging({ x: 1000, y: 0 }, makeData(), variogram)
    expect(at.mean).toBeGreaterThan(-2.99)
    expect(at.variance).toBeGreaterThan(variogram.nugget)
  })

  it('trusts a value less the larger its known error', () => {
    const weightOf = (errorVariance: number): number =>
      ordinaryKriging({ x: 100, y: 100 }, makeData({ errorVariance: [errorVariance, 0.01, 0.01, 0.01] }), variogram)
        .weights[0]!
    expect(weightOf(0.01)).toBeGreaterThan(weightOf(0.04))
    expect(weightOf(0.04)).toBeGreaterThan(weightOf(0.16))
  })

  it('goes to the plain mean and its variance where nothing is correlated', () => {
    const far = ordinaryKriging({ x: 1e7, y: 1e7 }, makeData(), { ...variogram, range: 100 })
    expect(far.mean).toBeCloseTo(-2.425, 12)
    expect(far.variance).toBeCloseTo(0.21 * (1 + 1 / 4), 12)
  })

  it('does not change when places and values are moved together', () => {
    const here = ordinaryKriging({ x: 300, y: 200 }, makeData(), variogram)
    const moved = makeData({ x: [5e5, 501_000, 5e5, 501_000], y: [6e6, 6e6, 6_001_000, 6_001_000] })
    const there = ordinaryKriging({ x: 500_300, y: 6_000_200 }, moved, variogram)
    expect(there.mean).toBeCloseTo(here.mean, 10)
    expect(there.variance).toBeCloseTo(here.variance, 10)
  })

  it('keeps a symmetric place symmetric', () => {
    const { weights } = ordinaryKriging({ x: 500, y: 500 }, makeData(), variogram)
    for (const weight of weights) expect(weight).toBeCloseTo(0.25, 12)
  })
})

describe('ordinary kriging, bad input', () => {
  it('refuses to work without values', () => {
    expect(() => ordinaryKriging({ x: 0, y: 0 }, makeData({ x: [], y: [], z: [] }), variogram)).toThrow(
      GeostatisticsError,
    )
  })

  it('refuses a value that is not a number', () => {
    expect(() => ordinaryKriging({ x: 0, y: 0 }, makeData({ z: [1, NaN, 2, 3] }), variogram)).toThrow('z[1]')
  })

  it('names coincident values without error or nugget as singular', () => {
    const twins = makeData({ x: [0, 0, 5, 6], y: [0, 0, 1, 2] })
    const smooth = { ...variogram, nugget: 0 }
    expect(() => ordinaryKriging({ x: 9, y: 9 }, twins, smooth)).toThrow(expect.objectContaining({ code: 'singular' }))
  })
})
