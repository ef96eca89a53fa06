import { describe, expect, it } from 'vitest'
import { chartCsv, chartRows } from '../../../../src/components/charts/chart-rows.ts'
import { makeFit, makePlot, makeTestInputs } from '../../../shared/charts/make-plot.ts'

describe('A chart as a table', () => {
  it('has a row for every reading, with what was fitted and what is left', () => {
    const inputs = makeTestInputs({ noise: 0.004 })
    inputs.series[0]!.included[20] = false
    const rows = chartRows(makePlot({ inputs }), makeFit('theis', {}, inputs))
    expect(rows).toHaveLength(60)
    expect(rows.filter(({ leftOut }) => leftOut)).toHaveLength(1)
    for (const { measured, fitted, residual } of rows) expect(residual).toBeCloseTo(measured - fitted!, 12)
    expect(rows.map(({ x }) => x)).toEqual([...rows.map(({ x }) => x)].sort((a, b) => a - b))
  })

  it('has no fitted values without an analysis', () => {
    expect(chartRows(makePlot(), null).every(({ fitted }) => fitted === null)).toBe(true)
  })

  it('carries units in the header and keeps a formula in a well code as text', () => {
    const inputs = makeTestInputs()
    inputs.series[0]!.label = '=HYPERLINK("http://example.org")'
    const [head, first] = chartCsv(makePlot({ inputs }), null).split('\r\n')
    expect(head).toBe('well,"time since pumping began, min","drawdown, m","fitted, m","residual, m",left out')
    expect(first).toMatch(/^"'=HYPERLINK/)
  })
})
