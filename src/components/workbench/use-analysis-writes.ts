import { useQueryCache } from '@pinia/colada'
import { computed } from 'vue'
import type { Analysis, AnalysisInput, AnalysisUpdate } from '#shared/contracts/analyses.ts'
import type { AnyResult } from '#shared/hydraulics/any-kind.ts'
import { createAnalysis, deleteAnalysis, updateAnalysis } from '../../api/analyses.ts'
import type { ApiProblem } from '../../api/problem.ts'
import { useDataChanged } from '../../composables/useDataChanged.ts'
import { useSubmit } from '../../composables/useSubmit.ts'
import { useMessages } from '../../stores/messages.ts'
import { useBench } from './use-bench.ts'

/** The server's answer stands in the list at once, whether or not the list can be fetched anew. */
function useKeptList() {
  const queries = useQueryCache()
  return (saved: Analysis) =>
    queries.setQueryData<{ items: Analysis[] }>(['pumping-tests', saved.pumpingTestId, 'analyses'], (before) => {
      const items = before?.items ?? []
      const known = items.some(({ id }) => id === saved.id)
      return { items: known ? items.map((item) => (item.id === saved.id ? saved : item)) : [...items, saved] }
    })
}

/**
 * What the page shows, for the server to compare. Where there is no T or K, what else was found stands for the result;
 * beside them it may be left open by the readings, and then differs between two computers.
 */
function expectedOf({ methodVersion, T, S, K, others = [] }: AnyResult): AnalysisInput['expected'] {
  const values = { methodVersion, T: T?.value ?? null, S: S?.value ?? null, K: K?.value ?? null }
  return T || K ? values : { ...values, others: Object.fromEntries(others.map(({ id, value }) => [id, value])) }
}

/** Saving, deleting and the conflict of two editors. */
export function useAnalysisWrites() {
  const { test, snapshot, present, result, waiting, kept, selected, select, discard, setWork, unsavedOf, settle } =
    useBench()
  const messages = useMessages()
  const changed = useDataChanged()
  const enter = useKeptList()

  const body = computed<AnalysisInput | null>(() => {
    if (!present.value || !result.value || waiting.value) return null
    const { method, options, label } = present.value
    const expected = expectedOf(result.value)
    // Method and options belong to one kind of test, which their types cannot say.
    return { method, options, label, expected, inputsSha256: snapshot.value.sha256 } as AnalysisInput
  })

  const saving = useSubmit((given: AnalysisInput, idempotencyKey: string) => {
    const { value: analysis } = kept
    if (!analysis) return createAnalysis(test.value.id, given, idempotencyKey)
    const rowVersion = present.value?.rowVersion ?? analysis.rowVersion
    return updateAnalysis(analysis.id, { ...given, rowVersion } as AnalysisUpdate)
  })

  async function save() {
    const from = selected.value
    if (!body.value || from === null) return
    const sent = unsavedOf(from)
    const answer = await saving.submit(body.value)
    if (!answer) return whenRefused(saving.problem.value)
    enter(answer)
    settle(from, sent, answer)
    messages.tell('The analysis is saved.')
    await changed()
  }

  /**
   * A conflict is told beside what is saved now, not beside what the page began with. New inputs wait until they are
   * asked for, because they change the numbers.
   */
  async function whenRefused(problem: ApiProblem | null) {
    if (problem?.status === 404) messages.tell(problem.message, 'caution')
    const known = problem?.status === 409 || problem?.status === 404
    if (known && problem.code !== 'analysis/inputs-changed') await changed()
  }

  /** Another person changed the same draft: go on from theirs, or write over it. */
  async function keepMine() {
    await changed()
    if (kept.value) setWork({ rowVersion: kept.value.rowVersion })
    await save()
  }

  async function takeTheirs() {
    await changed()
    if (selected.value) discard(selected.value)
    saving.clear()
  }

  async function loadNewInputs() {
    saving.clear()
    await changed()
  }

  const removing = useSubmit((id: number) => deleteAnalysis(id))

  async function remove() {
    const id = kept.value?.id
    if (id === undefined || !(await removing.submit(id))) return
    discard(String(id))
    select(null)
    messages.tell('The draft is deleted.')
    await changed()
  }

  return { body, saving, save, keepMine, takeTheirs, loadNewInputs, removing, remove }
}
