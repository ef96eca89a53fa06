import type { AnalysisInputs, AnalysisOptions } from './analysis.ts'
import { straightLineStart } from './proposed-window.ts'
import { meanRate, type RateHistory } from './rates.ts'
import { pumpingPhase, selectReadings } from './selection.ts'

/** Time since the stop from which u' ≤ 0.05, S being taken from the last drawdown while pumping; null without one. */
export function lateRecoveryStart(
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  history: RateHistory,
  T: number,
): number | null {
  const well = selectReadings(inputs, options, pumpingPhase(history, null)).wells[0]
  const late_s = well?.time_s.at(-1)
  if (!well || late_s === undefined) return null
  const late_m = well.drawdown_m.at(-1) as number
  return straightLineStart(well.series, T, { rate: meanRate(history, history.start_s + late_s), late_s, late_m })
}
