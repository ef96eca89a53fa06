import type { OtherEstimate } from '#shared/hydraulics/analysis.ts'
import { logAxis, powersIn, shareOf, tickText, type Axis } from './axis.ts'

/** A positive quantity with its interval, in the reader's unit. */
export interface ForestEstimate extends Pick<OtherEstimate, 'value' | 'low' | 'high' | 'determined'> {
  key: string
}

/** Where value and interval stand along the axis, 0 to 1; an end that lies beyond the axis is cut off there. */
export interface ForestMark {
  key: string
  value: number
  low: number
  high: number
  cutLow: boolean
  cutHigh: boolean
  determined: boolean
}

export interface ForestPlot {
  marks: ForestMark[]
  ticks: { share: number; text: string }[]
}

/** Intervals are drawn to this factor beyond the outermost values: one without end would flatten all others. */
const BEYOND = 10
const MOST_TICKS = 7

/** Estimates of one quantity under each other on one logarithmic axis; null where there is none. */
export function forestPlot(estimates: readonly ForestEstimate[]): ForestPlot | null {
  const values = estimates.map(({ value }) => value).filter((value) => value > 0)
  if (values.length === 0) return null
  const [least, most] = [Math.min(...values) / BEYOND, Math.max(...values) * BEYOND]
  const cut = (value: number) => Math.max(least, Math.min(most, value))
  const axis = logAxis(
    estimates.flatMap(({ low, high, value }) => [cut(low), cut(high), value]),
    '',
    { air: 0.06 },
  )
  const marks = estimates
    .filter(({ value }) => value > 0)
    .map(({ key, value, low, high, determined }) => ({
      key,
      value: shareOf(axis, value),
      low: shareOf(axis, cut(low)),
      high: shareOf(axis, cut(high)),
      cutLow: low < least,
      cutHigh: high > most,
      determined,
    }))
  return { marks, ticks: apart(ticksOf(axis).map((value) => ({ share: shareOf(axis, value), text: tickText(value) }))) }
}

/** Width of a letter of the tick labels in the narrowest plot, as a share of it. */
const LETTER = 0.026

/** Leaves out what would be written over its neighbour. */
function apart(ticks: ForestPlot['ticks']): ForestPlot['ticks'] {
  let last: ForestPlot['ticks'][number] | null = null
  return ticks.filter((tick) => {
    const fits = last === null || tick.share - last.share >= (LETTER * (tick.text.length + last.text.length + 1)) / 2
    if (fits) last = tick
    return fits
  })
}

/** Digits of every power of ten that are written, coarse first. */
const DIGITS = [
  [1, 2, 5],
  [1, 1.5, 2, 3, 4, 5, 6, 7, 8, 9],
]
const FEWEST_TICKS = 3

/** Round numbers: the coarsest that are enough to read by, powers of ten alone where those are too many. */
function ticksOf(axis: Axis): number[] {
  const [coarse = [], fine = []] = DIGITS.map((digits) => ticksBy(axis, digits))
  if (coarse.length > MOST_TICKS) return powersIn(axis)
  return coarse.length < FEWEST_TICKS ? fine : coarse
}

function ticksBy(axis: Axis, digits: number[]): number[] {
  const first = Math.floor(Math.log10(axis.min))
  const last = Math.floor(Math.log10(axis.max))
  const all = Array.from({ length: last - first + 1 }, (_, i) => first + i).flatMap((power) =>
    digits.map((digit) => Number(`${digit}e${power}`)),
  )
  return all.filter((value) => value >= axis.min && value <= axis.max)
}
