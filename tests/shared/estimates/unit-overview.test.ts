import { describe, expect, it } from 'vitest'
import { capacityAfterADay, capacityPairs, type CapacityTest } from '#shared/estimates/capacity-pairs.ts'
import { methodGroup } from '#shared/estimates/method-groups.ts'
import type { SiteValue } from '#shared/estimates/types.ts'
import { unitOverview, type OverviewRequest } from '#shared/estimates/unit-overview.ts'
import { makeModel, makeRing, makeSiteValue } from './make.ts'

const overview = (values: SiteValue[], more: Partial<OverviewRequest> = {}) =>
  unitOverview({ values, quantity: 'T', model: null, capacityTests: [], ...more })

/** Curve values about -2.5; slug values a factor of ten lower, each with the same small scatter. */
const scattered = (values: SiteValue[], mean: number) =>
  values.map((value, i) => ({ ...value, log10: mean + 0.05 * ((i % 5) - 2) }))
const curves = scattered(makeRing(10, 8000), -2.5)
const slugs = scattered(makeRing(10, 4000, { method: 'reported', origin: 'slug-test', evidence: 'slight' }), -3.5)

describe('the overview of a unit', () => {
  it('says by which factor slug tests read lower than curve fits', () => {
    const { methods } = overview([...curves, ...slugs])
    expect(methods.map(({ group, n }) => [group, n])).toEqual([
      ['curve', 10],
      ['slug', 10],
    ])
    const { difference, low, high } = methods[1]!.fromCurves!
    expect(difference).toBeCloseTo(-1, 10)
    expect([low < -1, high > -1, high < -0.8]).toEqual([true, true, true])
  })

  it('compares no group of four', () => {
    expect(overview([...curves, ...slugs.slice(0, 4)]).methods[1]!.fromCurves).toBeNull()
  })

  it('keeps to the evidence that is asked for', () => {
    const { statistics, values } = overview([...curves, ...slugs], { evidence: 'slight' })
    expect([statistics!.n, new Set(values.map(({ group }) => group))]).toEqual([10, new Set(['slug'])])
  })

  it('finds T that falls with depth, and leaves out values without one', () => {
    const deep = curves.map((value, i) => ({ ...value, log10: -2 - 0.2 * i, screenTop_m: 10 * i, screenBottom_m: 10 * i + 4 })) // prettier-ignore
    const { depth } = overview([...deep, makeSiteValue({ id: 'unknown', x: 50 })])
    expect([depth!.n, depth!.slope]).toEqual([10, expect.closeTo(-0.02, 10)])
  })

  it('pools the tests of a well and says of how many', () => {
    const twice = ['a', 'b'].map((id) => makeSiteValue({ id, wellId: 'same' }))
    expect(overview(twice).values).toMatchObject([{ tests: 2 }])
  })

  it('widens the interval of the mean where sites stand together', () => {
    const crowd = scattered(makeRing(20, 100), -2.5).map((value, i) => ({ ...value, x: value.x + (i % 4) * 4000 }))
    const { statistics } = overview(crowd)
    expect(statistics!.sites).toBe(4)
    expect(statistics!.meanBySites!.high).toBeGreaterThan(statistics!.meanIfIndependent!.high)
    const kriged = overview(crowd, { model: makeModel() }).statistics!.meanByKriging!
    expect(kriged.effectiveN).toBeGreaterThan(1)
    expect(kriged.effectiveN).toBeLessThan(20)
  })

  it('has no statistics of nothing', () => {
    expect(overview([])).toMatchObject({ statistics: null, values: [], methods: [], depth: null, year: null })
  })
})

describe('groups of methods', () => {
  it('follow the family, the kind of test, and what a report says it was', () => {
    const of = (method: string, origin: SiteValue['origin'] = 'other') => methodGroup({ method, origin })
    expect([of('theis'), of('cooper-jacob'), of('recovery'), of('specific-capacity')]).toEqual([
      'curve',
      'line',
      'recovery',
      'specific-capacity',
    ])
    expect([of('hvorslev', 'slug-test'), of('reported', 'slug-test'), of('reported')]).toEqual([
      'slug',
      'slug',
      'reported',
    ])
  })
})

describe('specific capacity against T', () => {
  const test = (wellId: string, more: Partial<CapacityTest> = {}): CapacityTest => ({
    wellId,
    rate_m3_s: 0.01,
    drawdown_m: 5,
    duration_s: 86_400,
    ...more,
  })

  it('is brought to one day along the straight line of the well’s own T', () => {
    expect(capacityAfterADay(test('a'), 1e-3)).toBeCloseTo(0.002, 12)
    // By hand: 0.01/(4π·10⁻³)·ln 24 = 2.529 m more than after the first hour.
    expect(capacityAfterADay(test('a', { duration_s: 3600 }), 1e-3)).toBeCloseTo(0.01 / 7.529015, 8)
    expect(capacityAfterADay(test('a', { duration_s: 86_400e3 }), 1e-3)).toBeNull()
  })

  it('takes T of observation wells and recoveries alone, the surest of each well', () => {
    const values = [
      makeSiteValue({ id: 'sure', wellId: 'a', log10: -3, error: 0.1 }),
      makeSiteValue({ id: 'unsure', wellId: 'a', log10: -2, error: 0.2 }),
      makeSiteValue({ id: 'pumped', wellId: 'b', origin: 'pumped-well' }),
      makeSiteValue({ id: 'rising', wellId: 'c', origin: 'pumped-well', method: 'recovery' }),
    ]
    const { pairs, regression } = capacityPairs(values, ['a', 'b', 'c', 'd'].map((id) => test(id))) // prettier-ignore
    expect(pairs.map(({ wellId, log10T }) => [wellId, log10T])).toEqual([
      ['a', -3],
      ['c', -2.5],
    ])
    expect(regression).toBeNull()
  })

  it('has a line from 25 pairs on', () => {
    const wells = Array.from({ length: 25 }, (_, i) => `w${i}`)
    const values = wells.map((wellId, i) => makeSiteValue({ id: wellId, wellId, log10: -4 + i / 12 }))
    // Q/s half of T everywhere: a line of slope 1, moved by log10 2.
    const tests = values.map(({ wellId, log10 }) => test(wellId, { drawdown_m: 0.01 / (0.5 * 10 ** log10) }))
    const { regression } = capacityPairs(values, tests)
    expect(regression).toMatchObject({
      n: 25,
      slope: expect.closeTo(1, 9),
      intercept: expect.closeTo(Math.log10(2), 9),
    })
    expect(capacityPairs(values, tests.slice(1)).regression).toBeNull()
  })
})
