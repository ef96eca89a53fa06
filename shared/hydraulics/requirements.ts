import { AnalysisError, type AnalysisErrorCode } from './analysis-error.ts'
import type { AnalysisInputs } from './analysis.ts'
import type { Method } from './method.ts'
import { rateHistory } from './rates.ts'

/** What a method may have to know of aquifer and wells beside the readings. */
export type Requirement = 'thickness' | 'saturated-thickness' | 'short-screen' | 'well-radius' | 'casing-radius'

interface Rule {
  met: (inputs: AnalysisInputs) => boolean
  refusal: AnalysisErrorCode
}

const pumpedWell = ({ pumpedWell: built, series }: AnalysisInputs) =>
  built ?? series.find(({ role }) => role === 'pumped')
const hasThickness = ({ thickness_m }: AnalysisInputs) => thickness_m !== null && thickness_m > 0
const hasScreen = (inputs: AnalysisInputs) =>
  Boolean(pumpedWell(inputs)?.screen) || inputs.series.some(({ screen }) => Boolean(screen))

/** The refusals are those that the solutions themselves give. */
const rules: Record<Requirement, Rule> = {
  thickness: { met: hasThickness, refusal: 'analysis/penetration-thickness' },
  'saturated-thickness': { met: hasThickness, refusal: 'analysis/water-table-thickness' },
  'short-screen': { met: hasScreen, refusal: 'analysis/penetration-screens' },
  'well-radius': { met: (inputs) => Boolean(pumpedWell(inputs)?.wellRadius_m), refusal: 'analysis/no-well-radius' },
  'casing-radius': {
    met: (inputs) => Boolean(pumpedWell(inputs)?.casingRadius_m),
    refusal: 'analysis/no-casing-radius',
  },
}

/** Why a method cannot be used on a test at all, whatever its settings; null where it can. */
export function obstacle({ needs }: Pick<Method, 'needs'>, inputs: AnalysisInputs): AnalysisError | null {
  const found = inputs.series.filter(({ role }) => needs.wells.roles.includes(role)).length
  if (needs.phase === 'recovery' && rateHistory(inputs.rates).stop_s === null)
    return new AnalysisError('analysis/no-recovery')
  if (found < needs.wells.least)
    return new AnalysisError('analysis/too-few-wells', { needed: needs.wells.least, found })
  const missing = needs.known?.find((requirement) => !rules[requirement].met(inputs))
  return missing ? new AnalysisError(rules[missing].refusal) : null
}
