import type { DateOrder } from './model.ts'

export const DAY_MS = 86_400_000
export const dateOrders: DateOrder[] = ['ymd', 'dmy', 'mdy']

const THREE_NUMBERS = /^(\d{1,4})([-/.])(\d{1,2})\2(\d{1,4})$/
const COMPACT = /^(\d{4})(\d{2})(\d{2})$/
const DAY_NAME_YEAR = /^(\d{1,2})[-\s/.]+([a-zà-ÿ]{3,10})\.?[-\s/.,]+(\d{2}|\d{4})$/i
const NAME_DAY_YEAR = /^([a-zà-ÿ]{3,10})\.?\s+(\d{1,2}),?\s+(\d{4})$/i

/** First letters of month names in English, German, French and Spanish. */
const months = [
  /^(jan|ene)/,
  /^(feb|fev|fév)/,
  /^(mar|mär|mrz)/,
  /^(apr|avr|abr)/,
  /^(may|mai)/,
  /^(jun|juin)/,
  /^(jul|juil)/,
  /^(aug|aou|aoû|ago)/,
  /^sep/,
  /^(oct|okt)/,
  /^nov/,
  /^(dec|dez|déc|dic)/,
]

const monthOf = (name: string) => months.findIndex((pattern) => pattern.test(name.toLowerCase())) + 1

/** Two-digit years stand for 1970 to 2069. */
function fullYear(digits: string): number {
  const year = Number(digits)
  if (digits.length > 2) return year
  return year < 70 ? 2000 + year : 1900 + year
}

function dayMs(year: number, month: number, day: number): number | null {
  const ms = Date.UTC(year, month - 1, day)
  const date = new Date(ms)
  const exists = date.getUTCFullYear() === year && date.getUTCMonth() === month - 1 && date.getUTCDate() === day
  return exists ? ms : null
}

function inOrder(parts: [string, string, string], order: DateOrder): number | null {
  const [a, b, c] = parts
  if (order === 'ymd') return a.length === 3 || c.length > 2 ? null : dayMs(fullYear(a), Number(b), Number(c))
  if (a.length > 2 || c.length === 3 || c.length === 1) return null
  return order === 'dmy' ? dayMs(fullYear(c), Number(b), Number(a)) : dayMs(fullYear(c), Number(a), Number(b))
}

/** Midnight of a written date as if it were in UTC, ms; null when the text is no date of that order. */
export function parseDate(text: string, order: DateOrder): number | null {
  const numbers = THREE_NUMBERS.exec(text)
  if (numbers) return inOrder([numbers[1] ?? '', numbers[3] ?? '', numbers[4] ?? ''], order)
  const compact = COMPACT.exec(text)
  if (compact) return dayMs(Number(compact[1]), Number(compact[2]), Number(compact[3]))
  const named = DAY_NAME_YEAR.exec(text)
  if (named) return dayMs(fullYear(named[3] ?? ''), monthOf(named[2] ?? ''), Number(named[1]))
  const nameFirst = NAME_DAY_YEAR.exec(text)
  return nameFirst ? dayMs(Number(nameFirst[3]), monthOf(nameFirst[1] ?? ''), Number(nameFirst[2])) : null
}

/** Whether the text is written like a date, in any order. */
export function isDateLike(text: string): boolean {
  if (COMPACT.test(text)) return false
  return dateOrders.some((order) => parseDate(text, order) !== null)
}

/**
 * The orders that read the most dates of a whole column, first choice first.
 * Orders that give the same days throughout count as one; more than one left means that only a person can tell.
 */
export function possibleOrders(texts: Iterable<string>): DateOrder[] {
  const distinct = [...new Set(texts)]
  const readings = dateOrders.map((order) => ({ order, days: distinct.map((text) => parseDate(text, order)) }))
  const readable = (days: (number | null)[]) => days.filter((day) => day !== null).length
  const best = Math.max(...readings.map(({ days }) => readable(days)))
  if (best === 0) return []
  const fitting = readings.filter(({ days }) => readable(days) === best)
  const same = (a: (number | null)[], b: (number | null)[]) => a.every((day, i) => day === b[i])
  return fitting
    .filter(({ days }, i) => !fitting.slice(0, i).some((earlier) => same(earlier.days, days)))
    .map(({ order }) => order)
}
