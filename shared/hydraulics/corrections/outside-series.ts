import { AnalysisError } from '../analysis-error.ts'
import type { Finding } from '../analysis.ts'
import type { Outside } from './correction.ts'

/** Reads an outside series at any moment, linear between its values; beyond its ends the last value stands. */
export type ReadOutside = (time_s: number) => number

interface Point {
  time: number
  value: number
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
  const points = elapsed_s
    .flatMap((time, i) =>
      Number.isFinite(time) && Number.isFinite(value_m[i]) ? [{ time, value: value_m[i] as number }] : [],
    )
    .sort((a, b) => a.time - b.time)
  const [first, last] = [points[0], points.at(-1)]
  if (!first || !last || first.time > from_s || last.time < to_s) throw uncovered(first?.time, last?.time, from_s, to_s)
  return { read: reader(points), findings: gapFindings(points, from_s, to_s) }
}

function reader(points: Point[]): ReadOutside {
  return (time) => {
    const right = upperIndex(points, time)
    const b = points[right] as Point
    const a = points[Math.max(0, right - 1)] as Point
    const share = b.time > a.time ? Math.min(1, (time - a.time) / (b.time - a.time)) : 1
    return a.value + (b.value - a.value) * Math.max(0, share)
  }
}

function uncovered(first: number | undefined, last: number | undefined, from_s: number, to_s: number): AnalysisError {
  const early = first === undefined || first > from_s
  const missing = early ? { from_s, to_s: first ?? to_s } : { from_s: last ?? from_s, to_s }
  return new AnalysisError('analysis/correction-cover', missing)
}

/** A long gap where the readings are: what lies between its ends is a guess. */
function gapFindings(points: Point[], from_s: number, to_s: number): Finding[] {
  const gap_s = points.reduce((longest, { time }, i) => {
    const before = points[i - 1]?.time ?? time
    return time > from_s && before < to_s ? Math.max(longest, time - before) : longest
  }, 0)
  return gap_s > LONGEST_GAP_S
    ? [{ code: 'outside-gap', severity: 'caution', params: { gap_s, limit_s: LONGEST_GAP_S } }]
    : []
}

/** Index of the first point at or after a time, by halving; the last one where all lie before. */
function upperIndex(points: Point[], time: number): number {
  let low = 0
  let high = points.length - 1
  while (low < high) {
    const middle = (low + high) >> 1
    if ((points[middle] as Point).time < time) low = middle + 1
    else high = middle
  }
  return low
}
