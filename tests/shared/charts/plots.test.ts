import { describe, expect, it } from 'vitest'
import { distanceDrawing, distancePlot } from '#shared/charts/distance-plot.ts'
import { fitDrawing, methodOrigin, movedWindow, spanOf, windowOfSpan } from '#shared/charts/fit-drawing.ts'
import { lineEnds, lineFromZero, lineOf, lineThrough, zeroOf } from '#shared/charts/hand-line.ts'
import { plotKinds } from '#shared/charts/plot-kinds.ts'
import { logSpaced, makeInputs, makeTheisSeries } from '../hydraulics/make-inputs.ts'
import { makeFit, makePlot, makeTestInputs, truth } from './make-plot.ts'

const kindsOf = (inputs: ReturnType<typeof makeInputs>) =>
  plotKinds.filter(({ fits }) => fits(inputs)).map(({ id }) => id)

describe('Plots that a test offers', () => {
  it('are those it has the readings for', () => {
    expect(kindsOf(makeInputs())).toEqual(['linear', 'semi-log', 'log-log'])
    expect(kindsOf(makeTestInputs())).toEqual(['linear', 'semi-log', 'log-log', 'recovery'])
    const wells = ['a', 'b', 'c'].map((wellId, i) => makeTheisSeries(truth, { wellId, distance_m: 20 * (i + 1) }))
    expect(kindsOf(makeInputs({ series: wells }))).toContain('distance')
  })
})

describe('A plot against time', () => {
  it('shows pumping on the logarithmic plots, recovery on its own, and everything on the linear one', () => {
    const counts = (['linear', 'semi-log', 'log-log', 'recovery'] as const).map(
      (kind) => makePlot({ kind }).wells[0]!.points.length,
    )
    // Of 60 readings each, those of pumping below 0.1 nm of drawdown do not exist; all others are drawn.
    expect(counts).toEqual([120, 60, 60, 60])
  })

  it('gives every axis the unit of its numbers', () => {
    const plot = makePlot({ units: { time: 'd', length: 'ft' } })
    expect(plot.x.title).toContain(', d')
    expect(plot.y.title).toContain(', ft')
    expect(plot.x.max).toBeGreaterThan(1)
    expect(plot.x.max).toBeLessThan(2)
  })

  it('points down or up as the reader prefers, and the log–log plot always up', () => {
    expect(makePlot({ direction: 'down' }).y.inverse).toBe(true)
    expect(makePlot({ direction: 'up' }).y.inverse).toBe(false)
    expect(makePlot({ kind: 'log-log', direction: 'down' }).y.inverse).toBe(false)
  })

  it('has a derivative of Q/4πT where flow is radial', () => {
    const last = makePlot().wells[0]!.derivative.at(-1)!
    expect(last[1]).toBeCloseTo(0.01 / (4 * Math.PI * truth.T), 3)
  })

  it('draws readings that were left out apart from the others', () => {
    const inputs = makeTestInputs()
    inputs.series[0]!.included[10] = false
    const [well] = makePlot({ inputs }).wells
    expect([well!.points.length, well!.leftOut.length]).toEqual([59, 1])
  })

  it('keeps the time of readings that were left out on its axis, whatever their level, so that they can be taken back', () => {
    const inputs = makeTestInputs()
    const { elapsed_s, drawdown_m } = inputs.series[0]!
    const whole = makePlot({ inputs })
    inputs.series[0]!.included = elapsed_s.map((_, i) => i > 1)
    drawdown_m[0] = 9999
    const plot = makePlot({ inputs })
    expect(plot.x.min).toBe(whole.x.min)
    expect(plot.y.max).toBeCloseTo(whole.y.max, 6)
  })

  it('thins what a screen cannot show, and keeps the last reading', () => {
    const elapsed_s = Array.from({ length: 20_000 }, (_, i) => 5 * (i + 1))
    const series = makeTheisSeries(truth, { elapsed_s, included: elapsed_s.map(() => true) })
    for (const kind of ['linear', 'semi-log'] as const) {
      const { points } = makePlot({ kind, inputs: makeInputs({ series: [series] }) }).wells[0]!
      expect(points.length).toBeLessThan(1_300)
      expect(points.at(-1)!.elapsed_s).toBe(100_000)
    }
  })

  it('does not open the axis below zero for noise before the level falls', () => {
    const inputs = makeTestInputs()
    inputs.series[0]!.drawdown_m[0] = -0.002
    expect(makePlot({ inputs }).y.min).toBe(0)
  })
})

describe('The window on an axis', () => {
  it('keeps all digits of the edge that is not moved, whichever way the axis runs', () => {
    const window = { from_s: 1_234.567, to_s: 48_765.432 }
    for (const [kind, method] of [
      ['semi-log', 'cooper-jacob'],
      ['recovery', 'recovery'],
    ] as const) {
      const inputs = makeTestInputs()
      const plot = makePlot({ kind, inputs })
      const origin = methodOrigin(inputs, method)
      const span = spanOf(plot, origin, window)!
      const first = movedWindow(plot, origin, { window, span, moved: [span[0] * 1.1, span[1]] })
      const last = movedWindow(plot, origin, { window, span, moved: [span[0], span[1] / 1.1] })
      const [early, late] = kind === 'recovery' ? [last, first] : [first, last]
      expect(early.to_s).toBe(window.to_s)
      expect(early.from_s).not.toBe(window.from_s)
      expect(late.from_s).toBe(window.from_s)
      expect(late.to_s).not.toBe(window.to_s)
    }
  })

  it('comes back from its span, in few figures', () => {
    for (const [kind, method] of [
      ['semi-log', 'cooper-jacob'],
      ['linear', 'theis'],
      ['recovery', 'recovery'],
    ] as const) {
      const inputs = makeTestInputs()
      const plot = makePlot({ kind, inputs })
      const origin = methodOrigin(inputs, method)
      const window = { from_s: 1_200, to_s: 48_000 }
      const span = spanOf(plot, origin, window)!
      expect(span[0]).toBeLessThan(span[1])
      const back = windowOfSpan(plot, origin, span)
      expect(back.from_s).toBeCloseTo(1_200, 0)
      expect(back.to_s).toBeCloseTo(48_000, -1)
    }
  })

  it('has no place on a plot of another phase', () => {
    const inputs = makeTestInputs()
    const plot = makePlot({ kind: 'recovery', inputs })
    expect(spanOf(plot, methodOrigin(inputs, 'theis'), { from_s: 60, to_s: 600 })).toBeNull()
  })

  it('begins at the end of the axis where it begins with the pump', () => {
    const plot = makePlot()
    expect(spanOf(plot, 0, { from_s: 0, to_s: 6_000 })).toEqual([plot.x.min, 100])
  })
})

describe('A line drawn by hand', () => {
  it('goes through the points it was drawn through', () => {
    const plot = makePlot({ units: { time: 'd', length: 'ft' } })
    const line = lineThrough(plot, [
      [0.01, 1],
      [0.5, 3],
    ])
    expect(lineEnds(plot, line, [0.01, 0.5]).map(([, y]) => y)).toEqual([expect.closeTo(1, 9), expect.closeTo(3, 9)])
  })

  it('is the same by its fall and zero as by slope and intercept', () => {
    const { result } = makeFit('cooper-jacob')
    const line = lineOf(result)!
    const again = lineFromZero(line.slope, zeroOf(line))
    expect(again.intercept).toBeCloseTo(line.intercept, 9)
    expect(zeroOf(line)).toBeCloseTo(result.extras.zero_s!, 6)
  })
})

describe('An analysis on its plot', () => {
  it('marks where the line meets zero and its fall in one factor of ten', () => {
    const fit = makeFit('cooper-jacob')
    const { marks, fitted } = fitDrawing(makePlot(), fit)
    expect(marks!.zero!.at[0] * 60).toBeCloseTo(fit.result.extras.zero_s!, 6)
    const [a, , b] = marks!.cycle!.corner
    expect(b[0] / a[0]).toBeCloseTo(10, 9)
    expect(b[1] - a[1]).toBeCloseTo(fit.result.extras.slope_m!, 9)
    expect(fitted[0]!.every(([, y]) => y >= 0)).toBe(true)
  })

  it('shades the time in which u is still above 0.05', () => {
    const plot = makePlot()
    const { shade } = fitDrawing(plot, makeFit('cooper-jacob'))
    // u = r²S/(4Tt) = 0.05 at t = 50²·2e-4/(4·0.005·0.05) = 500 s.
    expect(shade!.label).toBe('u > 0.05')
    expect(shade!.from).toBe(plot.x.min)
    expect(shade!.to * 60).toBeCloseTo(500, -2)
  })

  it("shades late t/t' on the recovery plot, at the far side of the axis", () => {
    const plot = makePlot({ kind: 'recovery' })
    const { shade } = fitDrawing(plot, makeFit('recovery'))
    expect(shade!.to).toBe(plot.x.max)
    expect(shade!.from).toBeGreaterThan(plot.x.min)
  })

  it('has residuals near zero for readings that are exactly its model, in millimetres', () => {
    const { residuals } = fitDrawing(makePlot(), makeFit('theis', { readingsPerCycle: null }))
    expect(residuals.unit).toBe('mm')
    expect(residuals.inside.length).toBe(60)
    expect(Math.max(...residuals.inside.map(([, y]) => Math.abs(y)))).toBeLessThan(1e-3)
  })

  it('predicts recovery on the linear plot from what was fitted while pumping', () => {
    const { fitted } = fitDrawing(makePlot({ kind: 'linear' }), makeFit('theis'))
    expect(fitted[0]!.at(-1)![0]).toBeGreaterThan(1_440)
    expect(fitted[0]!.at(-1)![1]).toBeLessThan(0.2)
  })

  it('tells the window of readings from the others', () => {
    const drawing = fitDrawing(makePlot(), makeFit('cooper-jacob', { window: { from_s: 6_000, to_s: 60_000 } }))
    expect(drawing.span).toEqual([100, 1_000])
    expect(drawing.inside[0]!.every(([x]) => x >= 100 && x <= 1_000)).toBe(true)
    expect(drawing.inside[0]!.length).toBeLessThan(60)
  })
})

describe('The plot against distance', () => {
  const inputs = makeInputs({
    series: [20, 60, 180].map((distance_m, i) =>
      makeTheisSeries(truth, { wellId: `o${i}`, label: `OB-${i}`, distance_m, elapsed_s: logSpaced(80, 60, 86_400) }),
    ),
  })
  const request = {
    inputs,
    wellIds: ['o0', 'o1', 'o2'],
    units: { time: 'min', length: 'm' },
    direction: 'down' as const,
  }

  it('compares the wells at the last common moment, or at one that is asked for', () => {
    expect(distancePlot({ ...request, time_s: null }).time_s).toBe(86_400)
    const early = distancePlot({ ...request, time_s: 600 })
    expect(early.wells.map(({ points }) => points[0]!.x)).toEqual([20, 60, 180])
    expect(early.wells[0]!.points[0]!.y).toBeLessThan(distancePlot({ ...request, time_s: null }).wells[0]!.points[0]!.y)
  })

  it('knows the times that all wells have in common, and none where they never overlap', () => {
    expect(distancePlot({ ...request, time_s: null }).common).toEqual({ from_s: 60, to_s: 86_400 })
    const late = { ...inputs.series[1]!, elapsed_s: inputs.series[1]!.elapsed_s.map((time) => time + 86_400) }
    const apart = { ...inputs, series: [inputs.series[0]!, late] }
    expect(distancePlot({ ...request, inputs: apart, time_s: null }).common).toBeNull()
  })

  it('draws the line, where it meets zero, and how far it holds', () => {
    const plot = distancePlot({ ...request, time_s: null })
    const fit = makeFit('distance-drawdown', { wellIds: request.wellIds }, inputs)
    const drawing = distanceDrawing(plot, fit)!
    expect(drawing.marks!.zero?.at[0] ?? fit.result.extras.zero_m).toBeCloseTo(fit.result.extras.zero_m!, 6)
    // r where u = 0.05: √(4·T·t·0.05/S).
    const reach = Math.sqrt((4 * fit.result.T!.value * 86_400 * 0.05) / fit.result.S!.value)
    expect(drawing.shade === null || Math.abs(drawing.shade.from - reach) < 1e-6).toBe(true)
    expect(drawing.residuals.inside).toHaveLength(3)
  })

  it('draws nothing of a method that does not compare distances', () => {
    expect(
      distanceDrawing(distancePlot({ ...request, time_s: null }), makeFit('theis', { wellIds: ['o0'] }, inputs)),
    ).toBeNull()
  })
})
