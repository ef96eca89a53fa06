import type { Params, ReadingFlag } from './codes.ts'
import { centredMedian, localMedian } from './running-median.ts'

export interface FlagOptions {
  /** Smallest step the logger shows, m; floor of the MAD (default: the smallest difference between two values). */
  resolution_m?: number
  /** Times at which the pump was started, stopped or changed, s (default [0]): readings around them are no spikes. */
  events_s?: number[]
  /** Values that stand for "no reading", m (default −999, −9999, … and their decimal kin). */
  sentinels_m?: number[]
  /** A spike is further from the running median than this many scaled MADs (default 5). */
  spikeFactor?: number
  /** Readings on each side in the running median (default 5). */
  halfWindow?: number
  /** A gap is longer than this many times the steps around it (default 5). */
  gapFactor?: number
}

export interface SeriesFlag {
  index: number
  code: ReadingFlag
  params: Params
}

/** Common among loggers and databases (common practice). */
export const sentinels = [-999, -999.9, -999.99, -999.999, -9999, -9999.9, -9999.99, -99999, -999999]
/** Makes the MAD of normal noise its standard deviation: 1/Φ⁻¹(3/4). */
export const MAD_TO_SIGMA = 1.4826022185056018
/** Steps before a reading that tell how often the logger reads. */
const STEPS_BEFORE = 9
/**
 * Positions on each side whose deviations make the MAD: enough of them that pure noise does not exceed
 * five scaled MADs by a chance small MAD (with eleven deviations it does some times in a thousand).
 */
const MAD_REACH = 25
/** Nearest positions to the middle in a window that a spike test needs on each side. */
const LEAST_REACH = 2

const isSentinel = (value: number, known: number[]) => known.some((s) => Math.abs(value - s) <= 1e-9 * Math.abs(s))

function flagSentinels(values: ArrayLike<number>, known: number[]): SeriesFlag[] {
  return Array.from(values).flatMap((value, index) =>
    isSentinel(value, known) ? [{ index, code: 'readings/sentinel' as const, params: { value_m: value } }] : [],
  )
}

function flagOrder(times: ArrayLike<number>): SeriesFlag[] {
  const firstAt = new Map<number, number>()
  return Array.from(times).flatMap((time, index): SeriesFlag[] => {
    const earlier = firstAt.get(time)
    if (earlier !== undefined) return [{ index, code: 'readings/duplicate-time', params: { elapsed_s: time, earlier } }]
    firstAt.set(time, index)
    const before = times[index - 1]
    if (before === undefined || time >= before) return []
    return [{ index, code: 'readings/time-backwards', params: { by_s: before - time } }]
  })
}

const medianOf = (values: number[]) => {
  const sorted = [...values].sort((a, b) => a - b)
  return sorted[sorted.length >> 1] ?? NaN
}

/**
 * A gap is long beside the steps before it and beside the step that follows (the longest before, for the last one):
 * readings taken ever more seldom, as in every hand-read test, are no gaps.
 */
function flagGaps(times: ArrayLike<number>, factor: number): SeriesFlag[] {
  const steps = Array.from({ length: Math.max(0, times.length - 1) }, (_, i) => (times[i + 1] ?? 0) - (times[i] ?? 0))
  const stepsBefore = (i: number) => steps.slice(Math.max(0, i - STEPS_BEFORE), i).filter((step) => step > 0)
  return steps.flatMap((gap_s, i): SeriesFlag[] => {
    const next = steps[i + 1] ?? Math.max(...stepsBefore(i))
    if (gap_s <= factor * next) return []
    const usual = medianOf(stepsBefore(i))
    return gap_s > factor * usual
      ? [{ index: i + 1, code: 'readings/gap-before', params: { gap_s, usual_s: usual } }]
      : []
  })
}

function smallestStep(values: number[]): number {
  const sorted = [...new Set(values)].sort((a, b) => a - b)
  let least = Infinity
  for (let i = 1; i < sorted.length; i++) least = Math.min(least, (sorted[i] ?? 0) - (sorted[i - 1] ?? 0))
  return Number.isFinite(least) ? least : 0
}

/** Whether an event lies inside the window around position i: two regimes in one window have no common median. */
function straddles(times: number[], i: number, half: number, events: number[]): boolean {
  const from = times[Math.max(0, i - half)] ?? -Infinity
  const to = times[Math.min(times.length - 1, i + half)] ?? Infinity
  return events.some((event) => event >= from && event < to)
}

function flagSpikes(times: number[], values: number[], indices: number[], options: FlagOptions): SeriesFlag[] {
  const { spikeFactor = 5, halfWindow = 5, events_s = [0], resolution_m = smallestStep(values) } = options
  const usual = centredMedian(values, halfWindow)
  const deviations = Float64Array.from(values, (value, i) => Math.abs(value - (usual[i] ?? NaN)))
  const mads = localMedian(deviations, MAD_REACH)
  return values.flatMap((value_m, i): SeriesFlag[] => {
    if (i < LEAST_REACH || i >= values.length - LEAST_REACH) return []
    const limit = spikeFactor * Math.max(MAD_TO_SIGMA * (mads[i] ?? 0), resolution_m)
    if ((deviations[i] ?? 0) <= limit || straddles(times, i, halfWindow, events_s)) return []
    return [{ index: indices[i] ?? i, code: 'readings/spike', params: { value_m, median_m: usual[i] ?? NaN } }]
  })
}

/**
 * What looks wrong in a series, in file order: sentinels, times that repeat or step back, gaps, spikes
 * (further than 5 scaled MADs from a running median, the MAD not below the logger's resolution).
 * Nothing is removed. `elapsed_s` and `value_m` have one length; `index` counts in them.
 * @throws RangeError when the lengths differ
 */
export function flagSeries(
  elapsed_s: ArrayLike<number>,
  value_m: ArrayLike<number>,
  options: FlagOptions = {},
): SeriesFlag[] {
  if (elapsed_s.length !== value_m.length) throw new RangeError('times and values differ in number')
  const missing = flagSentinels(value_m, options.sentinels_m ?? sentinels)
  const skipped = new Set(missing.map((flag) => flag.index))
  const kept = Array.from(value_m, (_, i) => i).filter((i) => !skipped.has(i))
  const [times, values] = [kept.map((i) => elapsed_s[i] ?? NaN), kept.map((i) => value_m[i] ?? NaN)]
  return [
    ...missing,
    ...flagOrder(elapsed_s),
    ...flagGaps(elapsed_s, options.gapFactor ?? 5),
    ...flagSpikes(times, values, kept, options),
  ].sort((a, b) => a.index - b.index)
}
