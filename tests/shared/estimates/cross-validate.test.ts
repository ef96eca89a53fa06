import { describe, expect, it } from 'vitest'
import { crossValidate } from '#shared/estimates/cross-validate.ts'
import { prepareValues } from '#shared/estimates/prepared-values.ts'
import { unitStatistics } from '#shared/estimates/unit-statistics.ts'
import type { SiteValue } from '#shared/estimates/types.ts'
import { makeModel, makeRing, makeSiteValue } from './make.ts'

const model = makeModel()
const validate = (values: SiteValue[]) => crossValidate(prepareValues(values, 'T'), model)!.crossValidation

describe('cross-validation', () => {
  const ring = makeRing(30, 6000)
  const odd = { ...ring[0]!, log10: 0 }

  it('foretells a value from the others only', () => {
    const residual = validate([odd, ...ring.slice(1)]).residuals.find((r) => r.id === odd.id)!
    expect(residual.observed).toBe(0)
    expect(residual.predicted).toBeCloseTo(-2.5, 10)
  })

  it('holds back wells within 250 m', () => {
    const twin = makeSiteValue({ id: 'twin', x: odd.x + 240, y: odd.y, log10: 0 })
    const near = validate([odd, twin, ...ring.slice(1)]).residuals.find((r) => r.id === odd.id)!
    expect(near.predicted).toBeCloseTo(-2.5, 10)
    const farther = { ...twin, x: odd.x + 260 }
    const far = validate([odd, farther, ...ring.slice(1)]).residuals.find((r) => r.id === odd.id)!
    expect(far.predicted).toBeGreaterThan(-2)
  })

  it('holds back the whole test', () => {
    // The same two tests at two wells: each well's pooled value shares a test with the other's.
    const first = [
      odd,
      makeSiteValue({ id: 'second', testId: 'shared', wellId: odd.wellId, x: odd.x, y: odd.y, log10: 0 }),
    ]
    const other = makeSiteValue({ id: 'other', testId: 'own', wellId: 'other', x: odd.x + 400, y: odd.y, log10: 0 })
    const residual = validate([...first, other, ...ring.slice(1)]).residuals.find((r) => r.id === odd.id)!
    expect(residual.predicted).toBeGreaterThan(-2.4)
  })

  it('is not possible for a single value', () => {
    expect(crossValidate(prepareValues([odd], 'T'), model)).toBeNull()
  })

  it('widens intervals that do not hold', () => {
    const wild = makeRing(60, 12_000).map((v, i) => ({ ...v, log10: -2.5 + 2 * Math.sin(1.7 * i * i) }))
    const { spreadFactor, crossValidation } = crossValidate(prepareValues(wild, 'T'), model)!
    expect(spreadFactor).toBeGreaterThan(2)
    expect(crossValidation.coverage95.share).toBeGreaterThan(0.9)
  })
})

describe('unit statistics', () => {
  it('count evidence and sites and name outliers', () => {
    const values = makeRing(12, 6000).map((v, i) => ({ ...v, log10: -2.5 + 0.05 * Math.sin(i) }))
    const far = makeSiteValue({ id: 'odd', x: 50, y: 50, log10: 0, evidence: 'slight' })
    const statistics = unitStatistics(prepareValues([...values, far], 'T'), null)!
    expect(statistics).toMatchObject({
      n: 13,
      sites: 13,
      evidence: { firm: 0, fair: 12, slight: 1 },
      outlierIds: ['odd'],
    })
  })

  it('are null without values', () => {
    expect(unitStatistics(prepareValues([], 'T'), null)).toBeNull()
  })
})
