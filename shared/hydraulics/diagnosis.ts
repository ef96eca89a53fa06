import type { AnalysisInputs, Series, TimeWindow } from './analysis.ts'
import { DERIVATIVE_SMOOTHING, logDerivative, type DerivativePoint } from './derivative.ts'
import { derivativeStretches, type Stretch, type Trend } from './derivative-stretches.ts'
import { LONGEST_CREST } from './radial-flow.ts'

/** What rules the flow for a while, as far as the derivative shows it. */
export type Regime = 'casing-storage' | 'linear-flow' | 'radial-flow' | 'drainage' | 'recharge' | 'barrier'

/** Times since pumping began. */
export interface RegimeSpan extends TimeWindow {
  regime: Regime
}

interface Diagnosed {
  smoothing?: number
  aquifer: AnalysisInputs['aquifer']
  role: Series['role']
}

/** What begins at a stretch (null: nothing that has a name), and the stretch after its end. */
interface Named {
  regime: Regime | null
  next: number
}

interface Course {
  stretches: readonly Stretch[]
  points: readonly DerivativePoint[]
  /** The aquifer drains with delay. */
  drains: boolean
  /** The level is that of the pumped well, where its casing empties. */
  pumped: boolean
}

/**
 * Spans of time in which the derivative of drawdown by ln t shows what rules the flow: a slope of 1 with the crest after
 * it (casing storage), a level (radial flow), a slope of a half (linear flow), a fall (recharge or leakage; in an
 * unconfined aquifer, when a rise follows, delayed drainage), and a rise above a level with the level that it leads to
 * (barrier). What shows nothing clearly has no span.
 * @param time_s since pumping began at one rate, ascending, positive
 * Sources: Bourdet et al. 1983; Papadopulos & Cooper 1967 for casing storage; Ferris et al. 1962 for boundaries.
 */
export function diagnose(
  time_s: readonly number[],
  drawdown_m: readonly number[],
  { smoothing = DERIVATIVE_SMOOTHING, aquifer, role }: Diagnosed,
): RegimeSpan[] {
  const points = logDerivative(time_s, drawdown_m, { smoothing })
  const measured = new Map(time_s.map((time, i) => [time, drawdown_m[i] as number]))
  const stretches = derivativeStretches(
    points,
    points.map((point) => measured.get(point.time_s) as number),
  )
  const course: Course = { stretches, points, drains: aquifer === 'unconfined', pumped: role === 'pumped' }
  const spans: RegimeSpan[] = []
  for (let i = 0; i < stretches.length;) {
    const { regime, next } = nameFrom(course, i)
    if (regime) spans.push({ regime, from_s: timeAt(points, stretches[i]?.first), to_s: endOf(course, regime, next) })
    i = next
  }
  return spans
}

function nameFrom(course: Course, i: number): Named {
  const { stretches } = course
  const { trend } = stretches[i] as Stretch
  const afterLevel = stretches.slice(0, i).some((_, k) => isRadial(course, k))
  if (trend === 'half') return { regime: 'linear-flow', next: i + 1 }
  if (trend === 'level') return { regime: isCrest(course, i) ? null : 'radial-flow', next: i + 1 }
  if (trend === 'fall') return fallFrom(course, i)
  if (afterLevel) return { regime: 'barrier', next: past(stretches, i + 1, ['rise', 'level', 'unit']) }
  const storing = trend === 'unit' && course.pumped
  return storing ? { regime: 'casing-storage', next: endOfStorage(course, i) } : { regime: null, next: i + 1 }
}

/** Casing storage ends with the fall after its crest. */
function endOfStorage(course: Course, unit: number): number {
  const { stretches } = course
  const crest = past(stretches, unit + 1, ['unit', 'half', 'rise'])
  return past(stretches, crest < stretches.length && isCrest(course, crest) ? crest + 1 : crest, ['fall'])
}

const isRadial = (course: Course, i: number) => course.stretches[i]?.trend === 'level' && !isCrest(course, i)

function isCrest({ stretches, points }: Course, i: number): boolean {
  const [before, level, after] = [stretches[i - 1]?.trend, stretches[i] as Stretch, stretches[i + 1]?.trend]
  const between = before !== undefined && before !== 'level' && before !== 'fall' && after === 'fall'
  return level.trend === 'level' && between && cyclesOf(level, points) <= LONGEST_CREST
}

function fallFrom({ stretches, drains }: Course, i: number): Named {
  const rise = stretches.findIndex(({ trend }, k) => k > i && trend !== 'level' && trend !== 'fall')
  if (drains && rise > 0) return { regime: 'drainage', next: past(stretches, rise, ['rise', 'half', 'unit']) }
  return { regime: 'recharge', next: past(stretches, i + 1, ['fall']) }
}

/** The first stretch from `i` on that runs otherwise. */
function past(stretches: readonly Stretch[], i: number, trends: readonly Trend[]): number {
  const found = stretches.findIndex(({ trend }, k) => k >= i && !trends.includes(trend))
  return found < 0 ? Math.max(i, stretches.length) : found
}

/** Where a derivative has fallen to nothing and nothing follows, levels stay steady to the last reading. */
function endOf({ stretches, points }: Course, regime: Regime, next: number): number {
  const toTheEnd = regime === 'recharge' && next >= stretches.length
  return timeAt(points, toTheEnd ? points.length - 1 : stretches[next - 1]?.last)
}

const timeAt = (points: readonly DerivativePoint[], i: number | undefined) => points[i ?? -1]?.time_s ?? Number.NaN

const cyclesOf = ({ first, last }: Stretch, points: readonly DerivativePoint[]) =>
  Math.log10(timeAt(points, last) / timeAt(points, first))
