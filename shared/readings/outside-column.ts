import { isClean, kindOf } from './cells.ts'
import { unitInName } from './header.ts'
import type { LogInspection } from './model.ts'

/** Words in names of columns, in the languages field logs come in. */
const words = {
  pressure: /press|baro|druck|presi|atmos|\bqfe\b/i,
  length: /stage|level|gauge|tide|height|elev|pegel|wasserstand|niveau|nivel|\bcot[ae]\b/i,
}

/** The column of a file that a series from outside seems to stand in, and its unit; null where the file does not say. */
export function outsideColumn(
  { columns, preview, firstDataRow }: Pick<LogInspection, 'columns' | 'preview' | 'firstDataRow'>,
  dimension: 'pressure' | 'length',
): { column: number | null; unit: string | null } {
  const rows = preview.filter(({ row }) => row >= firstDataRow)
  const isNumeric = (index: number) =>
    rows.length > 0 && rows.every(({ cells }) => cells[index] === '' || isClean(kindOf(cells[index] ?? '')))
  const isTime = (role: string) => role === 'elapsed' || role === 'clock' || role === 'date'
  const open = columns.filter(({ index, role }) => !isTime(role) && isNumeric(index))
  const found =
    open.find(({ name }) => words[dimension].test(name)) ??
    open.find(({ name }) => unitInName(name, dimension) !== null) ??
    (open.length === 1 ? open[0] : undefined)
  return { column: found?.index ?? null, unit: found ? unitInName(found.name, dimension) : null }
}
