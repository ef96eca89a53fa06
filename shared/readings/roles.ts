import type { CellKind } from './cells.ts'
import { unitInName } from './header.ts'
import type { ColumnGuess, ColumnRole, DecimalMark, Reason } from './model.ts'
import { readNumber } from './numbers.ts'
import { parseSpan } from './spans.ts'
import { vocabulary } from './vocabulary.ts'

/** A column as the guesses see it. */
export interface Column {
  index: number
  name: string
  kind: CellKind
  cells: string[]
}

type Guess = { role: ColumnRole; reason: Reason }

const byKind: Partial<Record<CellKind, ColumnRole>> = { datetime: 'clock', date: 'date', time: 'clock' }

/** Names compare in lower case, without units in brackets and with "_" as a space. */
const plainName = (name: string) =>
  name
    .toLowerCase()
    .replace(/[([{][^)\]}]*[)\]}]/g, ' ')
    .replace(/[_\s]+/g, ' ')
    .trim()

function fromName({ name, kind }: Column): Guess | null {
  const plain = plainName(name)
  if (plain === '') return null
  const whole = name.toLowerCase()
  const entry = vocabulary.find(
    ({ kinds, words, withUnit }) => kinds.includes(kind) && (words.test(plain) || withUnit?.test(whole)),
  )
  return entry ? { role: entry.role, reason: { code: 'readings/guess-header', params: { name } } } : null
}

function fromKind({ kind }: Column): Guess | null {
  const role = byKind[kind]
  return role ? { role, reason: { code: 'readings/guess-kind', params: { kind } } } : null
}

/** Times that start at 0:00 without any date beside them count from the start of something. */
function countFromZero(columns: Column[], guesses: (Guess | null)[]): (Guess | null)[] {
  if (guesses.some((guess) => guess?.role === 'date')) return guesses
  const isZero = ({ kind, cells }: Column) => kind === 'time' && parseSpan(cells[0] ?? '', 'h:m:s') === 0
  return guesses.map((guess, i) => {
    const column = columns[i]
    return guess && column && isZero(column) ? withReason('elapsed', 'readings/guess-zero') : guess
  })
}

function numbersOf(column: Column, mark: DecimalMark): number[] {
  return column.cells.flatMap((cell) => {
    const read = readNumber(cell, mark)
    return 'value' in read ? [read.value] : []
  })
}

const rises = (values: number[]) => {
  const ups = values.filter((value, i) => i > 0 && value > (values[i - 1] ?? value)).length
  return values.length > 1 && ups >= 0.9 * (values.length - 1)
}
const counts = (values: number[]) =>
  values.length > 2 && values.every((value, i) => i === 0 || value === (values[i - 1] ?? 0) + 1)

const isValue = (role: ColumnRole) => role === 'depth' || role === 'level' || role === 'drawdown'
const isTime = (role: ColumnRole) => role === 'elapsed' || role === 'clock'

const nothing = (): Guess => ({ role: 'ignored', reason: { code: 'readings/guess-nothing', params: {} } })
const withReason = (role: ColumnRole, code: Reason['code']): Guess => ({ role, reason: { code, params: {} } })

type Change = (column: Column, guesses: (Guess | null)[]) => Guess | null

/** Gives roles to columns of numbers that have none yet, one column after the other. */
function fill(columns: Column[], guesses: (Guess | null)[], change: Change): (Guess | null)[] {
  const filled = [...guesses]
  for (const column of columns)
    if (filled[column.index] === null && column.kind === 'number') filled[column.index] = change(column, filled)
  return filled
}

const has = (guesses: (Guess | null)[], test: (role: ColumnRole) => boolean) =>
  guesses.some((guess) => guess !== null && test(guess.role))

/** Roles from numbers alone: counters are ignored, lengths are water levels, a rising column is time, the last is a level. */
function fillGaps(columns: Column[], guesses: (Guess | null)[], mark: DecimalMark): Guess[] {
  const open = (filled: (Guess | null)[]) => columns.filter(({ index, kind }) => !filled[index] && kind === 'number')
  const changes: Change[] = [
    ({ name }) => (unitInName(name, 'length') ? withReason('depth', 'readings/guess-unit') : null),
    (column, filled) => {
      const spare = has(filled, isTime) || open(filled).length > 2
      return spare && counts(numbersOf(column, mark)) ? withReason('ignored', 'readings/guess-counter') : null
    },
    (column, filled) =>
      !has(filled, isTime) && rises(numbersOf(column, mark)) ? withReason('elapsed', 'readings/guess-rising') : null,
    (_, filled) => (has(filled, isValue) ? null : withReason('depth', 'readings/guess-left-over')),
  ]
  const filled = changes.reduce((before, change) => fill(columns, before, change), guesses)
  return filled.map((guess) => guess ?? nothing())
}

function unitOf({ name, kind }: Column, role: ColumnRole): string | null {
  if (isValue(role)) return unitInName(name, 'length')
  if (role !== 'elapsed') return null
  return kind === 'time' ? 'h:m:s' : unitInName(name, 'time')
}

/** What each column seems to be, its unit, and why. */
export function guessColumns(columns: Column[], mark: DecimalMark): ColumnGuess[] {
  const first = countFromZero(
    columns,
    columns.map((column) => fromName(column) ?? fromKind(column)),
  )
  const guesses = fillGaps(columns, first, mark)
  return columns.map((column, i) => {
    const { role, reason } = guesses[i] ?? nothing()
    return { index: column.index, name: column.name, role, unit: unitOf(column, role), reason }
  })
}
