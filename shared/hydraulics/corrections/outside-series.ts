import { AnalysisError } from '../analysis.ts'
import type { Outside } from './correction.ts'

/** Reads an outside series at any moment, linear between its values. */
export type ReadOutside = (time_s: number) => number

/**
 * @throws AnalysisError when the series does not reach from `from_s` to `to_s`, or has columns of different length
 */
export function readOutside({ elapsed_s, value_m }: Outside, from_s: number, to_s: number): ReadOutside {
  if (elapsed_s.length !== value_m.length) throw new AnalysisError('analysis/uneven-series', { wellId: '' })
  const points = elapsed_s
    .flatMap((time, i) =>
      Number.isFinite(time) && Number.isFinite(value_m[i]) ? [{ time, value: value_m[i] as number }] : [],
    )
    .sort((a, b) => a.time - b.time)
  const [first, last] = [points[0], points.at(-1)]
  if (!first || !last || first.time > from_s || last.time < to_s) throw uncovered(first?.time, last?.time, from_s, to_s)
  return (time) => {
    const right = upperIndex(points, time)
    const b = points[right] as { time: number; value: number }
    const a = points[Math.max(0, right - 1)] as { time: number; value: number }
    return b.time > a.time ? a.value + ((b.value - a.value) * (time - a.time)) / (b.time - a.time) : b.value
  }
}

function uncovered(first: number | undefined, last: number | undefined, from_s: number, to_s: number): AnalysisError {
  const early = first === undefined || first > from_s
  const missing = early ? { from_s, to_s: first ?? to_s } : { from_s: last ?? from_s, to_s }
  return new AnalysisError('analysis/correction-cover', missing)
}

/** Index of the first point at or after a time, by halving; the last one where all lie before. */
function upperIndex(points: { time: number }[], time: number): number {
  let low = 0
  let high = points.length - 1
  while (low < high) {
    const middle = (low + high) >> 1
    if ((points[middle] as { time: number }).time < time) low = middle + 1
    else high = middle
  }
  return low
}
