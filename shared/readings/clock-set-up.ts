import { clockReader, type ClockReading } from './clock-reader.ts'
import { splitDateTime } from './clock.ts'
import { parseDate, possibleOrders } from './dates.ts'
import { isZone, localTime } from './local-time.ts'
import type { ClockMapping, Refusal } from './model.ts'

type ReadClock = (timeText: string, dateText: string | null) => ClockReading

const refuse = (code: Refusal['code'], params: Refusal['params']): Refusal => ({ ok: false, code, params })

const isoDay = (ms: number | null) => (ms === null ? '' : new Date(ms).toISOString().slice(0, 10))

function datesOf(rows: string[][], time: ClockMapping): string[] {
  const column = time.dateColumn ?? time.column
  return rows.flatMap((cells) => {
    const text = cells[column] ?? ''
    return (time.dateColumn === null ? splitDateTime(text).date : text) ?? []
  })
}

/** Params name one date and each way to read it, so that a person can choose. */
function ambiguousOrder(dates: string[], orders: ReturnType<typeof possibleOrders>): Refusal {
  const days = (text: string) => orders.map((order) => isoDay(parseDate(text, order)))
  const text = dates.find((date) => new Set(days(date)).size > 1) ?? ''
  return refuse('readings/date-order-ambiguous', { text, readings: days(text).join(' or ') })
}

/** A reader for the log's clock times, or why it cannot be made. `rows` are the rows with readings. */
export function setUpClock(
  rows: string[][],
  time: ClockMapping,
  startMs: number,
  testZone: string,
): ReadClock | Refusal {
  const zone = time.zone ?? testZone
  if (!isZone(zone)) return refuse('readings/unknown-zone', { zone })
  const dates = datesOf(rows, time)
  const orders = possibleOrders(dates)
  if (time.dateOrder === null && orders.length > 1) return ambiguousOrder(dates, orders)
  return clockReader({
    local: localTime(zone),
    zone,
    startMs,
    dateOrder: time.dateOrder ?? orders[0] ?? 'ymd',
    dated: time.dateColumn !== null || orders.length > 0,
  })
}
