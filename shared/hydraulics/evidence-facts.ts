import type { AnalysisInputs, AnalysisOptions, AnalysisResult, Finding } from './analysis.ts'
import { methods } from './catalogue.ts'
import { logDerivative } from './derivative.ts'
import type { EvidenceFacts } from './evidence.ts'
import { showsRadialFlow, type WantedLevel } from './radial-flow.ts'
import { rateHistory } from './rates.ts'
import { chosenSeries, pumpingPhase, selectReadings } from './selection.ts'
import { isAfterDrainage } from './unconfined.ts'
import { distanceError } from './wells.ts'

/** Findings that put T itself in doubt; others concern S, K or only ask for a second look. */
const DOUBTS = new Set([
  'u-large',
  'casing-storage',
  'casing-unknown',
  'rate-varied',
  'aquifer-leaky',
  'aquifer-unlike',
  'drainage-not-over',
  'thinning-offered',
  'thinning-too-large',
  'recovery-ratio-high',
  'recovery-ratio-low',
  'pumped-well-in-joint-fit',
  'not-converged',
  'at-bound',
  'limit-transmissivity',
])
const doubtsT = ({ code, params }: Finding) =>
  DOUBTS.has(code) || (code === 'not-determined' && params.parameter === 'T')

/** Facts of an analysed pumping test. Whether the recovery agrees is known only beside the test's other analyses. */
export function evidenceFacts(
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  result: AnalysisResult,
  { recoveryAgrees }: { recoveryAgrees: boolean },
): EvidenceFacts {
  const chosen = chosenSeries(inputs, options)
  const observed = chosen.filter(({ role }) => role === 'observation')
  return {
    origin: 'pumping-test',
    aquifer: inputs.aquifer,
    observationWell: observed.length > 0,
    recoveryAgrees,
    radialFlowShown: radialFlowShown(inputs, options, wantedLevel(options, result)),
    conditionsHold: !result.findings.some(doubtsT),
    storageClass: result.S ? result.storageClass : null,
    distanceError: Math.max(0, ...observed.map(distanceError)),
    ownLogSdT: result.T?.logSd ?? null,
    ownLogSdS: result.S?.logSd ?? null,
  }
}

/** Where a line in time was drawn; and whether a curve of radial flow alone was fitted. */
function wantedLevel({ boundaries = [] }: AnalysisOptions, { method, extras }: AnalysisResult): WantedLevel {
  const { family, aquifers } = methods[method]
  const { window_from_s: from_s, window_to_s: to_s } = extras
  return {
    window: family === 'line' && from_s !== undefined && to_s !== undefined ? { from_s, to_s } : null,
    toTheEnd: family === 'curve' && aquifers.includes('confined') && boundaries.length === 0,
  }
}

/** Radial flow in every well chosen, and in an unconfined aquifer readings that last past delayed drainage. */
function radialFlowShown(inputs: AnalysisInputs, options: AnalysisOptions, wanted: WantedLevel): boolean {
  const history = rateHistory(inputs.rates)
  const { wells } = selectReadings(inputs, options, pumpingPhase(history, null))
  return wells.every(({ time_s, drawdown_m }) => {
    const shown = showsRadialFlow(logDerivative(time_s, drawdown_m), wanted)
    return shown && (inputs.aquifer !== 'unconfined' || isAfterDrainage(options, time_s.at(-1) ?? 0))
  })
}
