import type { TimeWindow } from './analysis.ts'
import type { DerivativePoint } from './derivative.ts'

/** A derivative counts as level while it stays within this share of its middle (common practice). */
const LEVEL_WITHIN = 0.15
/** A level shorter than this many factors of ten in time shows nothing (common practice). */
const SHORTEST_CYCLES = 0.5

/**
 * A level between a rise and a fall that is no longer than so many factors of ten is their crest, not radial flow: of a
 * leaky response with r/B = 0.33, which gives T 38 % too high, 1.1 are level.
 */
export const LONGEST_CREST = 1.5
/** A level whose last quarter, in log time, stands lower than this share of the quarter before is about to fall. */
const STILL_LEVEL = 0.97
/** What has to be level for T to rest on radial flow. */
export interface WantedLevel {
  /** The window of a straight line; null for any other method. */
  window: TimeWindow | null
  /** A model of radial flow alone was fitted to all readings: none may tell of anything else after it. */
  toTheEnd: boolean
}

/** Whether the derivative shows radial flow: a level that is no mere crest, and that holds what a method reads. */
export function showsRadialFlow(points: DerivativePoint[], { window, toTheEnd }: WantedLevel): boolean {
  const span = window ? levelAround(points, window) : radialFlowSpan(points)
  return span !== null && isPlateau(points, span) && !(toTheEnd && fallsAfter(points, span))
}

/** The level that a window lies in, as far as it reaches to both sides; null where the window is not level or too short. */
function levelAround(points: DerivativePoint[], window: TimeWindow): TimeWindow | null {
  let first = points.findIndex(({ time_s }) => time_s >= window.from_s)
  let last = points.filter(({ time_s }) => time_s <= window.to_s).length - 1
  if (first < 0 || last < first || !isLevel(points, first, last)) return null
  while (last + 1 < points.length && isLevel(points, first, last + 1)) last++
  while (first > 0 && isLevel(points, first - 1, last)) first--
  const span = { from_s: (points[first] as DerivativePoint).time_s, to_s: (points[last] as DerivativePoint).time_s }
  return Math.log10(span.to_s / span.from_s) >= SHORTEST_CYCLES ? span : null
}

function isLevel(points: DerivativePoint[], first: number, last: number): boolean {
  const within = points.slice(first, last + 1).map(({ derivative_m }) => derivative_m)
  return isBand(Math.min(...within), Math.max(...within))
}

const isBand = (low: number, high: number) => low > 0 && high - low <= LEVEL_WITHIN * (high + low)

/** A short level that nothing lower follows, and that does not begin to fall itself. */
function isPlateau(points: DerivativePoint[], { from_s, to_s }: TimeWindow): boolean {
  if (Math.log10(to_s / from_s) > LONGEST_CREST) return true
  const between = (from: number, to: number) =>
    points.filter(({ time_s }) => time_s >= from && time_s <= to).map(({ derivative_m }) => derivative_m)
  if (fallsAfter(points, { from_s, to_s })) return false
  const quarter = (to_s / from_s) ** 0.25
  const [before, last] = [between(to_s / quarter ** 2, to_s / quarter), between(to_s / quarter, to_s)]
  return before.length === 0 || last.length === 0 || mean(last) >= STILL_LEVEL * mean(before)
}

/** Whether what follows a level lies below all of it; a single last point tells nothing. */
function fallsAfter(points: DerivativePoint[], { from_s, to_s }: TimeWindow): boolean {
  const within = points.filter(({ time_s }) => time_s >= from_s && time_s <= to_s)
  const after = points.filter(({ time_s }) => time_s > to_s).map(({ derivative_m }) => derivative_m)
  return after.length > 1 && mean(after) < Math.min(...within.map(({ derivative_m }) => derivative_m))
}

const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length

/**
 * The longest span, in log time, in which the derivative is level: radial flow. Null when there is none.
 * For every first point the span grows while largest and smallest stay within ±15 % of their middle.
 * Source: Bourdet et al. 1983 (radial flow is a level derivative).
 */
export function radialFlowSpan(points: DerivativePoint[]): TimeWindow | null {
  let best: TimeWindow | null = null
  let bestCycles = SHORTEST_CYCLES
  for (let first = 0; first < points.length; first++) {
    const last = lastLevel(points, first)
    const from_s = (points[first] as DerivativePoint).time_s
    const to_s = (points[last] as DerivativePoint).time_s
    const cycles = Math.log10(to_s / from_s)
    if (cycles >= bestCycles) {
      best = { from_s, to_s }
      bestCycles = cycles
    }
  }
  return best
}

function lastLevel(points: DerivativePoint[], first: number): number {
  let low = Infinity
  let high = -Infinity
  for (let i = first; i < points.length; i++) {
    const { derivative_m } = points[i] as DerivativePoint
    low = Math.min(low, derivative_m)
    high = Math.max(high, derivative_m)
    if (!isBand(low, high)) return Math.max(first, i - 1)
  }
  return points.length - 1
}
