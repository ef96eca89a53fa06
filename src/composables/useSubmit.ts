import { ref } from 'vue'
import { newIdempotencyKey } from '../api/addresses.ts'
import { useProblem } from './useProblem.ts'

/**
 * Sends a form once at a time and keeps what went wrong beside it.
 * While the same attempt is repeated the key stays the same, so that a POST whose answer got lost is not done twice.
 * `submit` resolves to the answer, or to null when there was a problem (then shown by `problem`).
 */
export function useSubmit<Given, Answer>(send: (given: Given, idempotencyKey: string) => Promise<Answer>) {
  const { problem, fieldErrors, met, clear } = useProblem()
  const sending = ref(false)
  let attempt = { text: '', key: '' }

  function keyFor(given: Given): string {
    const text = JSON.stringify(given) ?? ''
    if (attempt.key === '' || attempt.text !== text) attempt = { text, key: newIdempotencyKey() }
    return attempt.key
  }

  async function submit(given: Given): Promise<Answer | null> {
    if (sending.value) return null
    sending.value = true
    clear()
    try {
      const answer = await send(given, keyFor(given))
      attempt = { text: '', key: '' }
      return answer
    } catch (error) {
      met(error)
      return null
    } finally {
      sending.value = false
    }
  }

  return { submit, sending, problem, fieldErrors, met, clear }
}
