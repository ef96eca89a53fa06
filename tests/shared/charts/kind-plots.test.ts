import { ScatterChart, LineChart } from 'echarts/charts'
import { GridComponent, MarkAreaComponent, TooltipComponent } from 'echarts/components'
import { init, use } from 'echarts/core'
import { SVGRenderer } from 'echarts/renderers'
import { describe, expect, it } from 'vitest'
import { capacityPlot } from '#shared/charts/capacity-plot.ts'
import { plotFrame } from '#shared/charts/plot-frame.ts'
import { simpleChart } from '#shared/charts/simple-chart.ts'
import { thinnedForScreen } from '#shared/charts/simple-plot.ts'
import { slugPlot } from '#shared/charts/slug-plot.ts'
import { perRatePlot, stepTimePlot } from '#shared/charts/step-plot.ts'
import { curveOwn } from '#shared/hydraulics/any-kind.ts'
import { analyseKind } from '#shared/hydraulics/kinds.ts'
import type { SpecificCapacityInputs } from '#shared/hydraulics/specific-capacity/specific-capacity-test.ts'
import { makeRepeat, makeSlugInputs } from '../hydraulics/make-slug.ts'
import { HOUR, makeStepInputs, stepTruth } from '../hydraulics/make-steps.ts'

use([LineChart, ScatterChart, GridComponent, MarkAreaComponent, TooltipComponent, SVGRenderer])

const units = { time: 'min', length: 'm', discharge: 'L/s' }
const theme = {
  sheet: '#FFFFFF',
  line: '#D9D5CB',
  ink: '#1C2B33',
  inkSoft: '#5B6770',
  deepWater: '#0B4F6C',
  ochre: '#9A6412',
}

function slug(overrides: Partial<Parameters<typeof slugPlot>[0]> = {}, inputs = makeSlugInputs()) {
  const options = { repeatIds: null }
  const result = analyseKind('slug', 'hvorslev', inputs, options)
  const curve = (times_s: number[]) => curveOwn('slug', { method: 'hvorslev', inputs, options, result }, times_s)
  const heads = { from: 0.15, to: 0.25 }
  return slugPlot({
    kind: 'head-log',
    inputs,
    repeatIds: null,
    heads,
    outcome: result,
    curve,
    timeUnit: 's',
    ...overrides,
  })
}

describe('The plot of a slug test', () => {
  it('shows heads as shares of the first displacement, whichever way the level moved', () => {
    const rising = makeRepeat({ initial_m: -0.5 })
    for (const repeats of [[makeRepeat()], [rising]]) {
      const [dots] = slug({}, makeSlugInputs({ repeats })).dots
      for (const { x, y } of dots!.points) expect(y).toBeCloseTo(Math.exp(-x / 30), 9)
    }
  })

  it('tells readings that the line rests on from the others, and tints the heads recommended', () => {
    const plot = slug()
    const used = plot.dots[0]!.points.filter(({ state }) => state === 'used')
    expect(used.length).toBeGreaterThan(3)
    for (const { y } of used) expect(y).toBeGreaterThanOrEqual(0.15 - 1e-9)
    for (const { y } of used) expect(y).toBeLessThanOrEqual(0.25 + 1e-9)
    expect(plot.shades).toMatchObject([{ axis: 'y', from: 0.15, to: 0.25 }])
    expect(slug({ kind: 'head-linear' }).shades).toEqual([])
  })

  it('draws the line through the readings that it was fitted to', () => {
    const plot = slug()
    for (const { y, fitted } of plot.dots[0]!.points) expect(fitted! / y).toBeCloseTo(1, 6)
    for (const [x, y] of plot.lines[0]!.points) expect(y).toBeCloseTo(Math.exp(-x / 30), 6)
  })

  it('leaves heads below a hundredth and below rest to the linear plot', () => {
    const swinging = makeRepeat({ displacement_m: makeRepeat().elapsed_s.map((t) => 0.5 * Math.cos(t / 10)) })
    const inputs = makeSlugInputs({ repeats: [swinging] })
    const bare = { inputs, repeatIds: null, heads: null, outcome: null, curve: () => [], timeUnit: 's' }
    const lowest = (kind: 'head-log' | 'head-linear') =>
      Math.min(...slugPlot({ ...bare, kind }).dots[0]!.points.map(({ y }) => y))
    expect(lowest('head-log')).toBeGreaterThanOrEqual(0.01)
    expect(lowest('head-linear')).toBeLessThan(-0.9)
  })

  it('shows the repeats that are chosen', () => {
    const inputs = makeSlugInputs({ repeats: [makeRepeat(), makeRepeat({ id: 'r2', label: 'Repeat 2' })] })
    expect(slug({ repeatIds: ['r2'] }, inputs).dots.map(({ label }) => label)).toEqual(['Repeat 2'])
  })
})

describe('The plots of a step-drawdown test', () => {
  const inputs = makeStepInputs()
  const result = analyseKind('step', 'step-linear', inputs, {})
  const curve = (times_s: number[]) => curveOwn('step', { method: 'step-linear', inputs, options: {}, result }, times_s)

  it('lie on B + C·Q per unit of rate, with B where the rate is zero', () => {
    const plot = perRatePlot(result, units)
    const B = stepTruth.start + stepTruth.trend * Math.log10(HOUR)
    // Litres a second: a thousandth of what the losses are given for.
    for (const { x, y } of plot.dots[0]!.points) expect(y).toBeCloseTo((B + stepTruth.C * (x / 1000)) / 1000, 9)
    expect(plot.dots[0]!.points).toHaveLength(4)
    expect(plot.lines[0]!.points[0]![0]).toBe(0)
    expect(plot.lines[0]!.points[0]![1]).toBeCloseTo(B / 1000, 9)
    expect(plot.y.title).toBe('drawdown over rate, m per L/s')
  })

  it('follow the drawdown in time, with a moment wherever the rate changed', () => {
    const plot = stepTimePlot({ inputs, curve, units, direction: 'down' })
    expect(plot.moments).toEqual([60, 120, 180, 240])
    expect(plot.y.inverse).toBe(true)
    const known = plot.dots[0]!.points.filter(({ fitted }) => fitted !== null)
    expect(known.length).toBeGreaterThan(60)
    for (const { y, fitted } of known) expect(fitted).toBeCloseTo(y, 6)
  })

  it('are empty, not broken, before there is a result', () => {
    expect(perRatePlot(null, units).dots[0]!.points).toEqual([])
    expect(stepTimePlot({ inputs, curve: () => [], units, direction: 'up' }).lines[0]!.points).toEqual([])
  })
})

describe('The plot of a specific capacity', () => {
  const inputs: SpecificCapacityInputs = {
    version: 1,
    wellId: 'w',
    label: 'W-1',
    rate_m3_s: 0.006,
    rateError: 0.05,
    drawdown_m: 4,
    drawdownSd_m: 0.05,
    duration_s: 28_800,
    wellRadius_m: 0.15,
    casingRadius_m: null,
    aquifer: 'confined',
    thickness_m: null,
    thicknessError: 0.1,
    screenLength_m: null,
  }
  const T = analyseKind('specific-capacity', 'specific-capacity', inputs, {}).T!.value

  it('falls with the storativity assumed and passes through what was found', () => {
    const plot = capacityPlot({ inputs, options: {}, T, unit: 'm2/d' })
    const ys = plot.lines[0]!.points.map(([, y]) => y)
    expect(ys.every((y, i) => i === 0 || y < ys[i - 1]!)).toBe(true)
    expect(plot.dots[0]!.points).toMatchObject([{ x: 1e-4, y: T * 86_400 }])
    expect(plot.shades).toMatchObject([{ axis: 'x', from: 1e-5, to: 1e-3 }])
  })
})

describe('A plot of dots and lines', () => {
  it('is drawn with its axes, dots, lines and tints', () => {
    const frame = plotFrame({ width: 900, height: 600 }, { withStrip: false })
    const chart = init(null, null, { renderer: 'svg', ssr: true, ...frame.size })
    chart.setOption(simpleChart(slug(), frame, theme))
    const svg = chart.renderToSVGString()
    chart.dispose()
    for (const text of ['head over first displacement', 'heads of the line', 'time since the level was moved, s']) {
      expect(svg).toContain(text)
    }
    expect(svg).toContain(theme.deepWater)
  })

  it('draws a long log in part, from its first reading on', () => {
    const long = Array.from({ length: 10_000 }, (_, i) => i)
    expect(thinnedForScreen(long).length).toBeLessThanOrEqual(1200)
    expect(thinnedForScreen(long)[0]).toBe(0)
    expect(thinnedForScreen([1, 2, 3])).toEqual([1, 2, 3])
  })
})
