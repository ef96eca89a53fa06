import { DateTime } from 'luxon'
import { fieldError } from '../../errors.ts'

export interface StartTime {
  at: Date
  precision: 'instant' | 'day' | 'year'
}

const formats = {
  4: ['yyyy', 'year'],
  10: ['yyyy-MM-dd', 'day'],
  16: ["yyyy-MM-dd'T'HH:mm", 'instant'],
  19: ["yyyy-MM-dd'T'HH:mm:ss", 'instant'],
} as const

/** Nobody pumped a well for its transmissivity before; a year like 0219 is a slip of the keyboard. */
const firstYear = 1800

/**
 * The instant of a wall-clock time in an IANA zone, with the precision it was given in.
 * @throws AppError on the field `startLocal` when it is no date, lies in the future or too far back, or was
 * skipped by the clocks.
 */
export function startTime(local: string, zone: string, now: Date): StartTime {
  const [format, precision] = formats[local.length as keyof typeof formats] ?? []
  const time = format ? DateTime.fromFormat(local, format, { zone }) : null
  if (!time?.isValid || !precision || !format) throw fieldError('startLocal', 'pumping-test/start-format')
  // Luxon moves a skipped wall-clock time forward; what it reads back then differs from what was typed.
  if (time.toFormat(format) !== local)
    throw fieldError('startLocal', 'pumping-test/start-in-gap', { time: local, zone })
  if (time.year < firstYear) throw fieldError('startLocal', 'pumping-test/start-too-early', { year: firstYear })
  if (time.toMillis() > now.getTime()) throw fieldError('startLocal', 'pumping-test/start-in-future')
  return { at: time.toJSDate(), precision }
}

const displays = { year: 'yyyy', day: 'yyyy-MM-dd', instant: "yyyy-MM-dd'T'HH:mm:ss" } as const

export const localStart = (at: Date, zone: string, precision: StartTime['precision']): string =>
  DateTime.fromJSDate(at, { zone }).toFormat(displays[precision])
