import { describe, expect, it } from 'vitest'
import { endsOf, isWhole, scaled, shifted, WHOLE, type View } from '#shared/charts/zoom.ts'
import { makeInputs, makeTheisSeries } from '../hydraulics/make-inputs.ts'
import { makeFit, makePlot, truth } from './make-plot.ts'
import { fitDrawing } from '#shared/charts/fit-drawing.ts'

const axis = { scale: 'log', min: 1, max: 10_000, title: '', inverse: false } as const
const long = (noise: (i: number) => number) => {
  const elapsed_s = Array.from({ length: 50_000 }, (_, i) => 2 * (i + 1))
  const series = makeTheisSeries(truth, { elapsed_s, included: elapsed_s.map(() => true) })
  return makeInputs({ series: [{ ...series, drawdown_m: series.drawdown_m.map((s, i) => s + noise(i)) }] })
}

describe('A part of an axis', () => {
  it('keeps the place that is pointed at', () => {
    const view = scaled(WHOLE, 0.5, 0.75)
    expect(view).toEqual([0.375, 0.875])
    expect(endsOf(axis, view)[0]).toBeCloseTo(10 ** 1.5, 9)
    expect(view[0] + 0.75 * (view[1] - view[0])).toBeCloseTo(0.75, 12)
  })

  it('never leaves the axis, and is all of it again when it is wide enough', () => {
    expect(shifted([0.25, 0.5], -5)).toEqual([0, 0.25])
    expect(shifted([0.1, 0.3], 50)[1]).toBeCloseTo(1, 12)
    expect(isWhole(scaled([0.4, 0.6], 8))).toBe(true)
    const narrow = Array.from({ length: 60 }).reduce<View>((view) => scaled(view, 0.5), WHOLE)
    expect(narrow[1] - narrow[0]).toBeCloseTo(1e-4, 9)
  })
})

describe('A plot of a long log', () => {
  it('shows a spike that lasted one reading', () => {
    const inputs = long((i) => (i === 31_111 ? 3 : 0))
    for (const kind of ['linear', 'semi-log', 'log-log'] as const) {
      const points = makePlot({ kind, inputs }).wells[0]!.points
      expect(points.length).toBeLessThanOrEqual(1_200)
      expect(Math.max(...points.map(({ y }) => y))).toBeGreaterThan(3)
    }
  })

  it('shows every reading of a part that holds few, on axes that fit them', () => {
    const inputs = long((i) => (i % 2) * 0.001)
    const plot = makePlot({ kind: 'linear', inputs, view: [1_000, 1_010] })
    const [well] = plot.wells
    expect([plot.x.min, plot.x.max]).toEqual([1_000, 1_010])
    // A reading every two seconds, ten minutes, both ends.
    expect(well!.points).toHaveLength(301)
    expect(well!.readingCount).toBe(301)
    expect(plot.y.min).toBeGreaterThan(0.5)
    expect(plot.y.max - plot.y.min).toBeLessThan(0.01)
  })

  it('names no zero and no fall of a line beyond the part that is looked at', () => {
    const fit = makeFit('cooper-jacob')
    const whole = fitDrawing(makePlot({ inputs: fit.inputs }), fit)
    expect(whole.marks?.zero).not.toBeNull()
    const part = fitDrawing(makePlot({ inputs: fit.inputs, view: [600, 900] }), fit)
    expect(part.marks).toEqual({ zero: null, cycle: null })
  })
})
