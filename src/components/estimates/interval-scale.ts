import { formatNumber } from '#shared/quantities/format.ts'

export interface Tick {
  /** In the reader's unit. */
  value: number
  label: string
}

export interface IntervalScale {
  /** Share of the width at which a value (in the reader's unit) lies, 0 to 1. */
  at: (value: number) => number
  ticks: Tick[]
  minor: number[]
}

const PADDING = 0.06
/** Decades that are shown at least: between 1, 2, 5 and 10 no gap is wider, so that there is always a tick. */
const LEAST_SPAN = 0.45

const decades = (low: number, high: number) => {
  const first = Math.floor(low)
  return Array.from({ length: Math.ceil(high) - first + 1 }, (_, i) => first + i)
}

/** 1 and 3 of each decade; 1, 2 and 5 where less than a decade is shown, the decades alone where many are. */
function labelled(low: number, high: number): number[] {
  const span = high - low
  const steps = span > 4 ? [1] : span > 1.1 ? [1, 3] : [1, 2, 5]
  return decades(low, high).flatMap((power) => steps.map((step) => Number(`${step}e${power}`)))
}

const within = (low: number, high: number) => (value: number) => {
  const log = Math.log10(value)
  return log >= low && log <= high
}

/**
 * A logarithmic axis that holds all values, with round ticks.
 * @param values positive, in the reader's unit; at least one
 */
export function intervalScale(values: readonly number[]): IntervalScale {
  const logs = values.map(Math.log10)
  const [least, most] = [Math.min(...logs), Math.max(...logs)]
  const padding = Math.max(PADDING * (most - least), (LEAST_SPAN - (most - least)) / 2)
  const [low, high] = [least - padding, most + padding]
  const nine = decades(low, high).flatMap((power) => [1, 2, 3, 4, 5, 6, 7, 8, 9].map((n) => Number(`${n}e${power}`)))
  return {
    at: (value) => (Math.log10(value) - low) / (high - low),
    ticks: labelled(low, high)
      .filter(within(low, high))
      .map((value) => ({ value, label: formatNumber(value, { trim: true }) })),
    minor: nine.filter(within(low, high)),
  }
}
