import type { AnalysisErrorCode } from '#shared/hydraulics/analysis-error.ts'
import { analysisErrorText } from '#shared/words/findings.ts'
import { AppError } from '../../errors.ts'
import type { SeriesProblem } from '../analyses/build-inputs.ts'
import type { PumpingTestRow, TestWellRow } from '../pumping-tests/view.ts'

/** Slugs are over before the weather changes, and a specific capacity has no log. */
export const isCorrectable = (kind: PumpingTestRow['kind']): boolean => kind === 'constant-rate' || kind === 'step'

const isOfCorrections = (code: string): code is AnalysisErrorCode => code.startsWith('analysis/')

/** @throws AppError naming the first well whose readings cannot be corrected, and why */
export function checkProblems(problems: SeriesProblem[], wells: TestWellRow[]): void {
  for (const { wellId, code, params } of problems) {
    if (!isOfCorrections(code)) continue
    const well = wells.find(({ row }) => String(row.wellId) === wellId)?.code ?? ''
    throw new AppError('correction/refused', { well, reason: analysisErrorText(code, params) })
  }
}
