import type { Params, ReadingFlag } from './codes.ts'
import { flagSeries, type FlagOptions } from './flag-series.ts'
import type { ReadingRow, RowIssue } from './model.ts'
import { stepOf } from './read-row.ts'

const valueFlags: ReadingFlag[] = ['readings/sentinel', 'readings/spike']

/** Flags of the series as a whole, written into its rows; a sentinel is no reading and is not taken. */
export function flagRows(rows: ReadingRow[], written: (row: ReadingRow) => string, options: FlagOptions): RowIssue[] {
  const taken = rows.filter((row) => row.taken)
  const times = taken.map((row) => row.elapsed_s ?? NaN)
  const values = taken.map((row) => row.value_m ?? NaN)
  return flagSeries(times, values, options).flatMap(({ index, code, params }): RowIssue[] => {
    const row = taken[index]
    if (!row) return []
    row.flags.push(code)
    if (code === 'readings/sentinel') row.taken = false
    const inFile: Params = { ...params }
    if (code === 'readings/sentinel') inFile.text = written(row)
    if (code === 'readings/duplicate-time') inFile.earlier = taken[Number(params.earlier)]?.row ?? 0
    return [{ row: row.row, code, field: valueFlags.includes(code) ? 'value' : 'time', params: inFile }]
  })
}

/** The finest step that any value taken shows, in the column's unit. */
export function finestStep(rows: ReadingRow[], written: (row: ReadingRow) => string): number {
  return rows.filter((row) => row.taken).reduce((least, row) => Math.min(least, stepOf(written(row))), 1)
}
