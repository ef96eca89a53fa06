import { describe, expect, it } from 'vitest'
import { compositeDrawing, compositePlot } from '#shared/charts/composite-plot.ts'
import { plotKinds } from '#shared/charts/plot-kinds.ts'
import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { makeTheisSeries } from '../hydraulics/make-inputs.ts'
import { makeFit, makeTestInputs, truth } from './make-plot.ts'

/** A day of pumping and recovery in wells at these distances, exactly Theis. */
function makeWells(distances: number[]): AnalysisInputs {
  const inputs = makeTestInputs()
  const { elapsed_s, included } = inputs.series[0]!
  const series = distances.map((distance_m, i) =>
    makeTheisSeries(truth, { rates: inputs.rates, elapsed_s, included, distance_m, wellId: `o${i + 1}` }),
  )
  return { ...inputs, series }
}

const inputs = makeWells([20, 50, 200])
const wellIds = ['o1', 'o2', 'o3']
const plotIn = (time: string, length: string) =>
  compositePlot({ inputs, wellIds, options: {}, units: { time, length }, direction: 'down' })
const plot = plotIn('min', 'm')

describe('A composite plot', () => {
  it('puts the readings of all wells of a confined aquifer on one curve', () => {
    const curveOf = (wellId: string) =>
      plot.wells.find((well) => well.wellId === wellId)!.points.map(({ x, y }) => [Math.log(x), y] as const)
    const near = curveOf('o2')
    for (const [x, y] of curveOf('o1')) {
      const right = near.findIndex(([other]) => other >= x)
      if (right < 1) continue
      const [[x0, y0], [x1, y1]] = [near[right - 1]!, near[right]!]
      expect(y).toBeCloseTo(y0 + ((y1 - y0) * (x - x0)) / (x1 - x0), 2)
    }
  })

  it('names its axis with the units of the reader, and keeps places in them', () => {
    expect(plot.x.title).toBe('time since pumping began over distance squared, min/m²')
    const feet = plotIn('h', 'ft')
    expect(feet.x.title).toContain('h/ft²')
    const factor = (1 / 60) * 0.3048 ** 2
    expect(feet.wells[1]!.points[5]!.x / plot.wells[1]!.points[5]!.x).toBeCloseTo(factor, 12)
  })

  it('ends with pumping', () => {
    for (const { points } of plot.wells) expect(Math.max(...points.map(({ elapsed_s }) => elapsed_s))).toBe(86_400)
  })

  it('draws one curve for all wells of a joint fit, and none for wells that were not analysed', () => {
    const joint = compositeDrawing(plot, makeFit('theis', { wellIds }, inputs))
    const second = new Map(joint.fitted[1]!)
    const common = joint.fitted[0]!.filter(([x]) => second.has(x))
    expect(joint.fitted.every((curve) => curve.length > 50)).toBe(true)
    expect(common.length).toBeGreaterThan(50)
    for (const [x, y] of common) expect(y).toBeCloseTo(second.get(x)!, 9)
    const single = compositeDrawing(plot, makeFit('theis', { wellIds: ['o2'] }, inputs))
    expect(single.fitted.map((curve) => curve.length > 0)).toEqual([false, true, false])
    expect(single.inside.map((dots) => dots.length > 0)).toEqual([false, true, false])
  })

  it('is offered where wells stand at two distances or more', () => {
    const fits = plotKinds.find(({ id }) => id === 'composite')!.fits
    const unplaced = makeWells([20, 50])
    unplaced.series[0]!.distance_m = 0
    expect([fits(makeWells([20])), fits(unplaced), fits(makeWells([20, 50]))]).toEqual([false, false, true])
  })
})
