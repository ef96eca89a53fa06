import type { AnalysisErrorCode } from '#shared/hydraulics/analysis-error.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import type { Params, ReadingCode } from '#shared/readings/codes.ts'
import { analysisErrorText } from './findings.ts'
import { readingIssueText } from './readings.ts'

/** Readings have codes of their own; what else keeps a log back came of calculating a correction. */
export const isOfCorrection = (code: string): boolean => code.startsWith('analysis/')

/** Why a log gives no drawdown: what its readings lack, or why a correction cannot be applied to them. */
export function inputProblemText(code: string, params: Params, units: UnitSystem): string {
  // Codes travel as plain strings.
  if (!isOfCorrection(code)) return readingIssueText(code as ReadingCode, params, units)
  const reason = analysisErrorText(code as AnalysisErrorCode, params, units)
  return `A correction cannot be applied any more. ${reason}`
}
