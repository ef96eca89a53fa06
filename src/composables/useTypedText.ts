import { ref, watch, type Ref } from 'vue'
import { useDebounced } from './useDebounced.ts'

/** The text of a filter while somebody types it: it is asked for once they pause, and follows what is asked otherwise. */
export function useTypedText(asked: () => string | undefined, ask: (text: string) => void): Ref<string> {
  const text = ref(asked() ?? '')
  watch(useDebounced(text), (typed) => typed.trim() !== (asked() ?? '') && ask(typed.trim()))
  watch(
    () => asked() ?? '',
    (now) => now !== text.value.trim() && (text.value = now),
  )
  return text
}
