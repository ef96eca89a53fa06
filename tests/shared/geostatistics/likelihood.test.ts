import { determinant, inverse, Matrix } from 'ml-matrix'
import { describe, expect, it } from 'vitest'
import type { KrigingData } from '#shared/geostatistics/kriging.ts'
import { exactLikelihood, vecchiaLikelihood } from '#shared/geostatistics/likelihood.ts'
import { variogramPosterior } from '#shared/geostatistics/posterior.ts'
import { totalSill, type Variogram } from '#shared/geostatistics/variogram.ts'
import { fieldCovariance, randomField, seededDraws } from '../../support/random-field.ts'

const truth: Variogram = { model: 'exponential', nugget: 0.02, sill: 0.25, range: 9000 }

function makeSample(seed: number, n: number): KrigingData {
  const draws = seededDraws(seed)
  const places = Array.from({ length: n }, () => ({ x: 40_000 * draws.uniform(), y: 30_000 * draws.uniform() }))
  const z = randomField(places, truth, -2.5, draws).map((value) => value + 0.2 * draws.normal())
  return { x: places.map((p) => p.x), y: places.map((p) => p.y), z, errorVariance: z.map(() => 0.04) }
}

/** The restricted likelihood by its other definition: the likelihood of contrasts that do not know the mean. */
function contrastLikelihood(data: KrigingData, v: Variogram): number {
  const n = data.z.length
  const places = Array.from({ length: n }, (_, i) => ({ x: data.x[i]!, y: data.y[i]! }))
  const c = fieldCovariance(places, v)
  for (let i = 0; i < n; i++) c.set(i, i, c.get(i, i) + data.errorVariance![i]!)
  // Orthonormal contrasts: row k takes the mean of the first k values off the next one.
  const a = Matrix.zeros(n - 1, n)
  for (let k = 1; k < n; k++) {
    const scale = Math.sqrt(k / (k + 1))
    for (let j = 0; j < k; j++) a.set(k - 1, j, -scale / k)
    a.set(k - 1, k, scale)
  }
  const s = a.mmul(c).mmul(a.transpose())
  const u = a.mmul(Matrix.columnVector(Array.from(data.z)))
  const log = Math.log(determinant(s))
  return -0.5 * (log + u.transpose().mmul(inverse(s)).mmul(u).get(0, 0))
}

describe('restricted likelihood', () => {
  const data = makeSample(5, 40)
  const other: Variogram = { model: 'spherical', nugget: 0.1, sill: 0.1, range: 4000 }

  it('ranks variograms as the likelihood of contrasts does', () => {
    // Two routes: the constants differ, the difference between two variograms must not.
    const exact = exactLikelihood(data)
    expect(exact(truth) - exact(other)).toBeCloseTo(
      contrastLikelihood(data, truth) - contrastLikelihood(data, other),
      8,
    )
  })

  it('is met exactly by the conditional product when every earlier value is a neighbour', () => {
    const product = vecchiaLikelihood(data, { neighbours: 40 })
    expect(product(truth)).toBeCloseTo(exactLikelihood(data)(truth), 9)
    expect(product(other)).toBeCloseTo(exactLikelihood(data)(other), 9)
  })

  it('is approximated closely with 20 neighbours', () => {
    const sample = makeSample(6, 150)
    const difference = vecchiaLikelihood(sample, { neighbours: 20 })(truth) - exactLikelihood(sample)(truth)
    expect(Math.abs(difference)).toBeLessThan(0.5)
  })

  it('does not care about the mean', () => {
    const raised = { ...data, z: Array.from(data.z, (z) => z + 7) }
    expect(exactLikelihood(raised)(truth)).toBeCloseTo(exactLikelihood(data)(truth), 7)
  })

  it('is minus infinity where values coincide without error or nugget', () => {
    const twins = { x: [0, 0, 100], y: [0, 0, 0], z: [1, 2, 3], errorVariance: null }
    const smooth = { ...truth, nugget: 0 }
    expect(exactLikelihood(twins)(smooth)).toBe(-Infinity)
    expect(vecchiaLikelihood(twins, { neighbours: 2 })(smooth)).toBe(-Infinity)
  })
})

describe('variograms that the data allow', () => {
  const data = makeSample(7, 120)
  const posterior = variogramPosterior(data)

  it('share all belief among them', () => {
    expect(posterior.nodes.reduce((sum, node) => sum + node.weight, 0)).toBeCloseTo(1, 12)
    expect(posterior.nodes.length).toBeLessThanOrEqual(12)
  })

  it('have a mode that is likelier than the truth and than each of them', () => {
    const likelihood = exactLikelihood(data)
    expect(posterior.logLikelihood).toBeGreaterThanOrEqual(likelihood(truth) - 0.05)
    for (const { variogram } of posterior.nodes)
      expect(likelihood(variogram)).toBeLessThanOrEqual(posterior.logLikelihood)
  })

  it('span the true sill', () => {
    const sills = posterior.nodes.map(({ variogram }) => totalSill(variogram))
    expect(Math.min(...sills)).toBeLessThan(totalSill(truth))
    expect(Math.max(...sills)).toBeGreaterThan(totalSill(truth))
  })

  it('agree between the exact and the approximate likelihood', () => {
    const approximate = variogramPosterior(data, { exactUpTo: 0 })
    expect(Math.abs(Math.log(totalSill(approximate.mode) / totalSill(posterior.mode)))).toBeLessThan(0.3)
  })

  it('do not change when the same values come again', () => {
    expect(variogramPosterior(data)).toEqual(posterior)
  })

  it('are refused for too few, equal or coincident values', () => {
    expect(() => variogramPosterior(makeSample(1, 9))).toThrow('ten values')
    expect(() => variogramPosterior({ ...data, z: Array.from(data.z, () => 1) })).toThrow('equal')
    expect(() =>
      variogramPosterior({ ...data, x: Array.from(data.x, () => 1), y: Array.from(data.y, () => 1) }),
    ).toThrow('one place')
  })
})
