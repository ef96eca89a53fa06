import { describe, expect, it } from 'vitest'
import { drawnShare } from '#shared/charts/plot-wells.ts'
import { makeInputs, makeTheisSeries } from '../hydraulics/make-inputs.ts'
import { makePlot, truth } from './make-plot.ts'

describe('The share of readings that a plot draws', () => {
  it('is told where they are not all', () => {
    const elapsed_s = Array.from({ length: 20_000 }, (_, i) => 5 * (i + 1))
    const series = makeTheisSeries(truth, { elapsed_s, included: elapsed_s.map(() => true) })
    const { wells } = makePlot({ inputs: makeInputs({ series: [series] }) })
    expect(drawnShare(wells)).toEqual({ drawn: wells[0]!.points.length, of: 20_000 })
  })

  it('is not worth a word where all are drawn', () => {
    expect(drawnShare(makePlot().wells)).toBeNull()
  })
})
