import type { TimeWindow } from './analysis.ts'
import type { DerivativePoint } from './derivative.ts'

/** A derivative counts as level while it stays within this share of its middle (common practice). */
const LEVEL_WITHIN = 0.15
/** A level shorter than this many factors of ten in time shows nothing (common practice). */
const SHORTEST_CYCLES = 0.5

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
    const level = low > 0 && high - low <= LEVEL_WITHIN * (high + low)
    if (!level) return Math.max(first, i - 1)
  }
  return points.length - 1
}
