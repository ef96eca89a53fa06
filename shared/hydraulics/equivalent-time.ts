import { AnalysisError } from './analysis-error.ts'
import type { AnalysisInputs, AnalysisOptions } from './analysis.ts'
import { volumeUntil, type RateHistory } from './rates.ts'
import { pumpingPhase, selectReadings, type Selected } from './selection.ts'
import { propagated, regressionLine } from './straight-line.ts'

/** Readings in the last part of the last step, this share of it, are taken to lie on one line in the logarithm of time. */
const LATE_SHARE = 0.5

/**
 * log10 of the equivalent time te = tp·t'/(tp + t'), at which a drawdown under constant rate would equal the recovery.
 * For a varying rate it is the superposition of the logarithms of every step, scaled by the last rate, so that slope
 * and formula stay the same; with 'equivalent', tp is the pumped volume over the last rate.
 * Source: Agarwal 1980; superposition of the logarithmic approximation.
 */
export function logEquivalentTime(history: RateHistory, options: AnalysisOptions, elapsed_s: number): number {
  const stop_s = history.stop_s as number
  const since = elapsed_s - stop_s
  if (options.rateHistory === 'equivalent') {
    const pumped_s = volumeUntil(history, stop_s) / history.lastRate_m3_s
    return Math.log10((pumped_s * since) / (pumped_s + since))
  }
  return history.increments
    .filter(({ start_s }) => start_s < stop_s)
    .reduce(
      (sum, { start_s, change_m3_s }) =>
        sum + (change_m3_s / history.lastRate_m3_s) * Math.log10((stop_s - start_s) / (elapsed_s - start_s)),
      Math.log10(since),
    )
}

/** Drawdown at the moment pumping stopped. */
export interface StopDrawdown {
  drawdown_m: number
  measured_m: number
  sd_m: number
  /** Readings behind it; a single one is taken as it is. */
  readings: number
  /** Time from the last reading to the stop. */
  late_s: number
}

/**
 * Drawdown at the stop from the line through the late readings of pumping, in the logarithm of time; the last reading
 * where there are fewer than three.
 * @throws AnalysisError when no reading of pumping is used, or pumping never stopped
 */
export function drawdownAtStop(inputs: AnalysisInputs, options: AnalysisOptions, history: RateHistory): StopDrawdown {
  if (history.stop_s === null) throw new AnalysisError('analysis/no-recovery')
  const well = selectReadings(inputs, { ...options, readingsPerCycle: null }, pumpingPhase(history, null)).wells[0]
  const last_s = well?.time_s.at(-1)
  if (!well || last_s === undefined) throw new AnalysisError('analysis/no-stop-drawdown')
  const stop_s = history.stop_s
  const lastChange_s = history.increments.filter(({ start_s }) => start_s < stop_s).at(-1)?.start_s ?? history.start_s
  const from_s = stop_s - LATE_SHARE * (stop_s - lastChange_s) - history.start_s
  const late = well.time_s.flatMap((time, i) => (time >= from_s ? [i] : []))
  const single = {
    drawdown_m: well.drawdown_m.at(-1) as number,
    measured_m: well.measured_m.at(-1) as number,
    sd_m: 0,
    readings: 1,
    late_s: stop_s - history.start_s - last_s,
  }
  return late.length < 3 ? single : { ...single, ...lineAtStop(well, late, history), readings: late.length }
}

function lineAtStop(well: Selected, late: number[], { increments, stop_s, lastRate_m3_s, start_s }: RateHistory) {
  const running = increments.filter((increment) => increment.start_s < (stop_s as number))
  // Counted from the stop, so that the line's height there is its intercept.
  const abscissa = (elapsed_s: number) =>
    running.reduce(
      (sum, { start_s: from_s, change_m3_s }) =>
        sum + (change_m3_s / lastRate_m3_s) * Math.log10((elapsed_s - from_s) / ((stop_s as number) - from_s)),
      0,
    )
  const time_s = late.map((i) => well.time_s[i] as number)
  const line = regressionLine(
    time_s.map((time) => abscissa(start_s + time)),
    late.map((i) => well.drawdown_m[i] as number),
    { time_s },
  )
  return { drawdown_m: line.intercept, sd_m: propagated(line, 1, 0) }
}
