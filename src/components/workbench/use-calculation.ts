import { computed, onScopeDispose, ref, shallowRef, watch, type ComputedRef, type Ref } from 'vue'
import type { AnyInputs, AnyOptions, AnyResult } from '#shared/hydraulics/any-kind.ts'
import { outcomeOf, type Outcome } from './outcome.ts'

/** What a result is wanted of. */
export interface Asked {
  /** Of the workbench: another key is another analysis, which never waits. */
  key: string | null
  method: string
  options: AnyOptions
  inputs: AnyInputs
  /** The result that stands as it was kept; null where it is to be calculated. */
  kept: AnyResult | null
}

/** A new name changes nothing that is calculated. */
export const isSame = (one: Asked, other: Asked): boolean =>
  (['key', 'method', 'options', 'inputs', 'kept'] as const).every((part) => one[part] === other[part])

export interface Calculation {
  outcome: ComputedRef<Outcome | null>
  /** What the outcome belongs to: while a slow fit waits, what was asked before. */
  calculated: ComputedRef<Asked | null>
  waiting: Readonly<Ref<boolean>>
}

/** A fit that takes longer cannot follow the hand: it waits until that rests. */
const SLOW_MS = 60
const REST_MS = 200

/** Calculates at once what is asked for; where a method proved slow, when nothing has changed for a moment. */
export function useCalculation(asked: ComputedRef<Asked | null>): Calculation {
  const took_ms = new Map<string, number>()
  const waiting = ref(false)
  const held = shallowRef<Asked | null>(null)
  let timer: ReturnType<typeof setTimeout> | undefined

  const calculated = computed(() => (waiting.value ? held.value : asked.value))
  const outcome = computed<Outcome | null>(() => {
    if (!calculated.value) return null
    const { kept, method, inputs, options } = calculated.value
    if (kept) return { result: kept }
    const began = performance.now()
    const found = outcomeOf(method, inputs, options)
    took_ms.set(method, performance.now() - began)
    return found
  })

  function release() {
    clearTimeout(timer)
    waiting.value = false
  }

  const mayWait = (now: Asked | null, before: Asked | null) =>
    now !== null &&
    now.kept === null &&
    before?.key === now.key &&
    before.method === now.method &&
    (took_ms.get(now.method) ?? 0) > SLOW_MS

  // At once, so that nobody reads an outcome of what will change again in the next frame.
  watch(
    asked,
    (now, before) => {
      if (!mayWait(now, before)) return release()
      if (!waiting.value) held.value = before
      waiting.value = true
      clearTimeout(timer)
      timer = setTimeout(release, REST_MS)
    },
    { flush: 'sync' },
  )
  onScopeDispose(() => clearTimeout(timer))

  return { outcome, calculated, waiting }
}
