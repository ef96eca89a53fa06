import type {
  ColumnGuess,
  ColumnRole,
  ElapsedUnit,
  LogDraft,
  LogInspection,
  LogMapping,
  Quantity,
  Question,
} from './model.ts'

type Seen = Pick<LogInspection, 'delimiter' | 'decimalMark' | 'firstDataRow' | 'columns' | 'dateOrders'>

const elapsedUnits: ElapsedUnit[] = ['s', 'min', 'h', 'd', 'h:m:s', 'm:s']
const quantities: Quantity[] = ['depth', 'level', 'drawdown']

const withRole = (columns: ColumnGuess[], ...roles: ColumnRole[]) =>
  columns.find((column) => roles.includes(column.role))

/** Dated clock times first: the zero of a logger's elapsed time is its own start, not the pump's. */
function draftTime({ columns, dateOrders }: Seen): LogDraft['time'] {
  const [clock, date, elapsed] = [withRole(columns, 'clock'), withRole(columns, 'date'), withRole(columns, 'elapsed')]
  const dated = dateOrders.length > 0
  if (elapsed && !(clock && dated)) {
    const unit = elapsedUnits.find((known) => known === elapsed.unit) ?? null
    return { kind: 'elapsed', column: elapsed.index, unit, zero_s: 0 }
  }
  const column = clock ?? date
  if (!column) return null
  const dateColumn = clock && date ? date.index : null
  const dateOrder = dateOrders.length === 1 ? (dateOrders[0] ?? null) : null
  return { kind: 'clock', column: column.index, dateColumn, dateOrder, zone: null }
}

function draftValue({ columns }: Seen): LogDraft['value'] {
  const column = withRole(columns, ...quantities)
  if (!column) return null
  const told = column.reason.code === 'readings/guess-header'
  const quantity = quantities.find((known) => known === column.role) ?? null
  return { column: column.index, quantity: told ? quantity : null, unit: column.unit }
}

/** The mapping that the guesses suggest, with null for what a person must say. */
export function draftMapping(seen: Seen): LogDraft {
  const { delimiter, decimalMark, firstDataRow } = seen
  return { delimiter, decimalMark, firstDataRow, time: draftTime(seen), value: draftValue(seen) }
}

/** Whether nothing is left to ask, so that the draft can be read. */
export function isComplete(draft: LogDraft): draft is LogMapping {
  const timeKnown = draft.time !== null && (draft.time.kind === 'clock' || draft.time.unit !== null)
  return timeKnown && draft.value !== null && draft.value.quantity !== null && draft.value.unit !== null
}

/** What the draft leaves open. */
export function openQuestions(
  draft: LogDraft,
  seen: Seen & { markDoubtful: boolean; dateExample: string },
): Question[] {
  const { time, value } = draft
  const name = (index: number) => seen.columns[index]?.name ?? ''
  const asks: [boolean, Question][] = [
    [seen.markDoubtful, { code: 'readings/ask-decimal-mark', params: {} }],
    [time === null, { code: 'readings/ask-time-column', params: {} }],
    [
      time?.kind === 'elapsed' && time.unit === null,
      { code: 'readings/ask-time-unit', params: { column: (time?.column ?? 0) + 1, name: name(time?.column ?? 0) } },
    ],
    [
      time?.kind === 'clock' && seen.dateOrders.length > 1,
      { code: 'readings/ask-date-order', params: { text: seen.dateExample } },
    ],
    [value === null, { code: 'readings/ask-value-column', params: {} }],
    [
      value?.quantity === null,
      { code: 'readings/ask-quantity', params: { column: (value?.column ?? 0) + 1, name: name(value?.column ?? 0) } },
    ],
    [
      value?.unit === null,
      { code: 'readings/ask-value-unit', params: { column: (value?.column ?? 0) + 1, name: name(value?.column ?? 0) } },
    ],
  ]
  return asks.filter(([open]) => open).map(([, question]) => question)
}
