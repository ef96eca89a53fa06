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
  const entry = vocabulary.find(({ kinds, words }) => kinds.includes(kind) && words.test(plain))
  return entry ? { role: entry.role, reason: { code: 'readings/guess-header', params: { name } } } : null
}

function fromKind({ kind, cells }: Column): Guess | null {
  const role = byKind[kind]
  if (!role) return null
  const startsAtZero = kind === 'time' && parseSpan(cells[0] ?? '', 'h:m:s') === 0
  return {
    role: startsAtZero ? 'elapsed' : role,
    reason: { code: 'readings/guess-kind', params: { kind } },
  }
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

/** Roles from numbers alone: a rising column is time when there is no other, a counter is ignored, a value column remains. */
function fillGaps(columns: Column[], guesses: (Guess | null)[], mark: DecimalMark): Guess[] {
  const filled = [...guesses]
  const has = (test: (role: ColumnRole) => boolean) => filled.some((guess) => guess && test(guess.role))
  const open = () => columns.filter(({ index, kind }) => filled[index] === null && kind === 'number')
  if (has(isTime) || open().length > 2) {
    for (const column of open())
      if (counts(numbersOf(column, mark)) && open().length > 1)
        filled[column.index] = withReason('ignored', 'readings/guess-counter')
  }
  if (!has(isTime)) {
    const rising = open().find((column) => rises(numbersOf(column, mark)))
    if (rising) filled[rising.index] = withReason('elapsed', 'readings/guess-rising')
  }
  if (!has(isValue)) {
    const [rest] = open()
    if (rest) filled[rest.index] = withReason('depth', 'readings/guess-left-over')
  }
  return filled.map((guess) => guess ?? nothing())
}

function unitOf({ name, kind }: Column, role: ColumnRole): string | null {
  if (isValue(role)) return unitInName(name, 'length')
  if (role !== 'elapsed') return null
  return kind === 'time' ? 'h:m:s' : unitInName(name, 'time')
}

/** What each column seems to be, its unit, and why. */
export function guessColumns(columns: Column[], mark: DecimalMark): ColumnGuess[] {
  const first = columns.map((column) => fromName(column) ?? fromKind(column))
  const guesses = fillGaps(columns, first, mark)
  return columns.map((column, i) => {
    const { role, reason } = guesses[i] ?? nothing()
    return { index: column.index, name: column.name, role, unit: unitOf(column, role), reason }
  })
}
