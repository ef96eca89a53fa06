import { unparse } from 'papaparse'
import type { SimplePlot, SimplePoint } from '#shared/charts/simple-plot.ts'
import type { NumbersColumn, NumbersRow } from './numbers-table.ts'

export interface SimpleRow {
  label: string
  x: number
  y: number
  fitted: number | null
  state: string
}

const states: Record<SimplePoint['state'], string> = { used: 'used', outside: 'not used', 'left-out': 'left out' }

/** The numbers of a plot, in its units, every point that is drawn; of a line without points, the line. */
export function simpleRows({ dots, lines }: SimplePlot): SimpleRow[] {
  const points = dots.flatMap(({ label, points: each }) =>
    each.map(({ x, y, fitted, state, name }) => ({ label: name ?? label, x, y, fitted, state: states[state] })),
  )
  if (points.length > 1) return points
  const drawn = lines.flatMap(({ label, points: each }) =>
    each.map(([x, y]) => ({ label, x, y, fitted: y, state: 'calculated' })),
  )
  return [...points, ...drawn]
}

export const simpleHeads = ({ x, y }: SimplePlot) => ({
  label: 'of',
  x: x.title,
  y: y.title,
  fitted: 'fitted',
  state: 'state',
})

/** The same for the page. */
export function simpleTable(plot: SimplePlot): { columns: NumbersColumn[]; rows: NumbersRow[] } {
  const columns = Object.entries(simpleHeads(plot)).map(([key, title]) => ({
    key,
    title,
    numeric: key !== 'label' && key !== 'state',
  }))
  return { columns, rows: simpleRows(plot).map((row) => ({ ...row, x: plot.x.years ? String(row.x) : row.x })) }
}

/** As CSV with units in the header; a name like "=1+1" stays text in a spreadsheet. */
export function simpleCsv(plot: SimplePlot): string {
  const heads = simpleHeads(plot)
  const data = simpleRows(plot).map(({ label, x, y, fitted, state }) => [label, x, y, fitted ?? '', state])
  return unparse({ fields: Object.values(heads), data }, { escapeFormulae: true, newline: '\r\n' })
}
