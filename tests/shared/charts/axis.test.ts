import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { linearAxis, logAxis, logLabels, powersIn, shareOf, valueAt } from '#shared/charts/axis.ts'
import { plotFrame, xPixel, xValue, yPixel, yValue } from '#shared/charts/plot-frame.ts'

const axes = [
  linearAxis([0, 1.37], 'drawdown, m'),
  linearAxis([-3, 12], 'drawdown, m', { inverse: true }),
  logAxis([0.4, 1_450], 'time, min'),
  logAxis([1, 900], "t/t'", { inverse: true }),
]

describe('An axis', () => {
  it('ends at round numbers that hold every value', () => {
    expect(linearAxis([0.02, 1.37], '')).toMatchObject({ min: 0, max: 1.4 })
    expect(linearAxis([], '')).toMatchObject({ min: 0, max: 1 })
    expect(linearAxis([0, 0], '').max).toBeGreaterThan(0)
    expect(linearAxis([12, 18], '', { fromZero: false })).toMatchObject({ min: 12, max: 18 })
  })

  it('leaves out of a logarithmic scale what has no logarithm', () => {
    const { min, max } = logAxis([-5, 0, Number.NaN, 2, 2_000], '')
    expect(min).toBeGreaterThan(1)
    expect(min).toBeLessThan(2)
    expect(max).toBeGreaterThan(2_000)
    expect(powersIn({ min, max, scale: 'log', title: '', inverse: false })).toEqual([10, 100, 1_000])
  })

  it('is not empty where all values are one', () => {
    const { min, max } = logAxis([60], '')
    expect(max / min).toBeGreaterThan(1.9)
  })

  it('is labelled by whole powers of ten, and where it is short by the roundest numbers on it', () => {
    const labels = (min: number, max: number) => logLabels({ scale: 'log', min, max, title: '', inverse: false })
    expect(labels(1.3, 2_400)).toEqual([10, 100, 1_000])
    expect(labels(1.60244, 31)).toEqual([2, 5, 10, 20])
    expect(labels(0.0012, 0.0078)).toEqual([0.002, 0.005])
    expect(labels(5.2, 8.4)).toEqual([6, 7, 8])
    expect(labels(6.1, 6.49)).toEqual([6.1, 6.2, 6.3, 6.4])
  })

  it('finds the value back from its share, in either direction', () => {
    fc.assert(
      fc.property(fc.constantFrom(...axes), fc.double({ min: 0, max: 1, noNaN: true }), (axis, share) => {
        expect(shareOf(axis, valueAt(axis, share))).toBeCloseTo(share, 9)
      }),
    )
  })
})

describe('A frame', () => {
  const frame = plotFrame({ width: 900, height: 600 }, { withStrip: true })

  it('finds the value back from its pixel', () => {
    for (const axis of axes) {
      const middle = valueAt(axis, 0.5)
      expect(xValue(frame, axis, xPixel(frame, axis, middle))).toBeCloseTo(middle, 9)
      expect(yValue(frame, axis, yPixel(frame, axis, middle))).toBeCloseTo(middle, 9)
    }
  })

  it('puts the strip under the plot and keeps both inside the picture', () => {
    const strip = frame.strip!
    expect(strip.top).toBeGreaterThan(600 - frame.plot.bottom)
    expect(strip.top + strip.bottom).toBeLessThan(600)
  })

  it('points drawdown down on an inverse axis', () => {
    const axis = linearAxis([0, 2], 'drawdown, m', { inverse: true })
    expect(yPixel(frame, axis, 2)).toBeGreaterThan(yPixel(frame, axis, 0))
  })
})
