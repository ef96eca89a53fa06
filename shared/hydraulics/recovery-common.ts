import type { AnalysisInputs, AnalysisOptions, FittedCurve, MethodOutcome } from './analysis.ts'
import { sharedOptions, type Method, type OptionSpec } from './method.ts'
import { rateHistory, type RateHistory } from './rates.ts'
import type { Selected } from './selection.ts'
import { drawnDrawdown } from './unconfined.ts'

/** What all methods of recovery ask for, whatever their line is drawn over. */
export const recoveryNeeds = {
  version: 1,
  family: 'recovery',
  aquifers: ['confined'],
  needs: { phase: 'recovery', wells: { least: 1, most: 1, roles: ['pumped', 'observation'] } },
} as const satisfies Partial<Method>

export const recoveryOptions = (abscissa: 'elapsed' | 'time-ratio'): OptionSpec[] => [
  { name: 'window', label: 'Window of time since the stop', kind: 'window', axis: 'since-stop' },
  { name: 'line', label: 'Line drawn by hand', kind: 'line', abscissa },
  {
    name: 'rateHistory',
    label: 'Rate that varied',
    kind: 'choice',
    values: ['superposition', 'equivalent'],
    default: 'superposition',
  },
  sharedOptions.thinning,
  sharedOptions.afterDrainage,
  sharedOptions.readingsPerCycle,
]

export const casingOver = {
  code: 'casing-storage',
  statement: 'At the pumped well the window begins after 250 r_c²/T',
  source: 'Papadopulos & Cooper 1967',
}

/** What was pumped and when it stopped, and the window of the line. */
export const recoveryExtras = (history: RateHistory, { time_s }: Selected): Record<string, number> => ({
  rate_m3_s: history.lastRate_m3_s,
  stop_s: history.stop_s as number,
  window_from_s: time_s[0] as number,
  window_to_s: time_s.at(-1) as number,
})

/** Residual drawdown of the line at an elapsed time. */
type LineDrawdown = (
  history: RateHistory,
  options: AnalysisOptions,
  extras: MethodOutcome['extras'],
  time_s: number,
) => number

/** The curve of a line that speaks of times after the stop alone. */
export const recoveryCurve =
  (drawdownAt: LineDrawdown): Method['curve'] =>
  (inputs: AnalysisInputs, options: AnalysisOptions, { extras }: MethodOutcome, times_s: number[]): FittedCurve[] => {
    const history = rateHistory(inputs.rates)
    const drawdown_m = times_s.map((time) =>
      time > (extras.stop_s as number)
        ? drawnDrawdown(drawdownAt(history, options, extras, time), inputs, options)
        : null,
    )
    return options.wellIds.map((wellId) => ({ wellId, drawdown_m }))
  }
