import type { AnalysisInputs, Finding, StorageClass } from './analysis.ts'
import type { TimeSpan } from '#shared/numerics/laplace-inversion.ts'
import type { CurveShift } from './laid-curve.ts'
import type { Unknown, ValidityRule } from './method.ts'
import type { ResponsePlace } from './place.ts'
import type { RateHistory } from './rates.ts'
import type { Requirement } from './requirements.ts'
import type { Selected } from './selection.ts'
import type { Respond } from './superposition.ts'

/** What a solution sees of the readings when it guesses where to start or judges a fit. */
export interface SolutionReadings {
  inputs: AnalysisInputs
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
  /** Kinds of aquifer that it describes; for any other a caution says so. */
  aquifers: readonly AnalysisInputs['aquifer'][]
  /** What has to be known of aquifer and wells beside the readings. */
  known?: readonly Requirement[]
  /** The storage that may be adopted, with its class; left out: S, classed by the aquifer and the length of the test. */
  storage?: { unknown: string; storageClass: StorageClass }
  /** Lets its curve be laid by hand; left out where its shape changes with S, so that no move leaves it as it is. */
  shift?: CurveShift
  /** In the order in which `respond` takes them; the first two are T and S. */
  unknowns: readonly Unknown[]
  /**
   * @param span the times that will be asked for, if known: what is solved in Laplace space then takes far less
   * @throws AnalysisError where the place lacks what the solution needs
   */
  respond(parameters: ArrayLike<number>, place: ResponsePlace, span?: TimeSpan | null): Respond
  /** Share of a drawdown of 1/(4πT) that is noise of the inversion, in solutions in Laplace space; left out: rounding. */
  noise?: number
  /** Starting points, natural parameters in the order of `unknowns`. */
  guess(readings: SolutionReadings): number[][]
  validity: readonly ValidityRule[]
  /** Findings of the solution's own validity rules. */
  judge(parameters: number[], readings: SolutionReadings): Finding[]
}
