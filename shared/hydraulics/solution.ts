import type { Finding } from './analysis.ts'
import type { Unknown, ValidityRule } from './method.ts'
import type { RateHistory } from './rates.ts'
import type { Selected } from './selection.ts'
import type { UnitResponse } from './superposition.ts'

/** What a solution sees of the readings when it guesses where to start or judges a fit. */
export interface SolutionReadings {
  wells: Selected[]
  history: RateHistory
}

/**
 * One analytical solution: all that the curve fitter needs to know. Registering it in the catalogue through
 * `curveMethod` is all that is needed for fitter, screens, report and API to offer it.
 */
export interface Solution {
  id: string
  label: string
  version: number
  source: string
  /** In the order in which `response` takes them; the first two are T and S. */
  unknowns: readonly Unknown[]
  response: UnitResponse
  /** Starting points, natural parameters in the order of `unknowns`. */
  guess(readings: SolutionReadings): number[][]
  validity: readonly ValidityRule[]
  /** Findings of the solution's own validity rules. */
  judge(parameters: number[], readings: SolutionReadings): Finding[]
}
