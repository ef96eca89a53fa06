import type { AnalysisInputs, AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { rateHistory, type RateHistory } from '#shared/hydraulics/rates.ts'
import { recoveryAbscissa } from '#shared/hydraulics/recovery-line.ts'
import type { PlotKind } from './plot-kinds.ts'

/** How a plot against time places a reading: elapsed seconds to abscissa and back, null where it has no place. */
export interface PlotClock {
  /** Moment from which the window of the methods on this plot is counted. */
  origin_s: number
  place(elapsed_s: number): number | null
  elapsed(x: number): number
}

/** Plots against time, the composite one before its times are divided by the squared distance; `unit_s` is the reader's unit of time in seconds. */
export function plotClock(
  kind: Exclude<PlotKind, 'distance'>,
  inputs: AnalysisInputs,
  options: Pick<AnalysisOptions, 'phase' | 'rateHistory'>,
  unit_s: number,
): PlotClock {
  const history = rateHistory(inputs.rates)
  if (kind === 'recovery') return ratioClock(history, options)
  const { start_s } = history
  const stop_s = options.phase === 'all' ? null : history.stop_s
  const elapsed = (x: number) => start_s + x * unit_s
  if (kind === 'linear') return { origin_s: start_s, elapsed, place: (time) => (time - start_s) / unit_s }
  const place = (time: number) =>
    time > start_s && (stop_s === null || time <= stop_s) ? (time - start_s) / unit_s : null
  return { origin_s: start_s, elapsed, place }
}

/** t/t', from large just after the stop towards 1; found back by halving, since a varied rate has no inverse in closed form. */
function ratioClock(history: RateHistory, options: Pick<AnalysisOptions, 'rateHistory'>): PlotClock {
  const stop_s = history.stop_s
  if (stop_s === null) return { origin_s: 0, place: () => null, elapsed: () => Number.NaN }
  const full = { wellIds: [], window: null, ...options }
  const place = (time: number) => (time > stop_s ? 10 ** recoveryAbscissa(history, full, time) : null)
  return { origin_s: stop_s, place, elapsed: (x) => stop_s + sinceStop(x, (since) => place(stop_s + since) as number) }
}

function sinceStop(x: number, ratio: (since_s: number) => number): number {
  let low = -6
  let high = 12
  for (let round = 0; round < 80; round++) {
    const middle = (low + high) / 2
    if (ratio(10 ** middle) > x) low = middle
    else high = middle
  }
  return 10 ** ((low + high) / 2)
}
