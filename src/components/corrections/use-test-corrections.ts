import { useQuery } from '@pinia/colada'
import { fetchCorrections } from '../../api/corrections.ts'
import { useDataChanged } from '../../composables/useDataChanged.ts'
import { useSubmit } from '../../composables/useSubmit.ts'

/** Corrections of a test with the series that they follow, fetched anew after every change of them. */
export const useTestCorrections = (testId: () => number) =>
  useQuery({
    key: () => ['pumping-tests', testId(), 'corrections'],
    query: ({ signal }) => fetchCorrections(testId(), signal),
  })

/** Sends a change and fetches what follows from it. */
export function useChange<Given, Answer>(send: (given: Given, idempotencyKey: string) => Promise<Answer>) {
  const dataChanged = useDataChanged()
  const { submit, ...rest } = useSubmit(send)

  async function change(given: Given): Promise<Answer | null> {
    const answer = await submit(given)
    if (answer !== null) await dataChanged()
    return answer
  }
  return { change, ...rest }
}
