import { thinLogarithmically } from '#shared/numerics/logarithmic-thinning.ts'
import { AnalysisError } from './analysis-error.ts'
import type { AnalysisInputs, AnalysisOptions, LeftOut, LeftOutReason, Series, TimeWindow } from './analysis.ts'
import type { RateHistory } from './rates.ts'
import { thinnedDrawdown } from './unconfined.ts'

/** Default of AnalysisOptions.readingsPerCycle. */
export const READINGS_PER_CYCLE = 50

/** The readings of one well that a fit uses, in order of time, with positive `time_s`. */
export interface Selected {
  series: Series
  /** Time on the method's clock: since the start of pumping, or since the stop. */
  time_s: number[]
  elapsed_s: number[]
  measured_m: number[]
  /** Measured drawdown, corrected for thinning where asked. */
  drawdown_m: number[]
}

export interface SelectionRule {
  /** Moment from which the method's clock runs. */
  origin_s: number
  /** Readings after this moment are of another phase; null: no end. */
  end_s: number | null
  window: TimeWindow | null
  positiveOnly?: boolean
}

export interface Selection {
  wells: Selected[]
  leftOut: LeftOut[]
}

/** Pumping phase of a history as a selection rule. */
export function pumpingPhase(history: RateHistory, window: TimeWindow | null): SelectionRule {
  return { origin_s: history.start_s, end_s: history.stop_s, window: window && checkedWindow(window) }
}

/** Final rest of a history as a selection rule. @throws AnalysisError when pumping never stopped */
export function recoveryPhase(history: RateHistory, window: TimeWindow | null): SelectionRule {
  if (history.stop_s === null) throw new AnalysisError('analysis/no-recovery')
  return { origin_s: history.stop_s, end_s: null, window: window && checkedWindow(window) }
}

/** @throws AnalysisError for a well that is not in the inputs, or a series whose columns differ in length */
export function chosenSeries(inputs: AnalysisInputs, { wellIds }: AnalysisOptions): Series[] {
  if (wellIds.length === 0) throw new AnalysisError('analysis/no-wells')
  return [...new Set(wellIds)].map((wellId) => {
    const series = inputs.series.find((candidate) => candidate.wellId === wellId)
    if (!series) throw new AnalysisError('analysis/unknown-well', { wellId })
    const { elapsed_s, drawdown_m, included } = series
    if (elapsed_s.length !== drawdown_m.length || elapsed_s.length !== included.length) {
      throw new AnalysisError('analysis/uneven-series', { wellId })
    }
    return series
  })
}

/**
 * Chooses the readings to fit and accounts for every one that is left out.
 * @throws AnalysisError when all readings of a well have one time
 */
export function selectReadings(inputs: AnalysisInputs, options: AnalysisOptions, rule: SelectionRule): Selection {
  const wells: Selected[] = []
  const leftOut: LeftOut[] = []
  for (const series of chosenSeries(inputs, options)) {
    const counts = new Map<LeftOutReason, number>()
    const kept = sortedIndices(series, rule, counts)
    const times = kept.map((i) => (series.elapsed_s[i] as number) - rule.origin_s)
    if (times.length > 1 && times[0] === times.at(-1)) throw new AnalysisError('analysis/times-equal')
    const thinned = thinLogarithmically(times, perCycle(options))
    if (thinned.length < kept.length) counts.set('thinned', kept.length - thinned.length)
    const indices = thinned.map((i) => kept[i] as number)
    const measured = indices.map((i) => series.drawdown_m[i] as number)
    wells.push({
      series,
      time_s: thinned.map((i) => times[i] as number),
      elapsed_s: indices.map((i) => series.elapsed_s[i] as number),
      measured_m: measured,
      drawdown_m: thinnedDrawdown(measured, inputs, options),
    })
    counts.forEach((count, reason) => leftOut.push({ wellId: series.wellId, count, reason }))
  }
  return { wells, leftOut }
}

/** @throws AnalysisError when the wells together have fewer readings than the method needs */
export function requireReadings({ wells }: Selection, needed: number): void {
  const found = wells.reduce((sum, well) => sum + well.time_s.length, 0)
  if (found < needed) throw new AnalysisError('analysis/too-few-readings', { needed, found })
}

/** Largest of the values, not below zero; a spread into Math.max would overflow the stack on long logs. */
export const largest = (values: number[]) => values.reduce((most, value) => Math.max(most, value), 0)

function sortedIndices(series: Series, rule: SelectionRule, counts: Map<LeftOutReason, number>): number[] {
  const kept: number[] = []
  series.elapsed_s.forEach((elapsed, i) => {
    const reason = reasonAgainst(elapsed, series.drawdown_m[i] as number, series.included[i] as boolean, rule)
    if (reason) counts.set(reason, (counts.get(reason) ?? 0) + 1)
    else kept.push(i)
  })
  return kept.sort((a, b) => (series.elapsed_s[a] as number) - (series.elapsed_s[b] as number))
}

function reasonAgainst(
  elapsed: number,
  drawdown: number,
  included: boolean,
  rule: SelectionRule,
): LeftOutReason | null {
  if (!included) return 'excluded'
  if (!Number.isFinite(elapsed) || !Number.isFinite(drawdown)) return 'not-finite'
  const time = elapsed - rule.origin_s
  if (!(time > 0) || (rule.end_s !== null && elapsed > rule.end_s)) return 'outside-phase'
  if (rule.window && (time < rule.window.from_s || time > rule.window.to_s)) return 'outside-window'
  if (rule.positiveOnly && !(drawdown > 0)) return 'not-positive'
  return null
}

function perCycle({ readingsPerCycle = READINGS_PER_CYCLE }: AnalysisOptions): number | null {
  if (readingsPerCycle !== null && !(readingsPerCycle >= 1)) {
    throw new AnalysisError('analysis/bad-option', { option: 'readingsPerCycle' })
  }
  return readingsPerCycle
}

function checkedWindow(window: TimeWindow): TimeWindow {
  if (!(window.to_s > window.from_s) || !(window.from_s >= 0)) {
    throw new AnalysisError('analysis/bad-option', { option: 'window' })
  }
  return window
}
