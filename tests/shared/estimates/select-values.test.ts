import { describe, expect, it } from 'vitest'
import { independentSites } from '#shared/estimates/independent-sites.ts'
import { selectValues } from '#shared/estimates/select-values.ts'
import type { Quantity, SiteValue } from '#shared/estimates/types.ts'
import { makeSiteValue } from './make.ts'

const reasonFor = (overrides: Partial<SiteValue>, quantity: Quantity = 'T') =>
  selectValues([makeSiteValue(overrides)], quantity).excluded[0]?.reason ?? null

const storage: Partial<SiteValue> = { log10: -3.5, storageClass: 'elastic' }

describe('data rules', () => {
  it.each<[string, Partial<SiteValue>, Quantity, string | null]>([
    ['an ordinary value', {}, 'T', null],
    ['a value that is not a number', { log10: NaN }, 'T', 'not-finite'],
    ['a value without an error', { error: 0 }, 'T', 'not-finite'],
    ['a transmissivity above 10 m²/s', { log10: 1.01 }, 'T', 'beyond-limits'],
    ['a transmissivity below 1e-10 m²/s', { log10: -10.1 }, 'T', 'beyond-limits'],
    ['a composite value', { composite: true }, 'T', 'composite'],
    ['a composite value with its share settled', { composite: true, apportioned: true }, 'T', null],
    ['elastic storativity', storage, 'S', null],
    ['specific yield asked as storativity', { ...storage, storageClass: 'specific-yield' }, 'S', 'storage-class'],
    ['elastic storativity asked as specific yield', storage, 'Sy', 'storage-class'],
    ['apparent storativity', { ...storage, storageClass: 'apparent' }, 'S', 'storage-class'],
    ['unclassified storativity', { ...storage, storageClass: 'unclassified' }, 'Sy', 'storage-class'],
    ['storativity from the pumped well', { ...storage, origin: 'pumped-well' }, 'S', 'storage-origin'],
    ['storativity from a slug test', { ...storage, origin: 'slug-test' }, 'S', 'storage-origin'],
    ['transmissivity from the pumped well', { origin: 'pumped-well' }, 'T', null],
    ['a storativity of one', { ...storage, log10: 0 }, 'S', 'beyond-limits'],
  ])('decide about %s', (_name, overrides, quantity, reason) => {
    expect(reasonFor(overrides, quantity)).toBe(reason)
  })
})

describe('pooling', () => {
  it('keeps one value per test, no surer than the best of them', () => {
    const values = [
      makeSiteValue({ id: 'a', testId: 't', wellId: 'w', log10: -2, error: 0.1 }),
      makeSiteValue({ id: 'b', testId: 't', wellId: 'w', log10: -3, error: 0.2 }),
    ]
    const [used, ...rest] = selectValues(values, 'T').used
    expect(rest).toEqual([])
    // Weights 100 and 25.
    expect(used!.log10).toBeCloseTo((-2 * 100 - 3 * 25) / 125, 12)
    expect(used!.error).toBe(0.1)
    expect(used!.memberIds).toEqual(['a', 'b'])
  })

  it('makes repeated tests at a well surer than one', () => {
    const values = ['a', 'b'].map((id) => makeSiteValue({ id, testId: id, wellId: 'w', error: 0.2 }))
    const [used] = selectValues(values, 'T').used
    expect(used!.error).toBeCloseTo(0.2 / Math.sqrt(2), 12)
    expect(used!.testIds).toEqual(['a', 'b'])
  })

  it('lets repeated tests that disagree keep their scatter as error', () => {
    const values = [-2, -3].map((log10, i) =>
      makeSiteValue({ id: `${i}`, testId: `${i}`, wellId: 'w', log10, error: 0.1 }),
    )
    // Standard error of the mean of two values one apart: 0.5.
    expect(selectValues(values, 'T').used[0]!.error).toBeCloseTo(0.5, 12)
  })

  it('keeps wells at one place apart, because they may differ by screen', () => {
    expect(selectValues([makeSiteValue({ id: 'a' }), makeSiteValue({ id: 'b' })], 'T').used).toHaveLength(2)
  })
})

describe('independent sites', () => {
  const at = (x: number, error = 0.2) => makeSiteValue({ id: `x${x}`, x, error })

  it('are more than 500 m apart', () => {
    expect(independentSites([at(0), at(500), at(1001), at(1400)]).map((v) => v.x)).toEqual([0, 1001])
  })

  it('are spread along a line of wells, not merged into one', () => {
    const line = Array.from({ length: 51 }, (_, i) => at(i * 400))
    const sites = independentSites(line).map((v) => v.x)
    const nearest = (x: number): number[] => sites.map((s) => Math.abs(s - x)).sort((a, b) => a - b)
    for (const { x } of line) expect(nearest(x)[0]).toBeLessThanOrEqual(500)
    for (const x of sites) expect(nearest(x)[1]).toBeGreaterThan(500)
  })

  it('prefer the surest value of a crowd', () => {
    expect(independentSites([at(0, 0.4), at(100, 0.1), at(200, 0.3)]).map((v) => v.x)).toEqual([100])
  })

  it('see neighbours across the borders of the grid, below zero too', () => {
    expect(independentSites([at(-10), at(10)])).toHaveLength(1)
  })
})
