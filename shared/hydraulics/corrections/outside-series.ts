import { AnalysisError } from '../analysis-error.ts'
import type { Finding } from '../analysis.ts'
import type { Outside } from './correction.ts'

/** Reads an outside series at any moment, linear between its values; beyond its ends the last value stands. */
export type ReadOutside = (time_s: number) => number

/** Times that do not fall, and their values. */
interface Points {
  times: Float64Array
  values: Float64Array
}

/** An hour more than a daily wave of twelve hours changes noticeably in (common practice). */
const LONGEST_GAP_S = 3 * 3600

/** @throws AnalysisError when the series does not reach from `from_s` to `to_s`, or has columns of different length */
export function readOutside(
  { elapsed_s, value_m }: Outside,
  from_s: number,
  to_s: number,
): { read: ReadOutside; findings: Finding[] } {
  if (elapsed_s.length !== value_m.length) throw new AnalysisError('analysis/uneven-series', { wellId: '' })
  const points = pointsOf(elapsed_s, value_m)
  const [first, last] = [points.times[0], points.times.at(-1)]
  if (first === undefined || last === undefined || first > from_s || last < to_s)
    throw uncovered(first, last, from_s, to_s)
  return { read: reader(points), findings: gapFindings(points, from_s, to_s) }
}

/** Hundreds of thousands of values, asked for well by well: sorted only where they do not rise already. */
function pointsOf(elapsed_s: readonly number[], value_m: readonly number[]): Points {
  const [times, values] = [new Float64Array(elapsed_s.length), new Float64Array(elapsed_s.length)]
  let count = 0
  let rises = true
  for (let i = 0; i < elapsed_s.length; i++) {
    const [time, value] = [elapsed_s[i] as number, value_m[i] as number]
    if (!Number.isFinite(time) || !Number.isFinite(value)) continue
    if (count > 0 && time < (times[count - 1] as number)) rises = false
    times[count] = time
    values[count] = value
    count += 1
  }
  const points = { times: times.subarray(0, count), values: values.subarray(0, count) }
  return rises ? points : inOrder(points)
}

function inOrder({ times, values }: Points): Points {
  const order = Array.from(times, (_, i) => i).sort((a, b) => (times[a] as number) - (times[b] as number))
  return {
    times: Float64Array.from(order, (i) => times[i] as number),
    values: Float64Array.from(order, (i) => values[i] as number),
  }
}

function reader({ times, values }: Points): ReadOutside {
  return (time) => {
    const right = upperIndex(times, time)
    const left = Math.max(0, right - 1)
    const [a, b] = [times[left] as number, times[right] as number]
    const [from, to] = [values[left] as number, values[right] as number]
    const share = b > a ? Math.min(1, (time - a) / (b - a)) : 1
    return from + (to - from) * Math.max(0, share)
  }
}

function uncovered(first: number | undefined, last: number | undefined, from_s: number, to_s: number): AnalysisError {
  const early = first === undefined || first > from_s
  const missing = early ? { from_s, to_s: first ?? to_s } : { from_s: last ?? from_s, to_s }
  return new AnalysisError('analysis/correction-cover', missing)
}

/** A long gap where the readings are: what lies between its ends is a guess. */
function gapFindings({ times }: Points, from_s: number, to_s: number): Finding[] {
  const gap_s = times.reduce((longest, time, i) => {
    const before = times[i - 1] ?? time
    return time > from_s && before < to_s ? Math.max(longest, time - before) : longest
  }, 0)
  return gap_s > LONGEST_GAP_S
    ? [{ code: 'outside-gap', severity: 'caution', params: { gap_s, limit_s: LONGEST_GAP_S } }]
    : []
}

/** Index of the first point at or after a time, by halving; the last one where all lie before. */
function upperIndex(times: Float64Array, time: number): number {
  let low = 0
  let high = times.length - 1
  while (low < high) {
    const middle = (low + high) >> 1
    if ((times[middle] as number) < time) low = middle + 1
    else high = middle
  }
  return low
}
