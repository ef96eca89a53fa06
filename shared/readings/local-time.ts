import { IANAZone } from 'luxon'
import { DAY_MS } from './dates.ts'

export interface LocalTime {
  /**
   * The instants (ms) at which clocks in the zone show a local time (ms, as if it were UTC):
   * one as a rule, two in the hour that autumn repeats, none in the hour that spring skips.
   */
  instantsOf(localMs: number): number[]
  /** What a clock in the zone shows at an instant, ms as if it were UTC. */
  localOf(instantMs: number): number
}

/** Offsets from UTC (ms) before and from `change_ms` on, the one change near a day. */
interface Offsets {
  before: number
  after: number
  change_ms: number
}

export const isZone = (name: string) => IANAZone.isValidZone(name)

/** The first millisecond with the offset that holds at `to`, by bisection: zones change their clocks at whole seconds. */
function changeBetween(from: number, to: number, offsetMs: (instantMs: number) => number): number {
  const after = offsetMs(to)
  let [low, high] = [from, to]
  while (high - low > 1000) {
    const middle = low + Math.floor((high - low) / 2000) * 1000
    if (offsetMs(middle) === after) high = middle
    else low = middle
  }
  return high
}

/**
 * Local times of an IANA zone. Offsets are looked up once a day, because a log has thousands of readings in a day.
 * Relies on a zone not changing its clocks twice within three days. @throws RangeError for an unknown zone
 */
export function localTime(zoneName: string): LocalTime {
  if (!isZone(zoneName)) throw new RangeError(`Unknown time zone: ${zoneName}`)
  const zone = IANAZone.create(zoneName)
  const offsetMs = (instantMs: number) => zone.offset(instantMs) * 60_000
  const aroundDay = new Map<number, Offsets>()

  const offsetsAround = (day: number): Offsets => {
    const known = aroundDay.get(day)
    if (known) return known
    const [from, to] = [(day - 1) * DAY_MS, (day + 2) * DAY_MS]
    const [before, after] = [offsetMs(from), offsetMs(to)]
    const offsets = { before, after, change_ms: before === after ? to : changeBetween(from, to, offsetMs) }
    aroundDay.set(day, offsets)
    return offsets
  }

  return {
    instantsOf(localMs) {
      const { before, after, change_ms } = offsetsAround(Math.floor(localMs / DAY_MS))
      if (before === after) return [localMs - before]
      const instants = []
      if (localMs - before < change_ms) instants.push(localMs - before)
      if (localMs - after >= change_ms) instants.push(localMs - after)
      return instants
    },
    localOf: (instantMs) => instantMs + offsetMs(instantMs),
  }
}
