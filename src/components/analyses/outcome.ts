import type { Analysis } from '#shared/contracts/analyses.ts'
import type { AnalysisInputs, AnalysisOptions, AnalysisResult, Finding } from '#shared/hydraulics/analysis.ts'
import { recoveryConfirms, type ComparedAnalysis } from '#shared/hydraulics/agreement.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { evidenceFacts } from '#shared/hydraulics/evidence-facts.ts'
import { evidenceOf, type Evidence } from '#shared/hydraulics/evidence.ts'

/** Plots and methods count from the moment at which pumping begins. */
export const isPumped = ({ rates }: Pick<AnalysisInputs, 'rates'>): boolean =>
  rates.some(({ rate_m3_s }) => rate_m3_s > 0)

/** What agreement needs to know; null where there is no transmissivity. */
export function comparedOf(
  id: string,
  label: string,
  { method, wellIds, result }: { method: MethodId; wellIds: string[]; result: Pick<AnalysisResult, 'T'> },
): ComparedAnalysis | null {
  if (!result.T) return null
  const { phase, wells } = methods[method].needs
  const usesDistances = wells.least > 1 || wellIds.length > 1
  return { id, label, T: result.T, wellIds, phase, usesDistances }
}

export const isFitted = (analysis: Analysis): analysis is Analysis & { method: MethodId; options: AnalysisOptions } =>
  analysis.method !== 'reported' && analysis.options !== null

/** What a reviewer sent back, or whose value was withdrawn, is evidence of nothing. */
export const isEvidence = (state: Analysis['state']): boolean => state !== 'returned' && state !== 'withdrawn'

/** Evidence that a result would have beside the kept analyses of its test, by the rules that the server adopts by. */
export function evidencePreview(
  inputs: AnalysisInputs,
  work: { id: number | null; method: MethodId; options: AnalysisOptions; result: AnalysisResult },
  kept: readonly Analysis[],
): Evidence | null {
  const mine = comparedOf('', '', { ...work, wellIds: work.options.wellIds })
  if (!mine) return null
  const recoveryAgrees = kept.some((other) => {
    if (other.id === work.id || !isEvidence(other.state) || !isFitted(other)) return false
    const theirs = comparedOf('', '', {
      ...other,
      wellIds: other.options.wellIds,
      result: other.result as AnalysisResult,
    })
    return theirs !== null && recoveryConfirms(mine, theirs)
  })
  return evidenceOf(evidenceFacts(inputs, work.options, work.result, { recoveryAgrees }))
}

const order: Record<Finding['severity'], number> = { bad: 0, caution: 1, note: 2, good: 3 }
/** Worst first. */
export const bySeverity = (findings: readonly Finding[]) =>
  [...findings].sort((a, b) => order[a.severity] - order[b.severity])
