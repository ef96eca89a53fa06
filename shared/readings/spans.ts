import { toSI } from '#shared/quantities/units.ts'
import type { DecimalMark, ElapsedUnit } from './model.ts'
import { readNumber, type ReadNumber } from './numbers.ts'

/** "26:15:00", "1.02:03:04", "1 02:03:04", "-0:05", "12:30,5": days, then two or three numbers. */
const SPAN = /^([-+−]?)(?:(\d+)[.\s])?(\d+):(\d{1,2})(?::(\d{1,2}))?(?:[.,](\d{1,9}))?$/

/** A clock-like span in seconds; with two numbers they are hours and minutes, or minutes and seconds when `unit` is "m:s". */
export function parseSpan(text: string, unit: 'h:m:s' | 'm:s'): number | null {
  const parts = SPAN.exec(text)
  if (!parts) return null
  const [, sign, days = '0', a, b, c, fraction = '0'] = parts
  const [first, second] = [Number(a), Number(b)]
  if (second > 59 || Number(c ?? 0) > 59) return null
  const minutesFirst = unit === 'm:s' && c === undefined
  const whole = minutesFirst ? first * 60 + second : first * 3600 + second * 60 + Number(c ?? 0)
  const seconds = Number(days) * 86_400 + whole + Number(`0.${fraction}`)
  return sign === '-' || sign === '−' ? -seconds : seconds
}

const isSpanUnit = (unit: ElapsedUnit): unit is 'h:m:s' | 'm:s' => unit.includes(':')

/** An elapsed time in seconds. */
export function readElapsed(text: string, unit: ElapsedUnit, mark: DecimalMark): ReadNumber {
  if (!isSpanUnit(unit)) {
    const read = readNumber(text, mark)
    return 'value' in read ? { value: toSI(read.value, unit), otherMark: read.otherMark } : read
  }
  if (text === '') return { error: 'missing' }
  const seconds = parseSpan(text, unit)
  return seconds === null ? { error: 'unreadable' } : { value: seconds, otherMark: false }
}
