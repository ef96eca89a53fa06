import type { AnalysisInputs, AnalysisOptions, Finding, MethodOutcome } from './analysis.ts'
import { casingFinding } from './casing-storage.ts'
import { storativityFromZero, transmissivityFromSlope } from './cooper-jacob.ts'
import { drawdownAtStop, logEquivalentTime, type StopDrawdown } from './equivalent-time.ts'
import {
  aquiferFindings,
  determinationFindings,
  distanceFindings,
  fitFindings,
  handLineFinding,
  pumpedStorageFinding,
  rateFindings,
  storageClassOf,
} from './findings.ts'
import { storativity, transmissivity, type Method } from './method.ts'
import { parameterEstimate, scaledEstimate, UNDETERMINED_FACTOR } from './parameter-estimate.ts'
import { lateWindow } from './proposed-window.ts'
import { rateHistory, type RateHistory } from './rates.ts'
import { casingOver, recoveryCurve, recoveryExtras, recoveryNeeds, recoveryOptions } from './recovery-common.ts'
import { lateRecoveryStart } from './recovery-start.ts'
import { largest, recoveryPhase, requireReadings, selectReadings, type Selected } from './selection.ts'
import { LARGEST_U, smallUFinding, theisU, timeOfU } from './small-u.ts'
import { lineResiduals, slopeSd, storageSd, straightLine, zeroAbscissa, type StraightLine } from './straight-line.ts'
import { thinningFactor, thinningFindings, thinningGuard } from './unconfined.ts'
import { distanceError, radiusOf } from './wells.ts'

/** Everything known once the line is drawn. */
interface Drawn {
  history: RateHistory
  well: Selected
  stop: StopDrawdown
  line: StraightLine
}

function run(inputs: AnalysisInputs, options: AnalysisOptions): MethodOutcome {
  const history = rateHistory(inputs.rates)
  const stop = drawdownAtStop(inputs, options, history)
  const window = options.window ?? proposed(inputs, options, history, stop)
  const selection = selectReadings(inputs, options, recoveryPhase(history, window))
  requireReadings(selection, 3)
  const well = selection.wells[0] as Selected
  const last_s = well.time_s.at(-1) as number
  thinningGuard(options, last_s)
  const line = straightLine(abscissas(history, options, well), recovered(well, stop), {
    hand: options.line ?? null,
    time_s: well.time_s,
  })
  const drawn = { history, well, stop, line }
  const { T, S } = estimates(drawn, inputs, options)
  const observed = well.series.role === 'observation'
  return {
    T,
    S: observed ? S : null,
    storageClass: observed ? storageClassOf(inputs, options, last_s) : null,
    extras: extrasOf(drawn),
    // What the line misses of the recovery is missing from the residual drawdown with the other sign.
    residuals: lineResiduals(line, well).map((residual) => ({ ...residual, residual_m: -residual.residual_m })),
    fit: line.summary,
    findings: [
      ...ageFindings(drawn, T.value, S.value),
      ...(options.line ? [handLineFinding] : []),
      ...(options.rateHistory === 'equivalent' ? rateFindings(history, history.stop_s as number) : []),
      ...aquiferFindings(inputs, options, last_s),
      ...thinningFindings(Math.max(stop.measured_m, largest(well.measured_m)), inputs, options),
      ...distanceFindings([well]),
      ...fitFindings(line.summary),
      ...determinationFindings(observed ? { T, S } : { T }),
    ],
    leftOut: selection.leftOut,
  }
}

const abscissas = (history: RateHistory, options: AnalysisOptions, { elapsed_s }: Selected) =>
  elapsed_s.map((elapsed) => logEquivalentTime(history, options, elapsed))

/** How far the level has come back since the stop. */
const recovered = ({ drawdown_m }: Selected, { drawdown_m: stopped_m }: StopDrawdown) =>
  drawdown_m.map((drawdown) => stopped_m - drawdown)

function proposed(inputs: AnalysisInputs, options: AnalysisOptions, history: RateHistory, stop: StopDrawdown) {
  const well = selectReadings(inputs, options, recoveryPhase(history, null)).wells[0]
  if (!well) return null
  const readings = { time_s: well.time_s, x: abscissas(history, options, well), drawdown_m: recovered(well, stop) }
  return lateWindow(readings, history.lastRate_m3_s, (T) => lateRecoveryStart(inputs, options, history, T) ?? 0)
}

function estimates({ history, well, stop, line }: Drawn, inputs: AnalysisInputs, options: AnalysisOptions) {
  const { freedom } = line
  const T = transmissivityFromSlope(history.lastRate_m3_s, line.slope)
  const S = storativityFromZero(T, 10 ** zeroAbscissa(line), radiusOf(well.series))
  // The drawdown at the stop moves the whole line up or down, and with it the moment at which it reaches zero.
  const byStop = (Math.LN10 * stop.sd_m) / line.slope
  const uncertainS = {
    fitSd: storageSd(line, 1),
    freedom,
    otherSd: Math.hypot(inputs.rateError, 2 * distanceError(well.series), byStop),
  }
  const uncertainT = { fitSd: slopeSd(line), freedom, otherSd: inputs.rateError }
  const factor = thinningFactor(inputs, options, [{ measured_m: [stop.measured_m] }])
  return {
    T: parameterEstimate(T, uncertainT, UNDETERMINED_FACTOR.T),
    S: scaledEstimate(parameterEstimate(S, uncertainS, UNDETERMINED_FACTOR.S), factor),
  }
}

/** The approximation must hold from the first reading since the stop, and when pumping stopped. */
function ageFindings({ history, well: { series, time_s }, stop }: Drawn, T: number, S: number): Finding[] {
  const first_s = time_s[0] as number
  const stopFinding: Finding[] =
    stop.readings < 3 ? [{ code: 'stop-drawdown-single', severity: 'note', params: { late_s: stop.late_s } }] : []
  if (series.role === 'pumped')
    return [casingFinding(T, series, first_s, 'straightLine'), pumpedStorageFinding, ...stopFinding]
  const distance = radiusOf(series)
  const pumped_s = (history.stop_s as number) - history.start_s
  const u = theisU(T, S, distance, Math.min(first_s, pumped_s))
  return [smallUFinding(u, timeOfU(T, S, distance, LARGEST_U)), ...stopFinding]
}

function extrasOf({ history, well, stop, line }: Drawn): Record<string, number> {
  return {
    slope_m: line.slope,
    intercept_m: line.intercept,
    zero_s: 10 ** zeroAbscissa(line),
    stop_drawdown_m: stop.drawdown_m,
    ...recoveryExtras(history, well),
  }
}

const curve = recoveryCurve((history, options, { stop_drawdown_m = NaN, slope_m = NaN, intercept_m = NaN }, time) => {
  const back = slope_m * logEquivalentTime(history, options, time) + intercept_m
  return stop_drawdown_m - back
})

export const recoveryEquivalentTime: Method = {
  id: 'recovery-equivalent-time',
  label: 'Recovery by equivalent time (Agarwal)',
  ...recoveryNeeds,
  source: 'Agarwal 1980; Cooper & Jacob 1946',
  unknowns: [transmissivity, storativity],
  options: recoveryOptions('elapsed'),
  validity: [
    {
      code: 'u-large',
      statement: 'u = r²S/(4Tt) is at most 0.05 at the first reading since the stop, and at the stop',
      source: 'Agarwal 1980',
    },
    casingOver,
  ],
  run,
  curve,
}
