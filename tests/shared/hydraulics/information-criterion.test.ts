import { describe, expect, it } from 'vitest'
import { smallSampleCriterion } from '#shared/hydraulics/information-criterion.ts'

describe('The information criterion', () => {
  it('is n ln σ² + 2k + 2k(k+1)/(n−k−1) with the scatter counted among the k (Hurvich & Tsai 1989)', () => {
    // By hand: n 20, two unknowns, mean square e^-4: 20·(−4) + 6 + 24/16.
    expect(smallSampleCriterion(Math.exp(-4), 20, 2)).toBeCloseTo(-72.5, 12)
  })

  it('falls by n ln 4 when residuals halve, and rises with an unknown that changes nothing', () => {
    const one = smallSampleCriterion(1e-4, 50, 2) as number
    expect(one - (smallSampleCriterion(0.25e-4, 50, 2) as number)).toBeCloseTo(50 * Math.log(4), 9)
    expect(smallSampleCriterion(1e-4, 50, 3)).toBeGreaterThan(one)
  })

  it('says nothing where the readings are too few, or the fit is exact', () => {
    expect(smallSampleCriterion(1e-4, 4, 2)).toBeNull()
    expect(smallSampleCriterion(0, 50, 2)).toBeNull()
  })
})
