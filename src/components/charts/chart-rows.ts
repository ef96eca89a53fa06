import { unparse } from 'papaparse'
import { modelled, type Fit } from '#shared/charts/fit-band.ts'
import type { TestPlot } from '#shared/charts/test-chart.ts'
import { unitById } from '#shared/quantities/units.ts'
import type { NumbersColumn, NumbersRow } from './numbers-table.ts'

export interface ChartRow {
  well: string
  x: number
  measured: number
  fitted: number | null
  residual: number | null
  leftOut: boolean
}

/** The numbers of a chart, in its units, every reading that is drawn. */
export function chartRows({ wells, units, kind }: TestPlot, fit: Fit | null): ChartRow[] {
  const length_m = unitById(units.length).toSI
  return wells.flatMap(({ wellId, label, points, leftOut }) => {
    const all = [
      ...points.map((point) => ({ ...point, out: false })),
      ...leftOut.map((point) => ({ ...point, out: true })),
    ]
    const times = all.map(({ elapsed_s }) => elapsed_s)
    const isFitted = fit !== null && kind !== 'distance' && fit.options.wellIds.includes(wellId)
    const curve = isFitted ? modelled(fit, wellId, times) : times.map(() => null)
    return all
      .map(({ x, y, out }, i): ChartRow => {
        const value = curve[i]
        const fitted = value == null ? null : value / length_m
        return { well: label, x, measured: y, fitted, residual: fitted === null ? null : y - fitted, leftOut: out }
      })
      .sort((a, b) => a.x - b.x)
  })
}

export function chartHeads({ x, y, units }: TestPlot) {
  const length = unitById(units.length).label
  return { well: 'well', x: x.title, measured: y.title, fitted: `fitted, ${length}`, residual: `residual, ${length}` }
}

/** The same for the page. */
export function chartTable(plot: TestPlot, fit: Fit | null): { columns: NumbersColumn[]; rows: NumbersRow[] } {
  const { well, ...numbers } = chartHeads(plot)
  return {
    columns: [
      { key: 'well', title: well, numeric: false },
      ...Object.entries(numbers).map(([key, title]) => ({ key, title, numeric: true })),
      { key: 'state', title: 'state', numeric: false },
    ],
    rows: chartRows(plot, fit).map(({ leftOut, ...row }) => ({
      ...row,
      state: leftOut ? 'left out' : 'used or outside the window',
    })),
  }
}

/** As CSV with units in the header; a well called "=1+1" stays text in a spreadsheet. */
export function chartCsv(plot: TestPlot, fit: Fit | null): string {
  const heads = chartHeads(plot)
  const data = chartRows(plot, fit).map((row) => [
    row.well,
    row.x,
    row.measured,
    row.fitted ?? '',
    row.residual ?? '',
    row.leftOut ? 'yes' : 'no',
  ])
  const fields = [heads.well, heads.x, heads.measured, heads.fitted, heads.residual, 'left out']
  return unparse({ fields, data }, { escapeFormulae: true, newline: '\r\n' })
}
