import { inverseExponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import { linearRegression } from '#shared/numerics/linear-regression.ts'
import type { AnalysisInputs, AnalysisOptions, Series, TimeWindow } from './analysis.ts'
import { CASING_STORAGE } from './casing-storage.ts'
import { meanRate, type RateHistory } from './rates.ts'
import { pumpingPhase, selectReadings } from './selection.ts'
import { LARGEST_U, timeOfU } from './small-u.ts'
import { radiusOf } from './wells.ts'

/** A line needs some readings and some length; a proposal never goes below these. */
const FEWEST = 6
const SHORTEST = 10 ** 0.5
const MOST_ROUNDS = 20

/** Readings on the axis of a straight-line method, in order of time. */
export interface LineReadings {
  time_s: number[]
  /** Logarithmic abscissa. */
  x: number[]
  drawdown_m: number[]
}

/** Window of the pumping phase that time–drawdown proposes; null when there are too few readings to choose from. */
export function proposedWindow(
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  history: RateHistory,
): TimeWindow | null {
  const well = selectReadings(inputs, options, pumpingPhase(history, null)).wells[0]
  const late_s = well?.time_s.at(-1)
  if (!well || late_s === undefined) return null
  const rate = meanRate(history, history.start_s + late_s)
  const late_m = well.drawdown_m.at(-1) as number
  const readings = { ...well, x: well.time_s.map(Math.log10) }
  return lateWindow(readings, rate, (T) => straightLineStart(well.series, T, { rate, late_s, late_m }))
}

/** Moment from which a straight line holds, given T and one late drawdown, from which S follows. */
export function straightLineStart(
  series: Series,
  T: number,
  { rate, late_s, late_m }: { rate: number; late_s: number; late_m: number },
): number {
  if (series.role === 'pumped') return (CASING_STORAGE.straightLine * (series.casingRadius_m ?? 0) ** 2) / T
  const well = (4 * Math.PI * T * late_m) / rate
  if (!(well > 0)) return 0
  const distance = radiusOf(series)
  const S = (4 * T * late_s * inverseExponentialIntegral(well)) / distance ** 2
  return timeOfU(T, S, distance, LARGEST_U)
}

/**
 * Window of late readings in which a straight line holds. T and the moment from which it holds depend on each other, so
 * the window is found by iteration; where readings end too early it keeps the last half factor of ten, and the
 * method's findings say so.
 */
export function lateWindow(readings: LineReadings, rate: number, startFor: (T: number) => number): TimeWindow | null {
  const { time_s } = readings
  const last = time_s.at(-1)
  if (last === undefined || time_s.length < FEWEST) return null
  const latestStart = Math.min(last / SHORTEST, time_s[time_s.length - FEWEST] as number)
  let from = Math.min(last / 10, latestStart)
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const T = transmissivityAfter(readings, rate, from)
    if (!(T > 0 && T < Infinity)) break
    const next = Math.min(startFor(T), latestStart)
    if (Math.abs(next - from) <= 1e-9 * last) break
    from = next
  }
  return { from_s: from, to_s: last }
}

function transmissivityAfter({ time_s, x, drawdown_m }: LineReadings, rate: number, from: number): number {
  const first = time_s.findIndex((time) => time >= from)
  const abscissas = x.slice(first)
  if (abscissas.every((value) => value === abscissas[0])) return NaN
  return (Math.LN10 * rate) / (4 * Math.PI * linearRegression(abscissas, drawdown_m.slice(first)).slope)
}
