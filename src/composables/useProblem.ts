import { computed, shallowRef } from 'vue'
import { ApiProblem, fieldText } from '../api/problem.ts'

const isAbort = (error: unknown) => error instanceof DOMException && error.name === 'AbortError'

/**
 * The problem a form or action met, as sentences.
 * `fieldErrors('steps.2.rate')` goes under the field; ProblemAlert shows the rest.
 */
export function useProblem() {
  const problem = shallowRef<ApiProblem | null>(null)
  const byPath = computed(() => {
    const sentences = new Map<string, string[]>()
    for (const field of problem.value?.fields ?? [])
      sentences.set(field.path, [...(sentences.get(field.path) ?? []), fieldText(field)])
    return sentences
  })

  /** Takes any error; what is no answer of the server becomes "something went wrong on this page". */
  function met(error: unknown) {
    if (isAbort(error)) return
    problem.value = error instanceof ApiProblem ? error : ApiProblem.of('client/failed')
  }

  const clear = () => (problem.value = null)

  return { problem, fieldErrors: (path: string) => byPath.value.get(path) ?? [], met, clear }
}
