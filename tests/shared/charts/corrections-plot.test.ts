import { describe, expect, it } from 'vitest'
import { correctedPlot, outsidePlot } from '#shared/charts/corrections-plot.ts'

const DAY = 86_400
const well = {
  label: 'OB-1',
  elapsed_s: [-DAY, 0, DAY, 2 * DAY],
  drawdown_m: [0, 0, 1, 1.2],
  included: [true, true, true, false],
  uncorrected_m: [0.1, 0, 1.1, 1.3],
}
const units = { time: 'min', length: 'm', pressure: 'kPa' }

describe('the plot of corrected readings', () => {
  it('draws measured readings faint beside the corrected ones, over days where the record is long', () => {
    const plot = correctedPlot(well, units, 'down')
    expect(plot.x.title).toBe('time since pumping began, d')
    expect(plot.dots.map(({ label, points }) => [label, points[0]!.state, points[0]!.y, points[3]!.state])).toEqual([
      ['corrected', 'used', 0, 'left-out'],
      ['as measured', 'outside', 0.1, 'left-out'],
    ])
    const short = correctedPlot({ ...well, elapsed_s: [-60, 0, 60, 120] }, units, 'up')
    expect([short.x.title, short.y.inverse]).toEqual(['time since pumping began, min', false])
  })

  it('draws readings once where nothing is corrected', () => {
    const plot = correctedPlot({ ...well, uncorrected_m: null }, units, 'down')
    expect(plot.dots.map(({ label }) => label)).toEqual(['as measured'])
  })

  it('lays the series under it on the same time, in the reader’s unit', () => {
    const plot = correctedPlot(well, units, 'down')
    const outside = {
      label: 'Roof',
      quantity: 'air-pressure' as const,
      elapsed_s: [-9 * DAY, 0, DAY],
      value: [1, 1e5, 1.01e5],
    }
    const cause = outsidePlot(outside, plot, well, units)
    expect(cause.x).toBe(plot.x)
    expect(cause.lines).toEqual([
      {
        label: 'Roof',
        points: [
          [0, 100],
          [1, 101],
        ],
      },
    ])
    expect(cause.y.title).toBe('air pressure, kPa')
    expect(cause.y.min).toBeGreaterThan(90)
  })
})
