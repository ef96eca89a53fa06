import { describe, expect, it } from 'vitest'
import { capacityText, meanBasisText, ratioFigures, ratioText, trendText } from '#shared/words/unit-statistics.ts'

const trend = { n: 30, slope: -0.03, slopeLow: -0.05, slopeHigh: -0.01, intercept: -2, scatter: 0.3, explained: 0.41 }
const depth = { span: 10, of: '10 m of depth', missing: 'Too few depths are known for a trend.' }
const slug = { group: 'slug' as const, n: 9, mean: -4 }

describe('what is said of the values of a unit', () => {
  it('gives a trend as a factor, and claims none whose interval holds a level line', () => {
    expect(trendText(trend, depth)).toMatch(/^It falls: × 0\.50 for 10 m of depth \(95 % interval × 0\.32 to × 0\.79,/)
    expect(trendText({ ...trend, slopeHigh: 0.01 }, depth)).toMatch(/^No trend is shown/)
    expect(trendText(null, depth)).toBe('Too few depths are known for a trend.')
  })

  it('says that a method reads lower only where the whole interval does', () => {
    const lower = { ...slug, fromCurves: { difference: -0.3, low: -0.5, high: -0.1 } }
    expect([ratioText(lower), ratioFigures(lower)]).toEqual(['reads lower here', '0.50 (0.32 to 0.79)'])
    expect(ratioText({ ...slug, fromCurves: { difference: -0.3, low: -0.7, high: 0.1 } })).toBe('no difference shown')
    expect(ratioText({ ...slug, fromCurves: null })).toBe('too few to compare')
  })

  it('gives the line of specific capacity, or says how many pairs there are', () => {
    const pair = { wellId: 1, wellCode: 'V-1', log10Capacity: -3, log10T: -3 }
    expect(capacityText({ pairs: [pair], regression: null })).toContain('needs 25 pairs: one well has both')
    const regression = { ...trend, slope: 0.9, slopeLow: 0.8, slopeHigh: 1 }
    expect(capacityText({ pairs: [pair], regression })).toContain('rises by 0.900 (95 % interval 0.800 to 1.00)')
  })

  it('names what the interval of the mean rests on', () => {
    expect(meanBasisText({ meanByKriging: null, sites: 6 })).toContain('6 sites')
    const meanByKriging = { mean: -3, low: -3.2, high: -2.8, effectiveN: 4.24 }
    expect(meanBasisText({ meanByKriging, sites: 6 })).toContain('as sure as 4.2 independent wells')
  })
})
