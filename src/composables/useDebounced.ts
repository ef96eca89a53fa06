import { onScopeDispose, ref, watch, type Ref } from 'vue'

/** Follows a text that somebody types, once they pause. */
export function useDebounced(text: Ref<string>, ms = 250): Readonly<Ref<string>> {
  const settled = ref(text.value)
  let timer: ReturnType<typeof setTimeout> | undefined
  watch(text, (value) => {
    clearTimeout(timer)
    timer = setTimeout(() => (settled.value = value), ms)
  })
  onScopeDispose(() => clearTimeout(timer))
  return settled
}
