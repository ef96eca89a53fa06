import { parseTimeOfDay, splitDateTime } from './clock.ts'
import { isDateLike } from './dates.ts'
import { parseSpan } from './spans.ts'

export type CellKind = 'blank' | 'number' | 'date' | 'time' | 'datetime' | 'text'

const NUMBER = /^[-+−]?(?:\d+(?:[.,'\u2009\u202f]\d+)*[.,]?|[.,]\d+)(?:e[-+]?\d+)?$/i

/** What a cell looks like, before anything is known about its column. */
export function kindOf(cell: string): CellKind {
  if (cell === '') return 'blank'
  if (cell.length > 40 || !/\d/.test(cell)) return 'text'
  if (/^[^-/:a-z]*$/i.test(cell) && NUMBER.test(cell) && !isDateLike(cell)) return 'number'
  if (parseTimeOfDay(cell) || parseSpan(cell, 'h:m:s') !== null) return 'time'
  const { date, time } = splitDateTime(cell)
  if (date !== null && isDateLike(date)) {
    if (time === null) return 'date'
    return parseTimeOfDay(time) ? 'datetime' : 'text'
  }
  return NUMBER.test(cell) ? 'number' : 'text'
}

export const isClean = (kind: CellKind) => kind !== 'text' && kind !== 'blank'
