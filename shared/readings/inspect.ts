import { splitDateTime } from './clock.ts'
import { isDateLike, possibleOrders } from './dates.ts'
import { draftMapping, openQuestions } from './draft.ts'
import { headerOf } from './header.ts'
import { columnKinds, firstReading, guessDecimalMark, guessDelimiter, sampleOf } from './layout.ts'
import { PREVIEW_ROWS } from './limits.ts'
import { cellsOf, linesOf, refuseText } from './lines.ts'
import type { ColumnGuess, LogInspection, Refusal } from './model.ts'
import { guessColumns, type Column } from './roles.ts'

/** Readings looked at for roles; dates are looked at in the whole column. */
const SAMPLE_READINGS = 500

const noNumbers = (lines: number): Refusal => ({ ok: false, code: 'readings/no-numeric-column', params: { lines } })

/** Every date of the log, as it is written. */
function datesIn(readings: string[][], columns: ColumnGuess[]): string[] {
  const column = columns.find(({ role }) => role === 'date') ?? columns.find(({ role }) => role === 'clock')
  if (!column) return []
  return readings.flatMap((cells) => {
    const { date } = splitDateTime(cells[column.index] ?? '')
    return date !== null && (isDateLike(date) || /^\d{8}$/.test(date)) ? [date] : []
  })
}

function columnsOf(readings: string[][], names: string[], kinds: ReturnType<typeof columnKinds>): Column[] {
  const sample = readings.slice(0, SAMPLE_READINGS)
  return kinds.map((kind, index) => ({
    index,
    kind,
    name: names[index] ?? '',
    cells: sample.map((cells) => cells[index] ?? '').filter((cell) => cell !== ''),
  }))
}

/**
 * Looks at a log and says how it seems to be written: delimiter, decimal mark, header, the role and unit of each column
 * with the reason, the date orders that fit, the first rows, a draft of the mapping, and what a person must still say.
 * Nothing is decided here that `readLog` would take without asking.
 */
export function inspectLog(text: string): LogInspection | Refusal {
  const refusal = refuseText(text)
  if (refusal) return refusal
  const lines = linesOf(text)
  const delimiter = guessDelimiter(sampleOf(lines))
  const rows = cellsOf(lines, delimiter)
  const kinds = columnKinds(cellsOf(sampleOf(lines), delimiter))
  const first = firstReading(rows, kinds)
  if (first < 0 || !kinds.includes('number')) return noNumbers(lines.length)

  const readings = rows.slice(first)
  const header = headerOf(rows, first, kinds.length)
  const columns = columnsOf(readings, header.names, kinds)
  const numbers = columns.filter(({ kind }) => kind === 'number').flatMap(({ cells }) => cells)
  const { mark, doubtful } = guessDecimalMark(numbers)
  const guesses = guessColumns(columns, mark)
  const dates = datesIn(readings, guesses)
  const seen = {
    delimiter,
    decimalMark: mark,
    firstDataRow: first + 1,
    columns: guesses,
    dateOrders: possibleOrders(dates),
  }
  const draft = draftMapping(seen)
  return {
    ok: true,
    ...seen,
    headerRow: header.line === null ? null : header.line + 1,
    lines: lines.length,
    preview: rows.slice(0, PREVIEW_ROWS).map((cells, i) => ({ row: i + 1, cells })),
    draft,
    questions: openQuestions(draft, { ...seen, markDoubtful: doubtful, dateExample: dates[0] ?? '' }),
  }
}
