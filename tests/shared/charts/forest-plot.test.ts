import { describe, expect, it } from 'vitest'
import { forestPlot, type ForestEstimate } from '#shared/charts/forest-plot.ts'

const makeEstimate = (overrides: Partial<ForestEstimate> = {}): ForestEstimate => ({
  key: 'a',
  value: 400,
  low: 350,
  high: 450,
  determined: true,
  ...overrides,
})

describe('A forest plot', () => {
  it('places values and intervals on one logarithmic axis', () => {
    const { marks } = forestPlot([makeEstimate(), makeEstimate({ key: 'b', value: 800, low: 700, high: 900 })])!
    for (const { low, value, high } of marks) {
      expect(low).toBeLessThan(value)
      expect(value).toBeLessThan(high)
    }
    // Equal factors are equally wide: 800/400 apart, as 700/350 are.
    expect(marks[1]!.value - marks[0]!.value).toBeCloseTo(marks[1]!.low - marks[0]!.low, 9)
    expect(marks[0]!.low).toBeGreaterThan(0)
    expect(marks[1]!.high).toBeLessThan(1)
  })

  it('cuts off an interval without end, so that the others keep their width', () => {
    const { marks } = forestPlot([
      makeEstimate(),
      makeEstimate({ key: 'b', low: 1e-20, high: 1e25, determined: false }),
    ])!
    expect(marks.map(({ cutLow, cutHigh }) => [cutLow, cutHigh])).toEqual([
      [false, false],
      [true, true],
    ])
    expect(marks[0]!.high - marks[0]!.low).toBeGreaterThan(0.03)
  })

  it('has round ticks inside the axis, and not too many', () => {
    for (const wide of [1.1, 3, 100, 1e6]) {
      const { ticks } = forestPlot([makeEstimate({ value: 1 }), makeEstimate({ key: 'b', value: wide })])!
      expect(ticks.length).toBeGreaterThan(0)
      expect(ticks.length).toBeLessThan(12)
      for (const { share } of ticks) expect(Math.abs(share - 0.5)).toBeLessThanOrEqual(0.5)
    }
  })

  it('writes no tick over another, however long its number', () => {
    const { ticks } = forestPlot([makeEstimate({ value: 1.2e-4, low: 7.7e-5, high: 2e-4 })])!
    expect(ticks.length).toBeGreaterThan(1)
    for (const [i, { share, text }] of ticks.slice(1).entries())
      expect(share - ticks[i]!.share).toBeGreaterThan(0.026 * text.length)
  })

  it('has enough ticks to read by where estimates agree', () => {
    const { ticks } = forestPlot([makeEstimate({ value: 365, low: 330, high: 450 })])!
    expect(ticks.map(({ text }) => text)).toEqual(['400', '500', '600'])
  })

  it('is none without values', () => {
    expect(forestPlot([])).toBeNull()
    expect(forestPlot([makeEstimate({ value: Number.NaN })])).toBeNull()
  })
})
