/** Time of day as written: "7:05", "07:05:30,5", "7:05 PM", with or without an offset from UTC behind it. */
const TIME = /^(\d{1,2}):(\d{2})(?::(\d{2})(?:[.,](\d{1,9}))?)?(?:\s*([ap])\.?m\.?)?(?:\s*(z|[-+]\d{2}:?\d{2}))?$/i
const DATE_AND_TIME = /^(.*?\d)(?:[T,\s]+)(\d{1,2}:\d{2}.*)$/i

export interface TimeOfDay {
  /** Milliseconds after midnight. */
  ms: number
  /** Offset from UTC in minutes when it is written with the time. */
  offset: number | null
}

function hourOf(text: string, half: string | undefined): number {
  const hour = Number(text)
  if (!half) return hour
  if (hour < 1 || hour > 12) return NaN
  return (hour % 12) + (half.toLowerCase() === 'p' ? 12 : 0)
}

function offsetOf(text: string | undefined): number | null {
  if (!text) return null
  if (/^z$/i.test(text)) return 0
  const minutes = Number(text.slice(1, 3)) * 60 + Number(text.slice(-2))
  return text.startsWith('-') ? -minutes : minutes
}

/** null when the text is no time of day. "24:00" is the midnight that ends the day. */
export function parseTimeOfDay(text: string): TimeOfDay | null {
  const parts = TIME.exec(text)
  if (!parts) return null
  const [, hourText = '', minuteText, secondText = '0', fraction = '0', half, offset] = parts
  const hour = hourOf(hourText, half)
  const [minute, second] = [Number(minuteText), Number(secondText)]
  const ms = (hour * 3600 + minute * 60 + second) * 1000 + Number(`0.${fraction}`) * 1000
  const valid = minute < 60 && second < 60 && ms <= 86_400_000
  return valid ? { ms, offset: offsetOf(offset) } : null
}

/** Parts a written date and time; a text with a date alone comes back without time, one with a time alone without date. */
export function splitDateTime(text: string): { date: string | null; time: string | null } {
  if (TIME.test(text)) return { date: null, time: text }
  const parts = DATE_AND_TIME.exec(text)
  return parts ? { date: parts[1] ?? null, time: parts[2] ?? null } : { date: text, time: null }
}
