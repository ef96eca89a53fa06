import type { KindWorkbenchInputs, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import { inputProblemText, isOfCorrection } from '#shared/words/input-problems.ts'

export interface InputProblem {
  well: string
  text: string
  /** A correction is in the way, and not what the readings lack. */
  ofCorrection: boolean
}

/** Logs that give no drawdown yet, and what is missing; without a well of its own a log is the pumped well's. */
export const problemsOf = (
  { problems }: Pick<WorkbenchInputs | KindWorkbenchInputs, 'problems'>,
  { wells, wellCode }: PumpingTest,
  units: UnitSystem,
): InputProblem[] =>
  problems.map(({ wellId, code, params }) => ({
    well: wells.find((well) => String(well.wellId) === wellId)?.code ?? wellCode,
    text: inputProblemText(code, params, units),
    ofCorrection: isOfCorrection(code),
  }))
