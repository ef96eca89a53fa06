import { describe, expect, it } from 'vitest'
import { estimateAt, estimateFrom, estimateQuantile } from '#shared/estimates/estimate-at.ts'
import { fitUnitModel } from '#shared/estimates/fit-unit-model.ts'
import { prepareValues } from '#shared/estimates/prepared-values.ts'
import { ordinaryKriging } from '#shared/geostatistics/kriging.ts'
import type { Variogram } from '#shared/geostatistics/variogram.ts'
import { makeKnownWorld } from './known-world.ts'
import { makeContext, makeModel, makeRing, makeSiteValue } from './make.ts'

const origin = { x: 0, y: 0 }
const uneven = (values: ReturnType<typeof makeRing>) =>
  values.map((v, i) => ({ ...v, log10: -2.5 + 0.1 * Math.sin(7 * i) }))

describe('an estimate by kriging', () => {
  const values = uneven([...makeRing(12, 1500), ...makeRing(20, 6000)])
  const variogram: Variogram = { model: 'exponential', nugget: 0.01, sill: 0.15, range: 8000 }
  const model = makeModel({ variogram, nodes: [{ weight: 1, variogram }] })
  const result = estimateAt({ x: 400, y: 300 }, values, model, makeContext())

  it('is the kriged value with normal quantiles when one variogram is sure', () => {
    const data = {
      x: values.map((v) => v.x),
      y: values.map((v) => v.y),
      z: values.map((v) => v.log10),
      errorVariance: values.map((v) => v.error ** 2),
    }
    const { mean, variance } = ordinaryKriging({ x: 400, y: 300 }, data, variogram)
    expect(result.truth!.median).toBeCloseTo(mean, 10)
    // 1.2815515655 and 1.9599639845 are the 90 % and 97.5 % points of the normal distribution.
    expect(result.truth!.high80).toBeCloseTo(mean + 1.2815515655 * Math.sqrt(variance), 8)
    expect(result.truth!.low95).toBeCloseTo(mean - 1.9599639845 * Math.sqrt(variance), 8)
  })

  it('adds the error of a new test to what that would show', () => {
    const truth = (result.truth!.high95 - result.truth!.median) / 1.9599639845
    const shown = (result.newTest!.high95 - result.newTest!.median) / 1.9599639845
    expect(shown).toBeCloseTo(Math.hypot(truth, 0.2), 8)
  })

  it('tells which values carried it, heaviest first, with weights that sum to one', () => {
    const weights = result.contributions.map((c) => c.weight)
    expect(weights.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 10)
    expect(weights.map(Math.abs)).toEqual([...weights.map(Math.abs)].sort((a, b) => b - a))
    const first = result.contributions[0]!
    const value = values.find((v) => v.id === first.valueId)!
    expect(first.distance_m).toBeCloseTo(Math.hypot(value.x - 400, value.y - 300), 9)
    expect(first).toMatchObject({ wellId: value.wellId, label: value.label, evidence: 'fair', log10: value.log10 })
  })

  it('gives any quantile for planning', () => {
    expect(estimateQuantile(result.truth!, 0.5)).toBeCloseTo(result.truth!.median, 10)
    expect(estimateQuantile(result.truth!, 0.9)).toBeCloseTo(result.truth!.high80, 10)
  })

  it('is plain JSON and the same each time', () => {
    expect(JSON.parse(JSON.stringify(result))).toEqual(result)
    expect(estimateAt({ x: 400, y: 300 }, values, model, makeContext())).toEqual(result)
    expect(estimateFrom({ x: 400, y: 300 }, prepareValues(values, 'T'), model, makeContext())).toEqual(result)
  })

  it('widens by the factor that cross-validation asked for', () => {
    const wide = estimateAt({ x: 400, y: 300 }, values, { ...model, spreadFactor: 1.5 }, makeContext())
    const width = (r: typeof result): number => r.truth!.high95 - r.truth!.low95
    expect(width(wide)).toBeCloseTo(1.5 * width(result), 8)
  })

  it('draws on nothing beyond a barrier', () => {
    const barriers = [[[1000, -9000], [1000, 9000]]] as const // prettier-ignore
    const behind = estimateAt(origin, values, model, makeContext({ barriers }))
    const used = behind.contributions.map((c) => values.find((v) => v.id === c.valueId)!.x)
    expect(Math.max(...used)).toBeLessThan(1000)
  })

  it('averages over variograms, so that doubt about the sill widens it', () => {
    const nodes = [0.05, 0.25].map((sill) => ({ weight: 0.5, variogram: { ...variogram, sill } }))
    const doubtful = estimateAt(origin, values, makeModel({ variogram, nodes }), makeContext())
    const [narrow, wide] = nodes.map(({ variogram: v }) =>
      estimateAt(origin, values, makeModel({ variogram: v, nodes: [{ weight: 1, variogram: v }] }), makeContext()),
    )
    expect(doubtful.truth!.high95).toBeGreaterThan(narrow!.truth!.high95)
    expect(doubtful.truth!.high95).toBeLessThan(wide!.truth!.high95)
  })
})

describe('how much data decides', () => {
  it('gives no estimate from three sites, but lists the nearest values', () => {
    const result = estimateAt(origin, makeRing(3, 1500), null, makeContext())
    expect(result).toMatchObject({ rule: 'none', truth: null, newTest: null, support: 'none', secondOpinion: null })
    expect(result.contributions.map((c) => [c.distance_m.toFixed(0), c.weight])).toEqual(Array(3).fill(['1500', 0]))
  })

  it('counts sites, not wells: ten wells in a yard give no estimate', () => {
    const yard = Array.from({ length: 10 }, (_, i) => makeSiteValue({ id: `${i}`, x: i * 20, y: 0 }))
    expect(estimateAt(origin, yard, null, makeContext())).toMatchObject({ rule: 'none', n: 10, sites: 1 })
  })

  it("gives the geometric mean with Student's t from four sites", () => {
    const values = makeRing(4, 6000, { error: 0.01 }).map((v, i) => ({ ...v, log10: [-2, -2.2, -2.4, -2.6][i]! }))
    const { truth, rule, support } = estimateAt(origin, values, null, makeContext())
    expect(rule).toBe('mean')
    expect(support).toBe('weakly')
    expect(truth!.median).toBeCloseTo(-2.3, 10)
    // s² = 0.2/3 less the errors' 0.0001, plus s²/4 for the mean; t(0.975; 3) = 3.182446305 (scipy).
    const sd = Math.sqrt(0.2 / 3 - 0.0001 + 0.2 / 12)
    expect(truth!.high95).toBeCloseTo(-2.3 + 3.182446305 * sd, 7)
  })

  it('takes the mean over sites, so that a crowded town does not outvote the rest', () => {
    const town = Array.from({ length: 9 }, (_, i) => makeSiteValue({ id: `town${i}`, x: i * 10, y: 0, log10: -1 }))
    const rest = makeRing(3, 8000, { log10: -3 })
    const { truth, contributions } = estimateAt(origin, [...town, ...rest], null, makeContext())
    expect(truth!.median).toBeCloseTo((-1 - 3 * 3) / 4, 10)
    expect(contributions.find((c) => c.valueId === 'town3')!.weight).toBeCloseTo(1 / 36, 12)
  })

  it('uses a variogram that a steward assumed, and names it', () => {
    const variogram: Variogram = { model: 'spherical', nugget: 0.02, sill: 0.2, range: 9000 }
    const values = uneven(makeRing(12, 5000))
    const model = fitUnitModel(values, { quantity: 'T', assumed: { variogram, from: 'the Brannet Sandstone' } })
    expect(model).toMatchObject({ rule: 'assumed', assumedFrom: 'the Brannet Sandstone', variogram })
    const result = estimateAt({ x: 4000, y: 0 }, values, model, makeContext())
    expect(result.rule).toBe('assumed')
    expect(result.supportBecause).toContain('variogram-assumed')
  })

  it('gives no estimate outside the unit, however many values there are', () => {
    const result = estimateAt({ x: 30_000, y: 0 }, makeRing(40, 5000), makeModel(), makeContext())
    expect(result).toMatchObject({ truth: null, rule: 'none', support: 'none', supportBecause: ['outside-unit'] })
  })

  it('gives no estimate where a barrier leaves fewer than four values', () => {
    const barriers = [[[-100, -100], [100, -100], [100, 100], [-100, 100], [-100, -100]]] as const // prettier-ignore
    expect(estimateAt(origin, makeRing(40, 5000), makeModel(), makeContext({ barriers })).truth).toBeNull()
  })

  it('answers for an empty unit', () => {
    expect(estimateAt(origin, [], null, makeContext())).toMatchObject({ n: 0, contributions: [], support: 'none' })
  })
})

describe('fitting a unit', () => {
  const world = makeKnownWorld(3, 90, 1)
  const model = fitUnitModel(world.values, { quantity: 'T' })

  it('fits from thirty sites on', () => {
    expect(model.rule).toBe('isotropic')
    expect(fitUnitModel(makeRing(29, 15_000), { quantity: 'T' }).rule).toBe('mean')
    expect(fitUnitModel(makeRing(3, 15_000), { quantity: 'T' }).rule).toBe('none')
  })

  it('does not fit what does not vary', () => {
    expect(fitUnitModel(makeRing(40, 15_000), { quantity: 'T' }).rule).toBe('mean')
  })

  it('is plain JSON', () => {
    expect(JSON.parse(JSON.stringify(model))).toEqual(model)
  })

  it('shows both estimators and the least-squares alternative', () => {
    expect(model.experimental.length).toBeGreaterThan(10)
    expect(model.robust).toHaveLength(model.experimental.length)
    expect(model.leastSquares!.variogram.range).toBeGreaterThan(0)
  })

  it('foretells every value', () => {
    expect(model.crossValidation!.n).toBe(90)
    expect(model.crossValidation!.coverage95.share).toBeGreaterThan(0.85)
    expect(Math.abs(model.crossValidation!.meanError)).toBeLessThan(0.15)
  })

  it('learns from a barrier: pairs across it do not count', () => {
    // East and west of the barrier differ by two orders of magnitude; each side is nearly even.
    const step = world.values.map((v) => ({
      ...v,
      log10: (v.x < 20_000 ? -4 : -2) + 0.1 * (v.log10 + 2.7),
      error: 0.05,
    }))
    const barrier = [[[20_000, -50_000], [20_000, 80_000]]] as const // prettier-ignore
    const sill = (m: typeof model): number => m.variogram!.sill + m.variogram!.nugget
    expect(sill(fitUnitModel(step, { quantity: 'T', barriers: barrier }))).toBeLessThan(
      sill(fitUnitModel(step, { quantity: 'T' })),
    )
  })

  it('refuses an impossible assumed variogram', () => {
    const variogram = { model: 'spherical', nugget: -1, sill: 1, range: 1 } as const
    expect(() => fitUnitModel([], { quantity: 'T', assumed: { variogram, from: 'nowhere' } })).toThrow(
      'not a variogram',
    )
  })
})
