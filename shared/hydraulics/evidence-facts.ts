import type { AnalysisInputs, AnalysisOptions, AnalysisResult, Finding } from './analysis.ts'
import { logDerivative } from './derivative.ts'
import type { EvidenceFacts } from './evidence.ts'
import { radialFlowSpan } from './radial-flow.ts'
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
    radialFlowShown: radialFlowShown(inputs, options),
    conditionsHold: !result.findings.some(doubtsT),
    storageClass: result.S ? result.storageClass : null,
    distanceError: Math.max(0, ...observed.map(distanceError)),
    ownLogSdT: result.T?.logSd ?? null,
    ownLogSdS: result.S?.logSd ?? null,
  }
}

/** A level derivative in every well chosen, and in an unconfined aquifer one that lasts past delayed drainage. */
function radialFlowShown(inputs: AnalysisInputs, options: AnalysisOptions): boolean {
  const history = rateHistory(inputs.rates)
  const { wells } = selectReadings(inputs, options, pumpingPhase(history, null))
  return wells.every(({ time_s, drawdown_m }) => {
    const span = radialFlowSpan(logDerivative(time_s, drawdown_m))
    return span !== null && (inputs.aquifer !== 'unconfined' || isAfterDrainage(options, time_s.at(-1) ?? 0))
  })
}
