import { describe, expect, it } from 'vitest'
import { fitUnitModel } from '#shared/estimates/fit-unit-model.ts'
import { makeSiteValue } from './make.ts'

describe('the model of a unit', () => {
  it('has no lags and no variogram where all values stand at one place, as in nested wells', () => {
    const nested = ['a', 'b', 'c'].map((id) => makeSiteValue({ id, x: 500, y: -200 }))
    expect(fitUnitModel(nested, { quantity: 'T' })).toMatchObject({
      rule: 'none',
      n: 3,
      sites: 1,
      experimental: [],
      robust: [],
      variogram: null,
      crossValidation: null,
    })
  })

  it('has lags as soon as two places differ', () => {
    const apart = ['a', 'b', 'c', 'd', 'e'].map((id, i) => makeSiteValue({ id, x: 1_000 * i, log10: -2.5 + i / 10 }))
    const { rule, experimental, crossValidation } = fitUnitModel(apart, { quantity: 'T' })
    expect(rule).toBe('mean')
    expect(experimental.length).toBeGreaterThan(0)
    expect(crossValidation!.n).toBe(5)
  })

  it('is empty for no values at all', () => {
    expect(fitUnitModel([], { quantity: 'S' })).toMatchObject({ rule: 'none', n: 0, sites: 0, experimental: [] })
  })
})
