import type {
  AnalysisInputs,
  AnalysisOptions,
  Finding,
  FittedCurve,
  MethodOutcome,
  ParameterEstimate,
} from './analysis.ts'
import { casingFinding } from './casing-storage.ts'
import {
  aquiferFindings,
  determinationFindings,
  distanceFindings,
  fitFindings,
  handLineFinding,
  pumpedStorageFinding,
  rateFindings,
  storageClassOf,
  windowFindings,
} from './findings.ts'
import { sharedOptions, storativity, transmissivity, type Method } from './method.ts'
import { parameterEstimate, scaledEstimate, UNDETERMINED_FACTOR } from './parameter-estimate.ts'
import { proposedWindow } from './proposed-window.ts'
import { meanRate, rateHistory, type RateHistory } from './rates.ts'
import { largest, pumpingPhase, requireReadings, selectReadings, type Selected } from './selection.ts'
import { LARGEST_U, smallUFinding, STRAIGHT_LINE_CONSTANT, theisU, timeOfU } from './small-u.ts'
import { lineResiduals, slopeSd, storageSd, straightLine, zeroAbscissa, type StraightLine } from './straight-line.ts'
import { drawnDrawdown, thinningFactor, thinningFindings, thinningGuard } from './unconfined.ts'
import { distanceError, radiusOf } from './wells.ts'

/** T = ln(10)·Q/(4πΔs), Δs the drawdown per factor of ten in time. Source: Cooper & Jacob 1946; ASTM D4105. */
export const transmissivityFromSlope = (rate_m3_s: number, slope_m: number) =>
  (Math.LN10 * rate_m3_s) / (4 * Math.PI * slope_m)

/** S = 4e^-γ·T·t0/r², t0 the time at which the line reaches zero drawdown. Source: as above. */
export const storativityFromZero = (T: number, zero_s: number, distance_m: number) =>
  (STRAIGHT_LINE_CONSTANT * T * zero_s) / distance_m ** 2

function run(inputs: AnalysisInputs, options: AnalysisOptions): MethodOutcome {
  const history = rateHistory(inputs.rates)
  const window = options.window ?? proposedWindow(inputs, options, history)
  const selection = selectReadings(inputs, options, pumpingPhase(history, window))
  requireReadings(selection, 3)
  const well = selection.wells[0] as Selected
  const last_s = well.time_s.at(-1) as number
  thinningGuard(options, last_s)
  const line = straightLine(well.time_s.map(Math.log10), well.drawdown_m, {
    hand: options.line ?? null,
    time_s: well.time_s,
  })
  const rate = meanRate(history, history.start_s + last_s)
  const { T, S } = estimates(line, rate, inputs, options, well)
  return {
    T,
    S: well.series.role === 'pumped' ? null : S,
    storageClass: well.series.role === 'pumped' ? null : storageClassOf(inputs, options, last_s),
    extras: extrasOf(line, rate, well),
    residuals: lineResiduals(line, well),
    fit: line.summary,
    findings: findingsOf(inputs, options, { history, well, line, T, S }),
    leftOut: selection.leftOut,
  }
}

function estimates(line: StraightLine, rate: number, inputs: AnalysisInputs, options: AnalysisOptions, well: Selected) {
  const distance = radiusOf(well.series)
  const T = transmissivityFromSlope(rate, line.slope)
  const S = storativityFromZero(T, 10 ** zeroAbscissa(line), distance)
  const { freedom } = line
  const uncertainT = { fitSd: slopeSd(line), freedom, otherSd: inputs.rateError }
  const uncertainS = {
    fitSd: storageSd(line, 1),
    freedom,
    otherSd: Math.hypot(inputs.rateError, 2 * distanceError(well.series)),
  }
  return {
    T: parameterEstimate(T, uncertainT, UNDETERMINED_FACTOR.T),
    S: scaledEstimate(parameterEstimate(S, uncertainS, UNDETERMINED_FACTOR.S), thinningFactor(inputs, options, [well])),
  }
}

function extrasOf(line: StraightLine, rate: number, well: Selected): Record<string, number> {
  return {
    slope_m: line.slope,
    intercept_m: line.intercept,
    zero_s: 10 ** zeroAbscissa(line),
    rate_m3_s: rate,
    window_from_s: well.time_s[0] as number,
    window_to_s: well.time_s.at(-1) as number,
  }
}

interface Context {
  history: RateHistory
  well: Selected
  line: StraightLine
  T: ParameterEstimate
  S: ParameterEstimate
}

function findingsOf(
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  { history, well, line, T, S }: Context,
): Finding[] {
  const first_s = well.time_s[0] as number
  const last_s = well.time_s.at(-1) as number
  const distance = radiusOf(well.series)
  const observed = well.series.role === 'observation'
  const u = theisU(T.value, S.value, distance, first_s)
  return [
    observed
      ? smallUFinding(u, timeOfU(T.value, S.value, distance, LARGEST_U))
      : casingFinding(T.value, well.series, first_s, 'straightLine'),
    ...(observed ? [] : [pumpedStorageFinding]),
    ...(options.line ? [handLineFinding] : []),
    ...rateFindings(history, history.start_s + last_s),
    ...aquiferFindings(inputs, options, last_s),
    ...thinningFindings(largest(well.measured_m), inputs, options),
    ...windowFindings(first_s, last_s),
    ...distanceFindings([well]),
    ...fitFindings(line.summary),
    ...determinationFindings(observed ? { T, S } : { T }),
  ]
}

function curve(
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  { extras }: MethodOutcome,
  times_s: number[],
): FittedCurve[] {
  const { start_s, stop_s } = rateHistory(inputs.rates)
  const drawdown_m = times_s.map((time) => {
    if (time <= start_s || (stop_s !== null && time > stop_s)) return null
    const modelled = (extras.intercept_m as number) + (extras.slope_m as number) * Math.log10(time - start_s)
    return drawnDrawdown(modelled, inputs, options)
  })
  return options.wellIds.map((wellId) => ({ wellId, drawdown_m }))
}

export const cooperJacob: Method = {
  id: 'cooper-jacob',
  label: 'Time–drawdown line (Cooper–Jacob)',
  version: 1,
  source: 'Cooper & Jacob 1946; ASTM D4105',
  family: 'line',
  aquifers: ['confined'],
  needs: { phase: 'pumping', wells: { least: 1, most: 1, roles: ['pumped', 'observation'] } },
  unknowns: [transmissivity, storativity],
  options: [
    sharedOptions.window,
    { name: 'line', label: 'Line drawn by hand', kind: 'line', abscissa: 'elapsed' },
    sharedOptions.thinning,
    sharedOptions.afterDrainage,
    sharedOptions.readingsPerCycle,
  ],
  validity: [
    { code: 'u-large', statement: 'u = r²S/(4Tt) is at most 0.05 in the window', source: 'Cooper & Jacob 1946' },
    {
      code: 'casing-storage',
      statement: 'At the pumped well the window begins after 250 r_c²/T',
      source: 'Papadopulos & Cooper 1967',
    },
    { code: 'rate-varied', statement: 'The rate stayed within 10 % of its mean', source: 'common practice' },
  ],
  run,
  curve,
}
