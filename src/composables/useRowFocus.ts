import { computed, nextTick, ref, toValue, type MaybeRefOrGetter } from 'vue'

const steps: Record<string, (at: number, last: number) => number> = {
  ArrowDown: (at, last) => Math.min(at + 1, last),
  ArrowUp: (at) => Math.max(at - 1, 0),
  Home: () => 0,
  End: (_at, last) => last,
}

/** One row of a table body is in the tab order; arrow keys, Home and End move to others. */
export function useRowFocus(count: MaybeRefOrGetter<number>) {
  const at = ref(0)
  /** After a change to fewer rows the last one: a table without a row in the tab order cannot be reached. */
  const focused = computed({
    get: () => Math.max(0, Math.min(at.value, toValue(count) - 1)),
    set: (index) => (at.value = index),
  })

  function onKeydown(event: KeyboardEvent) {
    const step = steps[event.key]
    const body = event.currentTarget
    const onRow = event.target instanceof HTMLElement && event.target.matches('tr')
    if (!step || !onRow || !(body instanceof HTMLElement)) return
    event.preventDefault()
    focused.value = step(focused.value, toValue(count) - 1)
    void nextTick(() => body.querySelectorAll<HTMLElement>('tr[tabindex]')[focused.value]?.focus())
  }

  return { focused, onKeydown }
}
