import { useQueryCache } from '@pinia/colada'
import { computed } from 'vue'
import type { AnalysisInput } from '#shared/contracts/analyses.ts'
import { createAnalysis, deleteAnalysis, fetchAnalyses, updateAnalysis } from '../../api/analyses.ts'
import { useSubmit } from '../../composables/useSubmit.ts'
import { useMessages } from '../../stores/messages.ts'
import { useWorkbench } from './use-workbench.ts'

/** Everything that a change of an analysis may show on. */
export function useRefresh() {
  const queries = useQueryCache()
  return (testId: number) =>
    Promise.all(
      [['pumping-tests', testId], ['pumping-tests', 'list'], ['adopted-values'], ['reviews']].map((key) =>
        queries.invalidateQueries({ key }),
      ),
    )
}

/** Saving, deleting and the conflict of two editors. */
export function useAnalysisWrites() {
  const { test, snapshot, present, result, kept, selected, select, discard, setWork } = useWorkbench()
  const messages = useMessages()
  const refresh = useRefresh()

  const body = computed<AnalysisInput | null>(() => {
    if (!present.value || !result.value) return null
    const { method, options, label } = present.value
    const { methodVersion, T, S } = result.value
    const expected = { methodVersion, T: T?.value ?? null, S: S?.value ?? null }
    return { method, options, label, expected, inputsSha256: snapshot.value.sha256 }
  })

  const saving = useSubmit((given: AnalysisInput, idempotencyKey: string) => {
    const { value: analysis } = kept
    if (!analysis) return createAnalysis(test.value.id, given, idempotencyKey)
    return updateAnalysis(analysis.id, { ...given, rowVersion: present.value?.rowVersion ?? analysis.rowVersion })
  })

  async function save() {
    const from = selected.value
    const answer = body.value && (await saving.submit(body.value))
    if (!answer || from === null) return null
    await refresh(test.value.id)
    select(String(answer.id))
    discard(from)
    messages.tell('The analysis is saved.')
    return answer
  }

  /** Another person changed the same draft: go on from theirs, or write over it. */
  async function keepMine() {
    const { items } = await fetchAnalyses(test.value.id)
    const newest = items.find(({ id }) => id === kept.value?.id)
    if (newest) setWork({ rowVersion: newest.rowVersion })
    await save()
  }

  async function takeTheirs() {
    await refresh(test.value.id)
    if (selected.value) discard(selected.value)
    saving.clear()
  }

  const removing = useSubmit((id: number) => deleteAnalysis(id))

  async function remove() {
    const id = kept.value?.id
    if (id === undefined || !(await removing.submit(id))) return
    discard(String(id))
    select(null)
    await refresh(test.value.id)
    messages.tell('The draft is deleted.')
  }

  return { body, saving, save, keepMine, takeTheirs, removing, remove }
}
