import { computed, inject, provide, ref, shallowRef, watch, type ComputedRef, type InjectionKey, type Ref } from 'vue'
import type { Analysis, KindWorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { OwnMethod, OwnOptions } from '#shared/hydraulics/any-kind.ts'
import type { KindResult } from '#shared/hydraulics/kinds.ts'
import { useSession } from '../../stores/session.ts'
import { keepKindWork, readKindWork, type KindWork } from './kept-kind-work.ts'
import {
  firstKindOptions,
  firstMethod,
  isAnalysable,
  isOwn,
  kindOutcomeOf,
  methodOf,
  type KindOutcome,
  type OwnAnalysis,
} from './kind-outcome.ts'

/** The workbench of a test of a kind of its own: what is open, what is changed, what comes out. */
export interface KindBench {
  test: ComputedRef<PumpingTest>
  snapshot: ComputedRef<KindWorkbenchInputs>
  /** Newest first. */
  analyses: ComputedRef<readonly OwnAnalysis[]>
  /** Key of what is open: an analysis' id, or `new`; null when nothing is. */
  selected: Ref<string | null>
  /** The analysis of the key, as the server keeps it. */
  kept: ComputedRef<OwnAnalysis | null>
  /** What is calculated with now: kept options, or changed ones. */
  present: ComputedRef<KindWork | null>
  method: ComputedRef<OwnMethod | null>
  changed: ComputedRef<boolean>
  editable: ComputedRef<boolean>
  outcome: ComputedRef<KindOutcome | null>
  result: ComputedRef<KindResult | null>
  hasNew: ComputedRef<boolean>
  mayCreate: ComputedRef<boolean>
  isChanged(key: string): boolean
  select(key: string | null): void
  /** Begins a new analysis; asks first where that would replace another one that somebody has worked on. */
  start(method: string, given?: Partial<KindWork>): void
  /** What `start` asks about: how it goes on, or null. */
  asking: Ref<(() => void) | null>
  setOptions(change: Record<string, unknown>): void
  setWork(change: Partial<KindWork>): void
  /** Forgets unsaved changes of a key. */
  discard(key: string): void
  unsavedOf(key: string): KindWork | null
  /** After saving: what was changed meanwhile goes on as a change of the saved one. */
  settle(from: string, sent: KindWork | null, saved: Analysis): void
}

const key: InjectionKey<KindBench> = Symbol('kind-bench')
const NEW = 'new'

interface Given {
  test: () => PumpingTest
  snapshot: () => KindWorkbenchInputs
  analyses: () => readonly Analysis[]
  /** Opened by the address. */
  opened: () => number | null
}

const workOf = ({ method, options, label, rowVersion }: OwnAnalysis): KindWork => ({
  method,
  options,
  label,
  rowVersion,
})

/** Which analysis is open first: the one asked for, unsaved work, the accepted one, the newest. */
function firstKey(analyses: readonly OwnAnalysis[], opened: number | null, works: Record<string, KindWork>) {
  const found = analyses.find(({ id }) => id === opened) ?? analyses.find(({ id }) => works[id])
  if (found) return String(found.id)
  if (works[NEW]) return NEW
  const best = analyses.find(({ state }) => state === 'accepted') ?? analyses[0]
  return best ? String(best.id) : null
}

export function provideKindBench(given: Given): KindBench {
  const session = useSession()
  const desk = { personId: session.viewer.id, testId: given.test().id }
  const works = shallowRef<Record<string, KindWork>>(readKindWork(desk))
  const snapshot = computed(given.snapshot)
  const analyses = computed(() => given.analyses().filter(isOwn).reverse())
  const selected = ref(firstKey(analyses.value, given.opened(), works.value))
  const asking = shallowRef<(() => void) | null>(null)

  const kept = computed(() => analyses.value.find(({ id }) => String(id) === selected.value) ?? null)
  const mayCreate = computed(() => session.can('analyses/create'))
  const editable = computed(() => (selected.value === NEW ? mayCreate.value : (kept.value?.mayEdit ?? false)))
  const unsavedOf = (at: string) => works.value[at] ?? null
  /** What was submitted meanwhile is shown as it was submitted, never with changes that were not saved before. */
  const unsaved = computed(() => (selected.value !== null && editable.value ? unsavedOf(selected.value) : null))
  const present = computed(() => unsaved.value ?? (kept.value && workOf(kept.value)))

  const outcome = computed<KindOutcome | null>(() => {
    if (!present.value) return null
    // A draft of inputs that have changed is calculated anew, so that saving it can keep what the page shows.
    const stands = kept.value && !unsaved.value && !(kept.value.inputsChanged && editable.value)
    return stands && kept.value ? { result: kept.value.result } : kindOutcomeOf(snapshot.value, present.value)
  })

  function put(at: string, work: KindWork | null) {
    const { [at]: _gone, ...others } = works.value
    works.value = work ? { ...others, [at]: work } : others
  }

  const untouched = (method: string): KindWork => ({
    method,
    options: firstKindOptions(snapshot.value.kind),
    label: null,
    rowVersion: null,
  })

  function start(method: string, rest: Partial<KindWork> = {}) {
    const begin = () => {
      asking.value = null
      put(NEW, { ...untouched(method), ...rest })
      selected.value = NEW
    }
    const other = unsavedOf(NEW)
    if (other && JSON.stringify(other) !== JSON.stringify(untouched(other.method))) asking.value = begin
    else begin()
  }

  function settle(from: string, sent: KindWork | null, saved: Analysis) {
    const now = unsavedOf(from)
    put(from, null)
    if (now !== sent && now) put(String(saved.id), { ...now, rowVersion: saved.rowVersion })
    if (selected.value === from) selected.value = String(saved.id)
  }

  /** Somebody deleted the draft that is open: its unsaved changes stay, as a new analysis. */
  function rescue() {
    const at = selected.value
    if (at === null || at === NEW || analyses.value.some(({ id }) => String(id) === at)) return
    const work = unsavedOf(at)
    put(at, null)
    if (work && !unsavedOf(NEW)) put(NEW, { ...work, rowVersion: null })
    selected.value = work && unsavedOf(NEW) ? NEW : firstKey(analyses.value, given.opened(), works.value)
  }

  function setWork(change: Partial<KindWork>) {
    if (selected.value !== null && present.value && editable.value) put(selected.value, { ...present.value, ...change })
  }

  function discard(at: string) {
    put(at, null)
    if (at === selected.value && at === NEW) selected.value = firstKey(analyses.value, given.opened(), works.value)
  }

  watch(analyses, rescue)
  watch(given.opened, (id) => {
    if (analyses.value.some((analysis) => analysis.id === id)) selected.value = String(id)
  })
  keepKindWork(desk, works)

  const bench: KindBench = {
    test: computed(given.test),
    snapshot,
    analyses,
    selected,
    kept,
    present,
    method: computed(() => present.value && methodOf(snapshot.value.kind, present.value.method)),
    changed: computed(() => unsaved.value !== null),
    editable,
    outcome,
    result: computed(() => (outcome.value && 'result' in outcome.value ? outcome.value.result : null)),
    hasNew: computed(() => NEW in works.value),
    mayCreate,
    isChanged: (at) => at in works.value && (analyses.value.find(({ id }) => String(id) === at)?.mayEdit ?? false),
    select: (at) => (selected.value = at),
    start,
    asking,
    setOptions: (change) =>
      present.value && setWork({ options: { ...present.value.options, ...change } as OwnOptions }),
    setWork,
    discard,
    unsavedOf,
    settle,
  }
  provide(key, bench)
  /** A first analysis stands ready as soon as there are readings, also when they come while the page is open. */
  const begin = (ready: boolean) => {
    if (ready && selected.value === null && mayCreate.value) start(firstMethod(snapshot.value))
  }
  watch(() => isAnalysable(snapshot.value), begin, { immediate: true })
  return bench
}

/** The workbench around a component. @throws when used outside it */
export function useKindBench(): KindBench {
  const bench = inject(key, null)
  if (!bench) throw new Error('useKindBench belongs inside the workbench of a test')
  return bench
}
