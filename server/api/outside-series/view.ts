import type { OutsideRow, OutsideSummary, OutsideValues } from '#shared/contracts/outside-series.ts'
import { outsideFindings } from '#shared/hydraulics/corrections/outside-check.ts'
import type { LogReading } from '#shared/readings/model.ts'
import { issuesOf, readingRows } from '../reading-series/rows.ts'
import type { FoundSeries, OutsideReadingRow } from './outside-series.repository.ts'

export const summaryOf = ({ row, by }: FoundSeries): OutsideSummary => ({
  id: row.id,
  quantity: row.quantity,
  label: row.label,
  fileName: row.fileName,
  rowCount: row.rowCount,
  takenCount: row.takenCount,
  firstS: row.firstS,
  lastS: row.lastS,
  lowest: row.lowest,
  highest: row.highest,
  findings: outsideFindings(row.quantity, row),
  by: by ?? '',
  createdAt: row.createdAt.toISOString(),
  rowVersion: row.rowVersion,
})

/** A parsed file as rows of the table, as the readings of a well are kept. */
export const outsideRowsOf = (seriesId: number, reading: LogReading): OutsideReadingRow[] =>
  readingRows(seriesId, reading).map(({ valueM, ...row }) => ({ ...row, value: valueM }))

export const rowOf = (row: OutsideReadingRow): OutsideRow => {
  const { seq, fileRow, raw, elapsedS, value, taken } = row
  return { seq, fileRow, raw, elapsedS, value, taken, issues: issuesOf(row) }
}

/** More points than a screen can show apart only cost time. */
const MOST_DRAWN = 2_000

export function drawnOf(taken: readonly { elapsedS: number; value: number }[]): OutsideValues {
  const stride = Math.ceil(taken.length / MOST_DRAWN)
  const drawn = taken.filter((_, i) => i % stride === 0)
  return { elapsed_s: drawn.map(({ elapsedS }) => elapsedS), value: drawn.map(({ value }) => value) }
}
