const MINUTE = 60

/** Minutes at which a crew dips a well by hand after a change of rate; hourly at last. */
const BY_HAND = [
  0.5, 1, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10, 12, 15, 20, 25, 30, 40, 50, 60, 75, 90, 120, 150, 180, 240, 300, 360,
]

const steps = (from: number, to: number, step: number) =>
  Array.from({ length: Math.max(0, Math.ceil((to - from) / step)) }, (_, i) => from + i * step)

/** Seconds after a change of rate, up to `until`, for a crew with a dipper: every two hours after six. */
const handTimes = (until: number) =>
  [...BY_HAND.map((minutes) => minutes * MINUTE), ...steps(480 * MINUTE, until, 120 * MINUTE)].filter((t) => t < until)

/** A logger that records often at first and every half hour later. */
const loggerTimes = (until: number) =>
  [
    ...steps(20, 10 * MINUTE, 20),
    ...steps(10 * MINUTE, 60 * MINUTE, MINUTE),
    ...steps(60 * MINUTE, 360 * MINUTE, 5 * MINUTE),
    ...steps(360 * MINUTE, until, 30 * MINUTE),
  ].filter((t) => t < until)

const BEFORE = [-120, -90, -60, -30, -10].map((minutes) => minutes * MINUTE)

export type Recorder = 'hand' | 'logger'

/** Times of all readings of a test in seconds since the pump started: before, during, and after the stop. */
export function readingTimes(recorder: Recorder, pumping_s: number, recovery_s: number): number[] {
  const after = recorder === 'hand' ? handTimes : loggerTimes
  return [...BEFORE, ...after(pumping_s), pumping_s, ...after(recovery_s).map((time) => pumping_s + time)]
}
