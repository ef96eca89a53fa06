import type { Heads } from './slug-test.ts'

/** Half of a period passes between two crossings of zero; noise about zero makes crossings of its own. */
const COUNTED_HEAD = 0.1

/** Starting points of frequency, damping, displacement and velocity for the fit of a damped spring. */
export function springStarts({ time_s, head }: Heads, dampings: number[]): number[][] {
  const frequencies = [...crossingFrequency(time_s, head), ...fallFrequencies(time_s, head)]
  return frequencies.flatMap((frequency) => dampings.map((damping) => [frequency, damping, 1, 0]))
}

/** Frequency from the time between changes of sign that a real swing follows. */
function crossingFrequency(time_s: number[], head: number[]): number[] {
  const largest = head.reduce((most, value) => Math.max(most, Math.abs(value)), 0)
  const crossings: number[] = []
  let side = 0
  head.forEach((value, i) => {
    if (Math.abs(value) < COUNTED_HEAD * largest) return
    if (side !== 0 && Math.sign(value) !== side) crossings.push(time_s[i] as number)
    side = Math.sign(value)
  })
  const [first, last] = [crossings[0], crossings.at(-1)]
  if (first === undefined || last === undefined) return []
  return crossings.length > 1
    ? [(Math.PI * (crossings.length - 1)) / (last - first)]
    : [Math.PI / 2 / first, Math.PI / first]
}

/** Without swings: frequencies around the inverse of the time in which the head falls to half. */
function fallFrequencies(time_s: number[], head: number[]): number[] {
  const first = head[0] ?? 1
  const half = head.findIndex((value) => Math.abs(value) < Math.abs(first) / 2)
  const fall = time_s[half < 0 ? time_s.length - 1 : half] ?? 1
  return [0.5, 1, 2, 4].map((factor) => factor / fall)
}
