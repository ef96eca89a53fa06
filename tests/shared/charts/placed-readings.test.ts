import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isInside, nearestTo, placedReadings } from '#shared/charts/placed-readings.ts'
import type { XY } from '#shared/charts/plot-wells.ts'
import { makePlot, makeTestInputs } from './make-plot.ts'

const square: XY[] = [
  [0, 0],
  [10, 0],
  [10, 10],
  [0, 10],
]
/** Off every edge and corner of the outlines, where a point may fall to either side. */
const coordinate = fc.integer({ min: -200, max: 200 }).map((tenths) => tenths / 10 + 0.0137)

describe('Readings that are chosen on a plot', () => {
  it('are all of the wells shown that have a place there, left out or not, with their index in the series', () => {
    const inputs = makeTestInputs()
    inputs.series[0]!.included[3] = false
    const found = placedReadings(makePlot({ inputs }), inputs)
    expect(found).toHaveLength(60)
    for (const { index, elapsed_s } of found) expect(inputs.series[0]!.elapsed_s[index]).toBe(elapsed_s)
    expect(found.filter(({ included }) => !included).map(({ index }) => index)).toEqual([3])
  })

  it('are none below zero on a log–log plot', () => {
    const inputs = makeTestInputs()
    inputs.series[0]!.drawdown_m[4] = -0.01
    const found = placedReadings(makePlot({ inputs, kind: 'log-log' }), inputs)
    expect(found.some(({ index }) => index === 4)).toBe(false)
  })

  it('lie inside a square when both coordinates do', () => {
    fc.assert(
      fc.property(coordinate, coordinate, (x, y) => {
        expect(isInside([x, y], square)).toBe(x >= 0 && x < 10 && y >= 0 && y < 10)
      }),
    )
  })

  it('lie inside an outline whichever way and from wherever it was drawn', () => {
    const star: XY[] = [
      [0, 0],
      [5, 3],
      [10, 0],
      [7, 5],
      [10, 10],
      [5, 7],
      [0, 10],
      [3, 5],
    ]
    fc.assert(
      fc.property(coordinate, coordinate, fc.nat(7), (x, y, turn) => {
        const turned = [...star.slice(turn), ...star.slice(0, turn)]
        expect(isInside([x, y], turned)).toBe(isInside([x, y], star))
        expect(isInside([x, y], [...turned].reverse())).toBe(isInside([x, y], star))
      }),
    )
    expect([isInside([5, 5], star), isInside([5, 1], star), isInside([1, 5], star)]).toEqual([true, false, false])
  })

  it('are the nearest within reach of a click, or none', () => {
    const place = (point: XY) => point
    expect(nearestTo([1, 1], square, place, 5)).toEqual([0, 0])
    expect(nearestTo([5, 5], square, place, 5)).toBeNull()
    expect(nearestTo([0, 0], [], place, 5)).toBeNull()
  })
})
