import { day, minute } from './factors.ts'
import { formatNumber } from './format.ts'

/** Up to these bounds the trade reads a test in seconds, then in minutes, then in days. */
const LAST_SECONDS = 2 * minute
const LAST_MINUTES = 2 * day

const scaleFor = (seconds: number) => {
  if (seconds < LAST_SECONDS) return { size: 1, label: 's' }
  if (seconds < LAST_MINUTES) return { size: minute, label: 'min' }
  return { size: day, label: 'd' }
}

/** A span of time in the unit that reads best: "45 s", "40 min", "1 440 min", "3 d". */
export function formatElapsed(seconds: number): string {
  const { size, label } = scaleFor(Math.abs(seconds))
  return `${formatNumber(seconds / size, { figures: 4, trim: true })} ${label}`
}
