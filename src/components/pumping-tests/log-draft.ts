import { logMapping } from '#shared/contracts/reading-series.ts'
import type { ReadingCode } from '#shared/readings/codes.ts'
import type {
  DateOrder,
  DecimalMark,
  Delimiter,
  ElapsedUnit,
  LogInspection,
  LogMapping,
  Quantity,
  Question,
} from '#shared/readings/model.ts'

/** How a log is to be read, as a form: what nobody has said yet is null. */
export interface LogForm {
  delimiter: Delimiter
  decimalMark: DecimalMark | null
  firstDataRow: number | null
  timeKind: 'elapsed' | 'clock'
  timeColumn: number | null
  timeUnit: ElapsedUnit | null
  zero_s: number | null
  dateColumn: number | null
  dateOrder: DateOrder | null
  zone: string | null
  valueColumn: number | null
  quantity: Quantity | null
  valueUnit: string | null
}

const asks = (questions: readonly Question[], code: ReadingCode) => questions.some((question) => question.code === code)

/** The proposal, without what the log leaves open. */
export function formOf({ draft, questions }: LogInspection): LogForm {
  const { time, value } = draft
  const elapsed = time?.kind === 'elapsed' ? time : null
  const clock = time?.kind === 'clock' ? time : null
  return {
    delimiter: draft.delimiter,
    decimalMark: asks(questions, 'readings/ask-decimal-mark') ? null : draft.decimalMark,
    firstDataRow: draft.firstDataRow,
    timeKind: clock ? 'clock' : 'elapsed',
    timeColumn: time?.column ?? null,
    timeUnit: elapsed?.unit ?? null,
    zero_s: elapsed?.zero_s ?? 0,
    dateColumn: clock?.dateColumn ?? null,
    dateOrder: clock?.dateOrder ?? null,
    zone: clock?.zone ?? null,
    valueColumn: value?.column ?? null,
    quantity: value?.quantity ?? null,
    valueUnit: value?.unit ?? null,
  }
}

/** How the times are to be read. */
export function timeOf(form: LogForm) {
  const { timeKind, timeColumn: column, timeUnit: unit, zero_s, dateColumn, dateOrder, zone } = form
  return timeKind === 'elapsed'
    ? { kind: timeKind, column, unit, zero_s }
    : { kind: timeKind, column, dateColumn, dateOrder, zone }
}

/** The finished mapping; null while a question is open. */
export function mappingOf(form: LogForm, dateOrders: readonly DateOrder[]): LogMapping | null {
  const { delimiter, decimalMark, firstDataRow, valueColumn: column, quantity, valueUnit: unit } = form
  if (form.timeKind === 'clock' && dateOrders.length > 1 && form.dateOrder === null) return null
  const value = { column, quantity, unit }
  const parsed = logMapping.safeParse({ delimiter, decimalMark, firstDataRow, time: timeOf(form), value })
  return parsed.success ? parsed.data : null
}

/** Which field answers a question. */
export const fieldOfQuestion: Partial<Record<ReadingCode, keyof LogForm>> = {
  'readings/ask-time-column': 'timeColumn',
  'readings/ask-time-unit': 'timeUnit',
  'readings/ask-date-order': 'dateOrder',
  'readings/ask-value-column': 'valueColumn',
  'readings/ask-quantity': 'quantity',
  'readings/ask-value-unit': 'valueUnit',
  'readings/ask-decimal-mark': 'decimalMark',
}
