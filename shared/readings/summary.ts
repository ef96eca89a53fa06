import type { LogSummary, ReadingRow, RowIssue } from './model.ts'

const extent = (values: number[]) =>
  values.reduce<[number, number]>(
    ([low, high], value) => [Math.min(low, value), Math.max(high, value)],
    [Infinity, -Infinity],
  )

const orNull = (value: number) => (Number.isFinite(value) ? value : null)

/** Lines that carry no reading by nature, not by fault. */
const isFurniture = (row: ReadingRow) =>
  row.flags.includes('readings/preamble') || row.flags.includes('readings/blank-line')

function countCodes(rows: ReadingRow[], issues: RowIssue[]): LogSummary['counts'] {
  const counts: LogSummary['counts'] = {}
  const codes = [...rows.filter(isFurniture).flatMap((row) => row.flags), ...issues.map((issue) => issue.code)]
  for (const code of codes) counts[code] = (counts[code] ?? 0) + 1
  return counts
}

/** What a log gave, for the line above its table. */
export function summarise(rows: ReadingRow[], issues: RowIssue[], resolution_m: number): LogSummary {
  const taken = rows.filter((row) => row.taken)
  const [first, last] = extent(taken.map((row) => row.elapsed_s ?? NaN))
  const [least, most] = extent(taken.map((row) => row.value_m ?? NaN))
  return {
    lines: rows.length,
    taken: taken.length,
    notTaken: rows.filter((row) => !row.taken && !isFurniture(row)).length,
    first_s: orNull(first),
    last_s: orNull(last),
    min_m: orNull(least),
    max_m: orNull(most),
    resolution_m,
    counts: countCodes(rows, issues),
  }
}
