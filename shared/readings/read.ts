import { DateTime } from 'luxon'
import { unitById } from '#shared/quantities/units.ts'
import { flagCodes, type ReadingFlag } from './codes.ts'
import { setUpClock } from './clock-set-up.ts'
import { finestStep, flagRows } from './flag-rows.ts'
import { sentinels } from './flag-series.ts'
import { cellsOf, linesOf, refuseText } from './lines.ts'
import type { LogContext, LogMapping, LogReading, ReadingRow, Refusal, RowIssue } from './model.ts'
import { readTime, readValue, type Finding } from './read-row.ts'
import { summarise } from './summary.ts'

const refuse = (code: Refusal['code'], params: Refusal['params']): Refusal => ({ ok: false, code, params })

const columnsOf = ({ time, value }: LogMapping<string>) => [
  time.column,
  value.column,
  ...(time.kind === 'clock' && time.dateColumn !== null ? [time.dateColumn] : []),
]

type Clock = Exclude<ReturnType<typeof setUpClock>, Refusal>

/** What one line says; a line that lacks the mapped columns altogether is told so once, not once per field. */
function findings(cells: string[], mapping: LogMapping<string>, clock: Clock | null, startMs: number) {
  const needed = Math.max(...columnsOf(mapping)) + 1
  if (cells.length < needed) {
    const short: Finding = { code: 'readings/too-few-columns', field: 'row', params: { found: cells.length, needed } }
    return { elapsed_s: null, value_m: null, found: [short] }
  }
  const time = readTime(cells, mapping, clock, startMs)
  const value = readValue(cells[mapping.value.column] ?? '', mapping.decimalMark, unitById(mapping.value.unit).toSI)
  return { elapsed_s: time.value, value_m: value.value, found: [...time.findings, ...value.findings] }
}

const isFlag = (code: RowIssue['code']): code is ReadingFlag => (flagCodes as readonly string[]).includes(code)

interface Prepared {
  lines: string[]
  cells: string[][]
  startMs: number
  clock: Clock | null
}

/** A line that carries no reading by nature. */
const furniture = (row: number, raw: string, flag: ReadingFlag): ReadingRow => ({
  row,
  raw,
  elapsed_s: null,
  value_m: null,
  flags: [flag],
  taken: false,
})

function readRows({ lines, cells, clock, startMs }: Prepared, mapping: LogMapping<string>) {
  const issues: RowIssue[] = []
  const rows = lines.map((raw, i): ReadingRow => {
    const row = i + 1
    if (raw.trim() === '') return furniture(row, raw, 'readings/blank-line')
    if (row < mapping.firstDataRow) return furniture(row, raw, 'readings/preamble')
    const { elapsed_s, value_m, found } = findings(cells[i] ?? [], mapping, clock, startMs)
    for (const { code, field, params } of found) issues.push({ row, code, field, params })
    const flags = found.map(({ code }) => code).filter(isFlag)
    return { row, raw, elapsed_s, value_m, flags, taken: elapsed_s !== null && value_m !== null }
  })
  return { rows, issues }
}

function refuseRows(rows: ReadingRow[], column: number): Refusal | null {
  if (!rows.some((row) => row.value_m !== null))
    return refuse('readings/no-numeric-column', { lines: rows.length, column: column + 1 })
  const taken = rows.filter((row) => row.taken)
  const equal = taken.length > 1 && taken.every((row) => row.elapsed_s === taken[0]?.elapsed_s)
  return equal ? refuse('readings/all-times-equal', { readings: taken.length }) : null
}

/** Splits the text and makes its clock, or says why the file as a whole cannot be read. */
function prepare(text: string, mapping: LogMapping<string>, { start }: LogContext): Prepared | Refusal {
  const instant = DateTime.fromISO(start.instant, { zone: 'utc' })
  if (!instant.isValid) throw new RangeError(`Not an instant: ${start.instant}`)
  const refusal = refuseText(text)
  if (refusal) return refusal
  const lines = linesOf(text)
  const cells = cellsOf(lines, mapping.delimiter)
  const readings = cells.slice(mapping.firstDataRow - 1)
  const missing = columnsOf(mapping).find((column) => !readings.some((row) => row.length > column))
  if (missing !== undefined) return refuse('readings/no-such-column', { column: missing + 1 })
  const startMs = instant.toMillis()
  const clock = mapping.time.kind === 'clock' ? setUpClock(readings, mapping.time, startMs, start.zone) : null
  return clock && 'code' in clock ? clock : { lines, cells, startMs, clock }
}

/**
 * Reads a log by a mapping. Every line of the file is a row with its fate: taken, or not and why; nothing is dropped,
 * reordered or rounded. Times are seconds after the test's start, values SI: metres, or pascals of a pressure.
 * @throws RangeError for a unit that the catalogue lacks or a start that is no instant: both come from code, not from files
 */
export function readLog(text: string, mapping: LogMapping<string>, context: LogContext): LogReading | Refusal {
  const prepared = prepare(text, mapping, context)
  if ('code' in prepared) return prepared
  const { rows, issues } = readRows(prepared, mapping)
  const refused = refuseRows(rows, mapping.value.column)
  if (refused) return refused
  const written = ({ row }: ReadingRow) => prepared.cells[row - 1]?.[mapping.value.column] ?? ''
  const unitToSI = unitById(mapping.value.unit).toSI
  const resolution_m = finestStep(rows, written) * unitToSI
  const sentinels_m = sentinels.map((value) => value * unitToSI)
  const flagged = flagRows(rows, written, { resolution_m, sentinels_m, events_s: context.events_s ?? [0] })
  const all = [...issues, ...flagged].sort((a, b) => a.row - b.row)
  return { ok: true, rows, issues: all, summary: summarise(rows, all, resolution_m) }
}
