import type { DerivativePoint } from './derivative.ts'
import { logSlopes } from './log-slope.ts'
import { radialFlowSpan } from './radial-flow.ts'

/** How a stretch of the derivative runs on the log–log plot. `unit` and `half` are slopes of 1 and of a half. */
export type Trend = 'unit' | 'half' | 'level' | 'rise' | 'fall'

/** Indices of the first and last point. */
export interface Stretch {
  trend: Trend
  first: number
  last: number
}

/** A derivative below this share of the largest before it is as good as none (common practice: within the noise). */
const NOTHING = 0.05
/** Slopes between these are neither rise nor fall. */
const LEVEL_SLOPE = 0.15
/** Shortest rise or fall, and shortest stretch of one slope, factors of ten in time (common practice). */
const SHORTEST_TREND = 0.3
const SHORTEST_SLOPE = 0.5
/** How near a slope has to be to 1 or to a half. */
const NEAR = { unit: 0.2, half: 0.1 }
/** While a casing empties or fills, drawdown and its derivative are alike. */
const ALIKE = 0.3

interface Sloped {
  points: readonly DerivativePoint[]
  slopes: readonly number[]
  /** Derivative over drawdown at the same time. */
  ratios: readonly number[]
}

/**
 * Stretches of a derivative in order of time: level ones by the rule of radial flow, between them rises and falls, and
 * within rises those of one slope. Points that belong to none are left out.
 * @param drawdown_m at the points
 */
export function derivativeStretches(points: readonly DerivativePoint[], drawdown_m: readonly number[]): Stretch[] {
  const floor_m = nothingAt(points)
  const sloped = {
    points,
    slopes: logSlopes(points, floor_m),
    ratios: points.map(({ derivative_m }, i) => derivative_m / (drawdown_m[i] as number)),
  }
  const levels = levelStretches(points, 0, points.length - 1, floor_m)
  const edges = [-1, ...levels.flatMap(({ first, last }) => [first, last]), points.length]
  const between = edges.flatMap((edge, i) =>
    i % 2 === 0 ? trends(sloped, edge + 1, (edges[i + 1] as number) - 1) : [],
  )
  return [...levels, ...between].sort((a, b) => a.first - b.first)
}

/** What counts as nothing at each point, greater than zero once anything has been above zero. */
function nothingAt(points: readonly DerivativePoint[]): number[] {
  let most = Number.MIN_VALUE
  return points.map(({ derivative_m }) => NOTHING * (most = Math.max(most, derivative_m)))
}

/** The longest level stretch, then those before and after it. */
function levelStretches(
  points: readonly DerivativePoint[],
  from: number,
  to: number,
  floor_m: readonly number[],
): Stretch[] {
  const part = points.slice(from, to + 1)
  const span = radialFlowSpan(part)
  if (!span) return []
  const first = from + part.findIndex(({ time_s }) => time_s >= span.from_s)
  const last = from + part.filter(({ time_s }) => time_s <= span.to_s).length - 1
  const middle = Math.floor((first + last) / 2)
  const counts = (points[middle] as DerivativePoint).derivative_m > (floor_m[middle] as number)
  const here: Stretch[] = counts ? [{ trend: 'level', first, last }] : []
  return [
    ...levelStretches(points, from, first - 1, floor_m),
    ...here,
    ...levelStretches(points, last + 1, to, floor_m),
  ]
}

/** Rises and falls between two level stretches; single points astray do not part them. */
function trends(sloped: Sloped, from: number, to: number): Stretch[] {
  const rises = runs(sloped, from, to, (slope) => slope > LEVEL_SLOPE, SHORTEST_TREND)
  const falls = runs(sloped, from, to, (slope) => slope < -LEVEL_SLOPE, SHORTEST_TREND)
  const found = [
    ...rises.map((run): Stretch => ({ trend: 'rise', ...run })),
    ...falls.map((run): Stretch => ({ trend: 'fall', ...run })),
  ].sort((a, b) => a.first - b.first)
  return joined(found).flatMap((stretch) => (stretch.trend === 'rise' ? ofOneSlope(sloped, stretch) : [stretch]))
}

const joined = (stretches: Stretch[]): Stretch[] =>
  stretches.reduce<Stretch[]>((done, next) => {
    const last = done.at(-1)
    return last?.trend === next.trend ? [...done.slice(0, -1), { ...last, last: next.last }] : [...done, next]
  }, [])

/** A rise that runs at one slope for long is that slope; any other stays a rise. */
function ofOneSlope(sloped: Sloped, rise: Stretch): Stretch[] {
  const { ratios } = sloped
  const near = (wanted: number, within: number) => (slope: number) => Math.abs(slope - wanted) <= within
  const unit = runs(sloped, rise.first, rise.last, near(1, NEAR.unit), SHORTEST_SLOPE).filter(
    ({ first, last }) => Math.abs((ratios[Math.floor((first + last) / 2)] as number) - 1) <= ALIKE,
  )
  const half = runs(sloped, rise.first, rise.last, near(0.5, NEAR.half), SHORTEST_SLOPE)
  const found = [
    ...unit.map((run): Stretch => ({ trend: 'unit', ...run })),
    ...half.map((run): Stretch => ({ trend: 'half', ...run })),
  ]
  return found.length > 0 ? found.sort((a, b) => a.first - b.first) : [rise]
}

interface Run {
  first: number
  last: number
}

/** Unbroken runs of points whose slope is as wanted, long enough to show something. */
function runs(
  { points, slopes }: Sloped,
  from: number,
  to: number,
  wanted: (slope: number) => boolean,
  shortest: number,
): Run[] {
  const found: Run[] = []
  let first = -1
  for (let i = from; i <= to + 1; i++) {
    const fits = i <= to && wanted(slopes[i] as number)
    if (fits && first < 0) first = i
    if (fits || first < 0) continue
    const cycles = Math.log10((points[i - 1] as DerivativePoint).time_s / (points[first] as DerivativePoint).time_s)
    if (cycles >= shortest) found.push({ first, last: i - 1 })
    first = -1
  }
  return found
}
