import { onScopeDispose, shallowRef, watch, type Ref } from 'vue'

const REST_MS = 150

/** A value once it has not changed for a moment. */
export function useResting<Value>(value: Readonly<Ref<Value>>): Readonly<Ref<Value>> {
  const rested = shallowRef(value.value) as Ref<Value>
  let timer: ReturnType<typeof setTimeout> | undefined
  watch(value, (newest) => {
    clearTimeout(timer)
    timer = setTimeout(() => (rested.value = newest), REST_MS)
  })
  onScopeDispose(() => clearTimeout(timer))
  return rested
}
