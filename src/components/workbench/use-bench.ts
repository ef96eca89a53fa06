import { computed, inject, provide, type ComputedRef, type InjectionKey, type Ref } from 'vue'
import type { AnyInputs, AnyOptions, AnyResult } from '#shared/hydraulics/any-kind.ts'
import { resultOf, type Outcome } from './outcome.ts'
import { isSame, useCalculation, type Asked } from './use-calculation.ts'
import { useDesk, type DeskGiven } from './use-desk.ts'
import { useResting } from './use-resting.ts'
import type { Desk, Work } from './work.ts'

/** What the readings of a test are calculated from, and its hash. */
export interface Snapshot {
  inputs: AnyInputs
  sha256: string
}

/** The workbench of a test of any kind: what is open, what is changed, what comes out. */
export interface Bench<
  W extends Work = Work,
  R extends AnyResult = AnyResult,
  S extends Snapshot = Snapshot,
> extends Desk<W> {
  snapshot: ComputedRef<S>
  outcome: ComputedRef<Outcome<R> | null>
  result: ComputedRef<R | null>
  /** What the result belongs to; behind `present` while a slow fit waits for the hand to rest. */
  calculated: ComputedRef<(Asked & Pick<W, 'options'>) | null>
  /** The result belongs to earlier options than the present ones. */
  waiting: Readonly<Ref<boolean>>
  /** Work and result while nothing moves: what takes longer, or stands aside, follows them and not the mouse. */
  resting: Readonly<Ref<{ work: W; result: R } | null>>
  moving: ComputedRef<boolean>
}

const key: InjectionKey<Bench> = Symbol('bench')

/** Makes the workbench that is common to all kinds of test. A kind tells what its methods return. */
export function provideBench<W extends Work, R extends AnyResult, S extends Snapshot>(
  given: DeskGiven<W> & { snapshot: () => S },
): Bench<W, R, S> {
  const snapshot = computed(given.snapshot)
  const desk = useDesk(given)
  const { selected, kept, present, stands } = desk

  const asked = computed<Asked | null>((before) => {
    if (!present.value) return null
    const { method, options } = present.value
    const result = stands.value && kept.value ? (kept.value.result as AnyResult) : null
    const { inputs } = snapshot.value
    const now = { key: selected.value, method, options: options as AnyOptions, inputs, kept: result }
    return before && isSame(before, now) ? before : now
  })
  const calculation = useCalculation(asked)
  const { waiting } = calculation
  // A method takes the options of its kind of test, and returns what that gives.
  const calculated = computed(() => calculation.calculated.value as (Asked & Pick<W, 'options'>) | null)
  const outcome = computed(() => calculation.outcome.value as Outcome<R> | null)
  const result = computed(() => resultOf(outcome.value))

  const still = computed<{ work: W; result: R } | null>((before) => {
    if (waiting.value && before) return before
    return present.value && result.value ? { work: present.value, result: result.value } : null
  })
  const resting = useResting(still)
  const moving = computed(() => waiting.value || (resting.value?.result ?? null) !== result.value)

  const bench: Bench<W, R, S> = { ...desk, snapshot, outcome, result, calculated, waiting, resting, moving }
  provide(key, bench as unknown as Bench)
  return bench
}

/** The workbench around a component, of whatever kind of test. @throws when used outside it */
export function useBench(): Bench {
  const bench = inject(key, null)
  if (!bench) throw new Error('useBench belongs inside the workbench of a test')
  return bench
}
