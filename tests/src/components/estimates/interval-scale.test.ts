import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { intervalScale } from '../../../../src/components/estimates/interval-scale.ts'

describe('the axis under an interval', () => {
  it('places values by their logarithm, inside the width', () => {
    const { at } = intervalScale([100, 1_000, 10_000])
    expect(at(1_000)).toBeCloseTo(0.5, 12)
    expect(at(1_000) - at(100)).toBeCloseTo(at(10_000) - at(1_000), 12)
    expect(at(100)).toBeGreaterThan(0)
    expect(at(10_000)).toBeLessThan(1)
  })

  it('has round ticks, as text of the reader', () => {
    const labels = (values: number[]) => intervalScale(values).ticks.map(({ label }) => label)
    expect(labels([100, 3_000])).toEqual(['100', '300', '1\u202f000', '3\u202f000'])
    expect(labels([0.1, 0.3])).toEqual(['0.1', '0.2'])
    expect(labels([1e-6, 1e-1])).toEqual(['1×10⁻⁶', '1×10⁻⁵', '1×10⁻⁴', '0.001', '0.01', '0.1'])
  })

  it('holds whatever values come, with at least one tick, for all positive numbers', () => {
    const positive = fc.double({ min: 1e-9, max: 1e9, noNaN: true })
    fc.assert(
      fc.property(fc.array(positive, { minLength: 1, maxLength: 20 }), (values) => {
        const { at, ticks, minor } = intervalScale(values)
        for (const value of values) expect(at(value) >= 0 && at(value) <= 1).toBe(true)
        expect(minor.length + ticks.length).toBeGreaterThan(0)
        for (const { value } of ticks) expect(at(value) >= 0 && at(value) <= 1).toBe(true)
      }),
      { seed: 1 },
    )
  })
})
