import { AnalysisError } from './analysis-error.ts'
import type {
  AnalysisInputs,
  AnalysisOptions,
  AnalysisResult,
  Finding,
  FittedCurve,
  ParameterEstimate,
} from './analysis.ts'
import { cooperJacob } from './cooper-jacob.ts'
import { curveMethod } from './curve-method.ts'
import { distanceDrawdown } from './distance-drawdown.ts'
import { correctionFindings, otherWellFindings } from './input-findings.ts'
import { keptResiduals } from './kept-residuals.ts'
import { limitFindings } from './limits.ts'
import type { Method } from './method.ts'
import { conductivityEstimate } from './parameter-estimate.ts'
import { rateHistory } from './rates.ts'
import { recovery } from './recovery.ts'
import { recoveryEquivalentTime } from './recovery-equivalent-time.ts'
import { chosenSeries } from './selection.ts'
import { largeDiameter, largeDiameterSkin } from './solutions/large-diameter.ts'
import { leakyPartialPenetration } from './solutions/leaky-partial-penetration.ts'
import { leakyStorage } from './solutions/leaky-storage.ts'
import { leaky } from './solutions/leaky.ts'
import { partialPenetration, partialPenetrationIsotropic } from './solutions/partial-penetration.ts'
import { unconfined } from './solutions/unconfined.ts'
import { steadyState } from './steady-state.ts'
import { theis } from './theis.ts'
import { radiusOf } from './wells.ts'

/** Every method the program knows. A new analytical solution is one more line: `curveMethod(solution)`. */
export const methods = {
  'cooper-jacob': cooperJacob,
  'distance-drawdown': distanceDrawdown,
  theis: curveMethod(theis),
  leaky: curveMethod(leaky),
  'leaky-storage': curveMethod(leakyStorage),
  unconfined: curveMethod(unconfined),
  'partial-penetration': curveMethod(partialPenetration),
  'partial-penetration-isotropic': curveMethod(partialPenetrationIsotropic),
  'leaky-partial-penetration': curveMethod(leakyPartialPenetration),
  'large-diameter': curveMethod(largeDiameter),
  'large-diameter-skin': curveMethod(largeDiameterSkin),
  recovery,
  'recovery-equivalent-time': recoveryEquivalentTime,
  'steady-state': steadyState,
} as const satisfies Record<string, Method>

export type MethodId = keyof typeof methods
export const methodIds = Object.keys(methods) as MethodId[]

/** Which readings a method looks at; values of no method of this catalogue come from pumping. */
export const phaseOfMethod = (id: string): Method['needs']['phase'] =>
  Object.hasOwn(methods, id) ? methods[id as MethodId].needs.phase : 'pumping'

/**
 * Analyses a pumping test.
 * @returns parameters with 95 % intervals in SI, findings, residuals (thinned where a well has very many, see
 * `keptResiduals`; the summary of the fit is of all), and every reading left out with its reason
 * @throws AnalysisError for inputs the method refuses
 */
export function analyse(methodId: MethodId, inputs: AnalysisInputs, options: AnalysisOptions): AnalysisResult {
  const method = methodOf(methodId)
  checkWells(method, inputs, options)
  const outcome = method.run(inputs, options)
  return {
    version: 1,
    method: methodId,
    methodVersion: method.version,
    ...outcome,
    ...keptResiduals(outcome.residuals, clockOrigin(method, inputs)),
    K: conductivityOf(outcome.T, inputs),
    findings: [
      ...limitFindings({
        T: outcome.T?.value ?? null,
        S: outcome.S?.value ?? null,
        storageClass: outcome.storageClass,
      }),
      ...outcome.findings,
      ...thicknessFindings(inputs),
      ...otherWellFindings(method, inputs, chosenSeries(inputs, options)),
      ...chosenSeries(inputs, options).flatMap(correctionFindings),
    ],
  }
}

/** Moment from which the method's clock runs; it has run, so that there is a stop where it needs one. */
function clockOrigin({ needs }: Method, { rates }: AnalysisInputs): number {
  const { start_s, stop_s } = rateHistory(rates)
  return needs.phase === 'recovery' ? (stop_s ?? start_s) : start_s
}

/** Drawdown of the fitted model at elapsed times, one entry per well, null where the model says nothing. */
export function fittedCurve(
  methodId: MethodId,
  inputs: AnalysisInputs,
  options: AnalysisOptions,
  result: AnalysisResult,
  times_s: number[],
): FittedCurve[] {
  return methodOf(methodId).curve(inputs, options, result, times_s)
}

function methodOf(id: string): Method {
  if (!Object.hasOwn(methods, id)) throw new AnalysisError('analysis/unknown-method', { method: id })
  return methods[id as MethodId]
}

function checkWells({ needs: { wells } }: Method, inputs: AnalysisInputs, options: AnalysisOptions): void {
  const chosen = chosenSeries(inputs, options)
  chosen.forEach(radiusOf)
  const found = chosen.length
  if (found < wells.least) throw new AnalysisError('analysis/too-few-wells', { needed: wells.least, found })
  if (wells.most !== null && found > wells.most)
    throw new AnalysisError('analysis/wrong-wells', { most: wells.most, found })
}

function conductivityOf(T: ParameterEstimate | null, { thickness_m, thicknessError }: AnalysisInputs) {
  return T && thickness_m !== null && thickness_m > 0 ? conductivityEstimate(T, thickness_m, thicknessError) : null
}

function thicknessFindings({ thickness_m, thicknessBasis }: AnalysisInputs): Finding[] {
  return thickness_m !== null && thicknessBasis === 'unknown'
    ? [{ code: 'thickness-basis-unknown', severity: 'caution', params: { thickness_m } }]
    : []
}
