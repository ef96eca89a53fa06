import { computed } from 'vue'
import type { AnalysisOptions, AnalysisResult } from '#shared/hydraulics/analysis.ts'
import type { AquiferKnown } from '#shared/hydraulics/well-performance-at.ts'
import { isEvidence, isFitted } from './outcome.ts'
import { useWorkbench } from './use-workbench.ts'

interface Candidate {
  options: AnalysisOptions
  result: AnalysisResult
}

/**
 * T and S of the aquifer as the pumped well is judged by them: from the open analysis when it rests on observation wells
 * alone, else from the best kept one that does.
 */
export function useAquifer() {
  const { snapshot, analyses, resting } = useWorkbench()

  const observedOnly = ({ options }: Candidate) =>
    options.wellIds.every(
      (id) => snapshot.value.inputs.series.find(({ wellId }) => wellId === id)?.role === 'observation',
    )

  return computed<AquiferKnown>(() => {
    const open: Candidate[] = resting.value
      ? [{ options: resting.value.work.options, result: resting.value.result }]
      : []
    const kept = analyses.value.filter(isFitted).filter(({ state }) => isEvidence(state))
    const accepted = kept.filter(({ state }) => state === 'accepted')
    const all = [...open, ...accepted, ...[...kept].reverse()].map(({ options, result: found }) => ({
      options,
      result: found as AnalysisResult,
    }))
    const best = all.find((candidate) => candidate.result.T && candidate.result.S && observedOnly(candidate))
    return { T: best?.result.T ?? null, S: best?.result.S ?? null }
  })
}
