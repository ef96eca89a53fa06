import type { SeriesOption } from 'echarts'
import { describe, expect, it } from 'vitest'
import {
  comparedCurve,
  comparisonChart,
  comparisonPlot,
  comparisonTable,
  curveStyles,
} from '#shared/charts/comparison-chart.ts'
import { plotFrame } from '#shared/charts/plot-frame.ts'
import { makeFit, makeTestInputs } from './make-plot.ts'

const inputs = makeTestInputs()
const theme = {
  sheet: '#FFFFFF',
  line: '#D9D5CB',
  ink: '#1C2B33',
  inkSoft: '#5B6770',
  deepWater: '#0B4F6C',
  ochre: '#9A6412',
}
const makeComparison = (kind: 'semi-log' | 'log-log' | 'recovery' | 'linear' = 'semi-log') =>
  comparisonPlot({
    kind,
    inputs,
    wellIds: ['o1'],
    options: {},
    units: { time: 'min', length: 'm' },
    direction: 'down',
  })

describe('Curves compared', () => {
  const plot = makeComparison()
  const curves = [
    comparedCurve(plot, 'Curve', makeFit('theis')),
    comparedCurve(plot, 'Line', makeFit('cooper-jacob')),
    comparedCurve(plot, 'After the stop', makeFit('recovery')),
  ]

  it('are drawn over the readings, each in strokes of its own', () => {
    const { series } = comparisonChart(
      plot,
      curves,
      plotFrame({ width: 800, height: 500 }, { withStrip: false }),
      theme,
    )
    const lines = (series as (SeriesOption & { lineStyle: object; id: string })[]).filter(({ id }) =>
      id.startsWith('curve-'),
    )
    expect(lines.map(({ name }) => name)).toEqual(['Curve', 'Line', 'After the stop'])
    expect(new Set(lines.map(({ lineStyle }) => JSON.stringify(lineStyle))).size).toBe(3)
  })

  it('pass through the same readings where methods agree', () => {
    const last = curves.slice(0, 2).map(({ wells }) => wells[0]!.points.at(-1)![1])
    expect(Math.abs(last[0]! / last[1]! - 1)).toBeLessThan(0.01)
  })

  it('have nothing to draw in the phase that a method does not look at', () => {
    expect(curves[2]!.wells[0]!.points).toEqual([])
    expect(comparedCurve(makeComparison('recovery'), '', makeFit('recovery')).wells[0]!.points.length).toBeGreaterThan(
      50,
    )
  })

  it('leave wells out that their analysis does not take', () => {
    const elsewhere = { ...makeFit('theis'), options: { wellIds: ['other'], window: null } }
    expect(comparedCurve(plot, '', elsewhere).wells).toEqual([])
  })

  it('read as a table with one column for each', () => {
    const { heads, rows } = comparisonTable(plot, curves)
    expect(heads).toEqual([plot.x.title, 'Curve, OB-1', 'Line, OB-1', 'After the stop, OB-1'])
    expect(rows.length).toBeGreaterThan(50)
    expect(rows.map(([x]) => x)).toEqual(rows.map(([x]) => x).sort((a, b) => a! - b!))
    expect(rows.at(-1)![1]).toBe(curves[0]!.wells[0]!.points.at(-1)![1])
  })

  it('name the axis after drawdown alone, which is all they show', () => {
    expect(makeComparison('log-log').y.title).toBe('drawdown, m')
    expect(makeComparison('log-log').wells[0]!.derivative).toEqual([])
  })

  it('have strokes that differ in dashes where they share a colour', () => {
    const seen = curveStyles.map(({ colour, dash }) => `${colour} ${dash.join()}`)
    expect(new Set(seen).size).toBe(curveStyles.length)
  })
})
