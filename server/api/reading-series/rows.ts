import type { ReadingRow } from '#shared/contracts/reading-series.ts'
import type { LogReading, RowIssue } from '#shared/readings/model.ts'
import type { readings } from '../../db/schema/index.ts'

type StoredRow = typeof readings.$inferSelect

/** Longest raw line that is kept in the row itself; the file keeps all of it. */
const mostRaw = 1_000
const mostFlags = 300

/** A character of two halves is not cut between them. */
const beginning = (line: string) => line.slice(0, mostRaw).replace(/[\uD800-\uDBFF]$/, '')

function issuesByRow(issues: RowIssue[]): Map<number, RowIssue[]> {
  const map = new Map<number, RowIssue[]>()
  for (const issue of issues) map.set(issue.row, [...(map.get(issue.row) ?? []), issue])
  return map
}

/** A parsed log as rows of the table `readings`. */
export function readingRows(seriesId: number, { rows, issues }: LogReading): StoredRow[] {
  const found = issuesByRow(issues)
  return rows.map((row, seq) => ({
    seriesId,
    seq,
    fileRow: row.row,
    raw: beginning(row.raw),
    elapsedS: row.elapsed_s,
    valueM: row.value_m,
    taken: row.taken,
    flags: row.flags.join(',').slice(0, mostFlags),
    issues: found.get(row.row)?.map(({ code, field, params }) => ({ code, field, params })) ?? null,
  }))
}

/** Lines that carry no reading by nature have a flag and no issue; a reader asks why all the same. */
export const issuesOf = ({ issues, flags }: Pick<StoredRow, 'issues' | 'flags'>): ReadingRow['issues'] =>
  issues ??
  flags
    .split(',')
    .filter(Boolean)
    .map((code) => ({ code, field: 'row', params: {} }))

export function rowView(row: StoredRow, decision: ReadingRow['decision']): ReadingRow {
  const { seq, fileRow, raw, elapsedS, valueM, taken } = row
  const included = decision === null ? taken : decision.action === 'take' && elapsedS !== null && valueM !== null
  return { seq, fileRow, raw, elapsedS, valueM, taken, included, issues: issuesOf(row), decision }
}
