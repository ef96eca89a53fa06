import type { AnalysisInputs, AnalysisOptions, Finding, MethodOutcome, ParameterEstimate } from './analysis.ts'
import { casingFinding } from './casing-storage.ts'
import { transmissivityFromSlope } from './cooper-jacob.ts'
import { determinationFindings, fitFindings, handLineFinding } from './findings.ts'
import { transmissivity, type Method } from './method.ts'
import { parameterEstimate, UNDETERMINED_FACTOR } from './parameter-estimate.ts'
import { lateWindow } from './proposed-window.ts'
import { rateHistory, type RateHistory } from './rates.ts'
import { casingOver, recoveryCurve, recoveryExtras, recoveryNeeds, recoveryOptions } from './recovery-common.ts'
import { lateRecoveryStart } from './recovery-start.ts'
import { ratioFinding, recoveryAbscissa, storageRatio, type StorageRatio } from './recovery-line.ts'
import { largest, recoveryPhase, requireReadings, selectReadings, type Selected } from './selection.ts'
import { LARGEST_U, smallUFinding } from './small-u.ts'
import { lineResiduals, slopeSd, straightLine, type StraightLine } from './straight-line.ts'
import { thinningFindings, thinningGuard } from './unconfined.ts'

function run(inputs: AnalysisInputs, options: AnalysisOptions): MethodOutcome {
  const history = rateHistory(inputs.rates)
  const selection = selectReadings(
    inputs,
    options,
    recoveryPhase(history, options.window ?? proposed(inputs, options, history)),
  )
  requireReadings(selection, 3)
  const well = selection.wells[0] as Selected
  thinningGuard(options, well.elapsed_s.at(-1) as number)
  const x = well.elapsed_s.map((elapsed) => recoveryAbscissa(history, options, elapsed))
  const line = straightLine(x, well.drawdown_m, { hand: options.line ?? null, time_s: well.time_s })
  const uncertainty = { fitSd: slopeSd(line), freedom: line.freedom, otherSd: inputs.rateError }
  const T = parameterEstimate(
    transmissivityFromSlope(history.lastRate_m3_s, line.slope),
    uncertainty,
    UNDETERMINED_FACTOR.T,
  )
  const ratio = storageRatio(line)
  return {
    T,
    S: null,
    storageClass: null,
    extras: extrasOf(line, ratio, history, well),
    residuals: lineResiduals(line, well),
    fit: line.summary,
    findings: [
      ...ageFindings(inputs, options, history, well, T),
      ratioFinding(ratio),
      ...(options.line ? [handLineFinding] : []),
      ...thinningFindings(largest(well.measured_m), inputs, options),
      ...fitFindings(line.summary),
      ...determinationFindings({ T }),
    ],
    leftOut: selection.leftOut,
  }
}

/** Late recovery at an observation well (u' ≤ 0.05), recovery after casing storage at the pumped well. */
function ageFindings(
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  history: RateHistory,
  { series, time_s }: Selected,
  T: ParameterEstimate,
): Finding[] {
  const first_s = time_s[0] as number
  if (series.role === 'pumped') return [casingFinding(T.value, series, first_s, 'straightLine')]
  const validFrom_s = lateRecoveryStart(inputs, options, history, T.value)
  // u falls as 1/t, so the limit at the moment it is reached gives u at the first reading.
  return validFrom_s === null || validFrom_s === 0
    ? [{ code: 'u-unknown', severity: 'note', params: {} }]
    : [smallUFinding((LARGEST_U * validFrom_s) / first_s, validFrom_s)]
}

function proposed(inputs: AnalysisInputs, options: AnalysisOptions, history: RateHistory) {
  const well = selectReadings(inputs, options, recoveryPhase(history, null)).wells[0]
  if (!well) return null
  const x = well.elapsed_s.map((elapsed) => recoveryAbscissa(history, options, elapsed))
  return lateWindow({ ...well, x }, history.lastRate_m3_s, (T) => lateRecoveryStart(inputs, options, history, T) ?? 0)
}

function extrasOf(
  line: StraightLine,
  ratio: StorageRatio,
  history: RateHistory,
  well: Selected,
): Record<string, number> {
  return {
    slope_m: line.slope,
    intercept_m: line.intercept,
    storage_ratio: ratio.value,
    storage_ratio_low: ratio.low,
    storage_ratio_high: ratio.high,
    ...recoveryExtras(history, well),
  }
}

const curve = recoveryCurve(
  (history, options, { intercept_m = NaN, slope_m = NaN }, time) =>
    intercept_m + slope_m * recoveryAbscissa(history, options, time),
)

export const recovery: Method = {
  id: 'recovery',
  label: 'Recovery line (Theis)',
  ...recoveryNeeds,
  source: 'Theis 1935; ASTM D5269',
  unknowns: [transmissivity],
  options: recoveryOptions('time-ratio'),
  validity: [
    { code: 'u-large', statement: "u' = r²S/(4Tt') is at most 0.05 in the window", source: 'ASTM D5269' },
    casingOver,
    {
      code: 'recovery-ratio-high',
      statement: "The line reaches zero near t/t' = 1",
      source: 'Theis 1935; ASTM D5269',
    },
  ],
  run,
  curve,
}
