import { computed, type ComputedRef } from 'vue'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { AnalysisOptions, AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { isEvidence, isFitted } from './outcome.ts'
import { useWorkbench } from './use-workbench.ts'

/** An analysis beside the others of its test. */
export interface Compared {
  /** Key of the workbench. */
  key: string
  label: string
  method: MethodId
  options: AnalysisOptions
  result: AnalysisResult
  state: Analysis['state'] | 'unsaved'
}

/** Two of one name are told apart by a number. */
export function numbered<Item extends { label: string }>(items: readonly Item[]): Item[] {
  return items.map((item, i) => {
    const same = items.filter(({ label }) => label === item.label)
    const nth = items.slice(0, i + 1).filter(({ label }) => label === item.label).length
    return same.length > 1 ? { ...item, label: `${item.label} ${nth}` } : item
  })
}

const named = (label: string | null, method: MethodId) => label || methods[method].label

/** Every analysis of the test that is evidence of something: the open one as it is now, then the kept ones. */
export function useCompared(): ComputedRef<Compared[]> {
  const { analyses, selected, resting, kept } = useWorkbench()

  return computed(() => {
    const others = analyses.value
      .filter(isFitted)
      .filter(({ state, id }) => isEvidence(state) && String(id) !== selected.value)
      .map(({ id, label, method, options, result, state }) => ({
        key: String(id),
        label: named(label, method),
        method,
        options,
        result: result as AnalysisResult,
        state,
      }))
    if (!resting.value || selected.value === null) return numbered(others)
    const { work, result } = resting.value
    const open = {
      key: selected.value,
      label: named(work.label, work.method),
      method: work.method,
      options: work.options,
      result,
      state: kept.value?.state ?? ('unsaved' as const),
    }
    return numbered([open, ...others])
  })
}
