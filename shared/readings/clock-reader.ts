import { parseTimeOfDay, splitDateTime } from './clock.ts'
import type { Params, ReadingFlag, RowErrorCode } from './codes.ts'
import { DAY_MS, parseDate } from './dates.ts'
import type { LocalTime } from './local-time.ts'
import type { DateOrder, RowField } from './model.ts'

export type ClockReading =
  | { ok: true; instantMs: number; flags: { code: ReadingFlag; params: Params }[] }
  | { ok: false; code: RowErrorCode; field: RowField; params: Params }

export interface ClockOptions {
  local: LocalTime
  zone: string
  startMs: number
  dateOrder: DateOrder
  /** Whether the log has dates; without them days are counted on from the start's. */
  dated: boolean
}

const HOUR_MS = 3_600_000
/** Times may step back by this much within a day: rows out of order, or the hour that autumn repeats. */
const STEP_BACK_MS = HOUR_MS

const failure = (code: RowErrorCode, field: RowField, params: Params): ClockReading => ({
  ok: false,
  code,
  field,
  params,
})

/** Counts days where a log gives the time alone. */
function dayCounter(startLocalMs: number): (timeMs: number) => { dayMs: number; passed: boolean } {
  let last: { dayMs: number; timeMs: number } | null = null
  const nearestDay = (timeMs: number) => Math.round((startLocalMs - timeMs) / DAY_MS) * DAY_MS
  return (timeMs) => {
    const step = last === null ? 0 : timeMs - last.timeMs
    const days = step < -STEP_BACK_MS ? 1 : step > DAY_MS - STEP_BACK_MS ? -1 : 0
    const dayMs = last === null ? nearestDay(timeMs) : last.dayMs + days * DAY_MS
    last = { dayMs, timeMs }
    return { dayMs, passed: days === 1 }
  }
}

/**
 * Reads the clock times of a log from its first row to its last; it remembers the row before,
 * because a time without date, or in the hour that autumn repeats, means what follows from it.
 */
export function clockReader(options: ClockOptions): (timeText: string, dateText: string | null) => ClockReading {
  const { local, zone, dateOrder, dated } = options
  const countDay = dayCounter(local.localOf(options.startMs))
  const days = new Map<string, number | null>()
  let before = -Infinity

  const dayOf = (text: string) => {
    let day = days.get(text)
    if (day === undefined) days.set(text, (day = parseDate(text, dateOrder)))
    return day
  }

  const resolve = (localMs: number, text: string, passed: boolean): ClockReading => {
    const [first, second] = local.instantsOf(localMs)
    if (first === undefined) return failure('readings/hour-nonexistent', 'time', { text, zone })
    const instantMs = second !== undefined && first <= before && second > before ? second : first
    before = instantMs
    const flags: { code: ReadingFlag; params: Params }[] = []
    if (second !== undefined) flags.push({ code: 'readings/ambiguous-hour', params: { text, zone } })
    if (passed) flags.push({ code: 'readings/next-day', params: { text } })
    return { ok: true, instantMs, flags }
  }

  return (timeText, dateText) => {
    const parts = splitDateTime(timeText)
    const date = dateText ?? (dated ? parts.date : null)
    const time = dateText === null ? (parts.time ?? (dated && parts.date ? '0:00' : timeText)) : timeText
    if (time === '') return failure('readings/time-missing', 'time', {})
    const clock = parseTimeOfDay(time)
    if (!clock) return failure('readings/time-unreadable', 'time', { text: timeText })
    if (dated && !date) return failure('readings/date-missing', 'date', { text: timeText })
    const counted = dated ? null : countDay(clock.ms)
    const dayMs = counted ? counted.dayMs : dayOf(date ?? '')
    if (dayMs === null) return failure('readings/date-unreadable', 'date', { text: date ?? '', order: dateOrder })
    const localMs = dayMs + clock.ms
    if (clock.offset === null)
      return resolve(localMs, dateText ? `${date} ${time}` : timeText, counted?.passed ?? false)
    before = localMs - clock.offset * 60_000
    return { ok: true, instantMs: before, flags: [] }
  }
}
