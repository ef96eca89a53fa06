import { describe, expect, it } from 'vitest'
import { histogramChart, histogramOf, roundBreaks } from '#shared/charts/histogram.ts'
import { paperTheme } from '#shared/charts/paper-theme.ts'
import { plotFrame } from '#shared/charts/plot-frame.ts'
import { simpleChart } from '#shared/charts/simple-chart.ts'
import { capacityPairsPlot, depthPlot, probabilityPlot, yearPlot } from '#shared/charts/unit-plots.ts'
import { makeFigures, makeStatistics } from '../../src/components/unit-statistics/make.ts'

const drawn = { unit: 'm2/d', name: 'transmissivity' }
const line = { n: 7, slope: 0.01, slopeLow: 0, slopeHigh: 0.02, intercept: -3, scatter: 0.1, explained: 0.5 }

describe('the histogram of logarithms', () => {
  it('has round class breaks, and every value in one class', () => {
    const values = Array.from({ length: 40 }, (_, i) => 10 ** (i / 13))
    // Sturges asks for 1 + log2 40 = 6.3 classes: whole powers of ten are too few.
    const { classes } = histogramOf(values, 'T, m²/d')
    expect(classes.map(({ from }) => from)).toEqual([1, 3, 10, 30, 100, 300, 1000])
    expect(classes.reduce((sum, { count }) => sum + count, 0)).toBe(40)
  })

  it('puts a value on a break into the class above it', () => {
    expect(histogramOf([1, 10, 100], 'T').classes.find(({ from }) => from === 10)!.count).toBe(1)
    expect(roundBreaks([10, 10])).toEqual([10, 20])
  })

  it('is drawn as an outline from class to class', () => {
    const chart = histogramChart(histogramOf([1, 1.5, 30], 'T'), plotFrame({ width: 600, height: 300 }, { withStrip: false }), paperTheme) // prettier-ignore
    const [{ data }] = chart.series as [{ data: [number, number][] }]
    expect(data.slice(0, 3)).toEqual([
      [1, 0],
      [1, 2],
      [3, 2],
    ])
  })
})

describe('plots of a unit', () => {
  it('lay normal values along the line of their mean and deviation', () => {
    const plot = probabilityPlot(makeStatistics().values, makeFigures(), drawn)
    const [[x0, y0]] = plot.lines[0]!.points as [[number, number]]
    expect(Math.log10(y0 / 86_400)).toBeCloseTo(-3 + 0.5 * x0, 9)
    expect(plot.y.title).toBe('transmissivity, m²/d')
  })

  it('group dots by evidence, and keep values without depth or year out', () => {
    const [first, ...rest] = makeStatistics().values
    const values = [{ ...first!, depthM: null, year: null, evidence: 'firm' as const }, ...rest]
    expect(depthPlot({ values, depth: null }, { ...drawn, length: 'm' }).dots.map(({ points }) => points.length)).toEqual([0, 6, 0]) // prettier-ignore
    expect(yearPlot({ values, year: null }, drawn).lines[0]!.points).toEqual([])
  })

  it('name each well, and write years as years', () => {
    const plot = yearPlot(makeStatistics(), drawn)
    const chart = simpleChart(plot, plotFrame({ width: 600, height: 300 }, { withStrip: false }), paperTheme)
    const { series, xAxis } = chart as unknown as {
      series: { id: string; data: { name: string; value: number[] }[] }[]
      xAxis: [{ axisLabel: { formatter: (value: number) => string } }]
    }
    expect(series.find(({ id }) => id === 'dots-1-used')!.data[0]).toMatchObject({
      name: 'V-1',
      value: [1990, expect.closeTo(8.64, 9)],
    })
    expect(xAxis[0].axisLabel.formatter(1990)).toBe('1990')
    expect([plot.x.min, plot.x.max, plot.x.step]).toEqual([1989, 1997, 1])
  })

  it('give one year alone an axis of whole years', () => {
    const [only] = makeStatistics().values
    expect(yearPlot({ values: [only!], year: null }, drawn).x).toMatchObject({ min: 1989, max: 1991, step: 1 })
  })

  it('draw the trend alike in any unit of length', () => {
    const statistics = makeStatistics({ depth: line })
    const ends = (length: string) => depthPlot(statistics, { ...drawn, length }).lines[0]!.points
    expect(ends('m')[1]![1]).toBeCloseTo(86_400 * 10 ** (-3 + 0.01 * 60), 6)
    expect(ends('ft')[1]![1]).toBeCloseTo(ends('m')[1]![1], 6)
    expect(ends('ft')[1]![0]).toBeCloseTo(60 / 0.3048, 9)
  })

  it('draw T against specific capacity in the units of either', () => {
    const pairs = [-3, -2].map((log10Capacity) => ({ wellId: 1, wellCode: 'a', log10Capacity, log10T: -2.5 }))
    const plot = capacityPairsPlot({ pairs, regression: { ...line, slope: 1, intercept: 0.3 } }, { ...drawn, capacity: 'm3/d/m' }) // prettier-ignore
    expect(plot.dots[0]!.points[0]).toMatchObject({ x: expect.closeTo(86.4, 9) })
    expect(plot.lines[0]!.points[0]![1]).toBeCloseTo(86_400 * 10 ** -2.7, 6)
  })
})
