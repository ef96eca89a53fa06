import type { ClockReading } from './clock-reader.ts'
import type { Params, ReadingFlag, RowErrorCode } from './codes.ts'
import type { DecimalMark, LogMapping, RowField } from './model.ts'
import { decimalsOf, readNumber, type ReadNumber } from './numbers.ts'
import { readElapsed } from './spans.ts'

export interface Finding {
  code: ReadingFlag | RowErrorCode
  field: RowField
  params: Params
}

/** A field of a row in SI, or null with the reason; a value that was taken may carry findings too. */
export interface FieldReading {
  value: number | null
  findings: Finding[]
}

const fieldCodes = {
  time: {
    missing: 'readings/time-missing',
    unreadable: 'readings/time-unreadable',
    ambiguous: 'readings/time-ambiguous-separator',
  },
  value: {
    missing: 'readings/value-missing',
    unreadable: 'readings/value-unreadable',
    ambiguous: 'readings/value-ambiguous-separator',
  },
} as const

function fromNumber(read: ReadNumber, text: string, field: 'time' | 'value', factor: number): FieldReading {
  if ('value' in read) {
    const findings: Finding[] = read.otherMark ? [{ code: 'readings/other-decimal-mark', field, params: { text } }] : []
    return { value: read.value * factor, findings }
  }
  const readings: Params =
    read.error === 'ambiguous' ? { asDecimal: read.asDecimal, asThousands: read.asThousands } : {}
  return { value: null, findings: [{ code: fieldCodes[field][read.error], field, params: { text, ...readings } }] }
}

/** The value of a row in metres. */
export function readValue(text: string, mark: DecimalMark, unitToSI: number): FieldReading {
  return fromNumber(readNumber(text, mark), text, 'value', unitToSI)
}

/** The smallest step that this text can show, in its unit. */
export const stepOf = (text: string) => 10 ** -decimalsOf(text)

type ReadClock = (timeText: string, dateText: string | null) => ClockReading

/** The time of a row in seconds after the test's start. */
export function readTime(
  cells: string[],
  mapping: LogMapping<string>,
  clock: ReadClock | null,
  startMs: number,
): FieldReading {
  const { time, decimalMark } = mapping
  const text = cells[time.column] ?? ''
  if (time.kind === 'elapsed') {
    const read = fromNumber(readElapsed(text, time.unit, decimalMark), text, 'time', 1)
    return { ...read, value: read.value === null ? null : read.value + time.zero_s }
  }
  const dateText = time.dateColumn === null ? null : (cells[time.dateColumn] ?? '')
  const read = clock?.(text, dateText)
  if (!read) return { value: null, findings: [] }
  if (!read.ok) return { value: null, findings: [read] }
  const findings = read.flags.map(({ code, params }): Finding => ({ code, field: 'time', params }))
  return { value: (read.instantMs - startMs) / 1000, findings }
}
