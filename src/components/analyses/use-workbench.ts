import { computed, inject, provide, ref, shallowRef, watch, type ComputedRef, type InjectionKey, type Ref } from 'vue'
import type { Analysis, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { AnalysisOptions, AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { plotOfMethod, type PlotKind } from '#shared/charts/plot-kinds.ts'
import { useSession } from '../../stores/session.ts'
import { firstOptions } from './first-options.ts'
import { keepWhileOpen, readWork, type Work } from './kept-work.ts'
import { isFitted, isPumped, resultOf, type Outcome } from './outcome.ts'
import { isSame, useCalculation, type Asked } from './use-calculation.ts'
import { useResting } from './use-resting.ts'
import { changedPart, useUndo, type Undo } from './use-undo.ts'

export interface Workbench {
  test: ComputedRef<PumpingTest>
  snapshot: ComputedRef<WorkbenchInputs>
  analyses: ComputedRef<readonly Analysis[]>
  /** Key of what is open: an analysis' id, or `new`; null when nothing is. */
  selected: Ref<string | null>
  plotKind: Ref<PlotKind>
  /** The analysis of the key, as the server keeps it. */
  kept: ComputedRef<Analysis | null>
  /** What is calculated with now: kept options, or changed ones. */
  present: ComputedRef<Work | null>
  changed: ComputedRef<boolean>
  editable: ComputedRef<boolean>
  outcome: ComputedRef<Outcome | null>
  result: ComputedRef<AnalysisResult | null>
  /** What the result belongs to; behind `present` while a slow fit waits for the hand to rest. */
  calculated: ComputedRef<Asked | null>
  /** The result belongs to earlier options than the present ones. */
  waiting: Readonly<Ref<boolean>>
  /** Work and result while nothing moves: what takes longer, or stands aside, follows them and not the mouse. */
  resting: Readonly<Ref<{ work: Work; result: AnalysisResult } | null>>
  moving: ComputedRef<boolean>
  hasNew: ComputedRef<boolean>
  isChanged(key: string): boolean
  select(key: string | null): void
  /** Begins a new analysis; asks first where that would replace another one that somebody has worked on. */
  start(method: MethodId, given?: Partial<Work>): void
  /** What `start` asks about: how it goes on, or null. */
  asking: Ref<(() => void) | null>
  setOptions(change: Partial<AnalysisOptions>): void
  setWork(change: Partial<Work>): void
  /** Forgets unsaved changes of a key. */
  discard(key: string): void
  /** Unsaved changes of a key as they are now, to be told from later ones. */
  unsavedOf(key: string): Work | null
  /** After saving: what was sent is no longer unsaved; what was changed meanwhile goes on as a change of the saved one. */
  settle(from: string, sent: Work | null, saved: Analysis): void
  mayCreate: ComputedRef<boolean>
  /** Back and forth through unsaved changes. */
  history: Undo
}

const key: InjectionKey<Workbench> = Symbol('workbench')
const NEW = 'new'

interface Given {
  test: () => PumpingTest
  snapshot: () => WorkbenchInputs
  analyses: () => readonly Analysis[]
  /** Opened by the address. */
  opened: () => number | null
}

const workOf = (analysis: Analysis | null): Work | null =>
  analysis && isFitted(analysis)
    ? { method: analysis.method, options: analysis.options, label: analysis.label, rowVersion: analysis.rowVersion }
    : null

/** Which analysis is open first: the one asked for, unsaved work, the accepted one, the newest. */
function firstKey({ analyses, opened }: Given, works: Record<string, Work>): string | null {
  const fitted = analyses().filter(isFitted)
  const found = fitted.find(({ id }) => id === opened()) ?? fitted.find(({ id }) => works[id])
  if (found) return String(found.id)
  if (works[NEW]) return NEW
  const best = fitted.find(({ state }) => state === 'accepted') ?? fitted.at(-1)
  return best ? String(best.id) : null
}

export function provideWorkbench(given: Given): Workbench {
  const session = useSession()
  const desk = { personId: session.viewer.id, testId: given.test().id }
  const works = shallowRef<Record<string, Work>>(readWork(desk))
  const selected = ref(firstKey(given, works.value))
  const plotKind = ref<PlotKind>('semi-log')

  const snapshot = computed(given.snapshot)
  const analyses = computed(given.analyses)
  const kept = computed(() => analyses.value.find(({ id }) => String(id) === selected.value) ?? null)
  const mayCreate = computed(() => session.can('analyses/create'))
  const editable = computed(() => (selected.value === NEW ? mayCreate.value : (kept.value?.mayEdit ?? false)))
  /** What was submitted meanwhile is shown as it was submitted, never with changes that were not saved before. */
  const unsaved = computed(() => (selected.value !== null && editable.value ? unsavedOf(selected.value) : null))
  const present = computed(() => unsaved.value ?? workOf(kept.value))

  const asked = computed<Asked | null>((before) => {
    if (!present.value) return null
    // A draft of inputs that have changed is calculated anew, so that saving it can keep what the page shows.
    const stands = kept.value && !unsaved.value && !(kept.value.inputsChanged && editable.value)
    const { method, options } = present.value
    const result = stands && kept.value ? (kept.value.result as AnalysisResult) : null
    const now = { key: selected.value, method, options, inputs: snapshot.value.inputs, kept: result }
    return before && isSame(before, now) ? before : now
  })
  const { outcome, calculated, waiting } = useCalculation(asked)

  function put(at: string, changed: Work | null) {
    const { [at]: _gone, ...others } = works.value
    works.value = changed ? { ...others, [at]: changed } : others
  }

  const history = useUndo(works, selected, put)

  function select(wanted: string | null) {
    selected.value = wanted
    const method = present.value?.method
    if (method) plotKind.value = plotOfMethod[method]
  }

  function unsavedOf(at: string): Work | null {
    return works.value[at] ?? null
  }

  const untouched = (method: MethodId): Work => ({
    method,
    options: firstOptions(method, snapshot.value.inputs),
    label: null,
    rowVersion: null,
  })

  /** Settings chosen by hand would be lost; a proposal that nobody touched would not be missed. */
  function isWorkedOn(work: Work | null): boolean {
    return work !== null && JSON.stringify(work) !== JSON.stringify(untouched(work.method))
  }

  const asking = shallowRef<(() => void) | null>(null)

  function start(method: MethodId, rest: Partial<Work> = {}) {
    const begin = () => {
      asking.value = null
      history.forget(NEW)
      put(NEW, { ...untouched(method), ...rest })
      select(NEW)
    }
    if (isWorkedOn(unsavedOf(NEW))) asking.value = begin
    else begin()
  }

  function settle(from: string, sent: Work | null, saved: Analysis) {
    const now = unsavedOf(from)
    history.forget(from)
    history.forget(String(saved.id))
    put(from, null)
    if (now !== sent && now) put(String(saved.id), { ...now, rowVersion: saved.rowVersion })
    if (selected.value === from) select(String(saved.id))
  }

  /** Somebody deleted the draft that is open: its unsaved changes stay, as a new analysis. */
  function rescue() {
    const at = selected.value
    if (at === null || at === NEW || analyses.value.some(({ id }) => String(id) === at)) return
    const work = unsavedOf(at)
    put(at, null)
    if (work && !unsavedOf(NEW)) put(NEW, { ...work, rowVersion: null })
    select(work && unsavedOf(NEW) ? NEW : firstKey(given, works.value))
  }

  function setWork(change: Partial<Work>) {
    if (selected.value === null || !present.value || !editable.value) return
    const changed = { ...present.value, ...change }
    history.remember(selected.value, unsavedOf(selected.value), changedPart(present.value, changed))
    put(selected.value, changed)
  }

  function discard(at: string) {
    if (at === NEW) history.forget(at)
    else history.remember(at, unsavedOf(at))
    put(at, null)
    if (at === selected.value && at === NEW) select(firstKey(given, works.value))
  }

  watch(analyses, rescue)
  watch(given.opened, (id) => {
    if (analyses.value.some((analysis) => analysis.id === id && isFitted(analysis))) select(String(id))
  })
  keepWhileOpen(desk, works)

  const result = computed(() => resultOf(outcome.value))
  const resting = useResting(
    computed<{ work: Work; result: AnalysisResult } | null>((before) =>
      waiting.value && before
        ? before
        : present.value && result.value
          ? { work: present.value, result: result.value }
          : null,
    ),
  )

  const bench: Workbench = {
    test: computed(given.test),
    snapshot,
    analyses,
    selected,
    plotKind,
    kept,
    present,
    changed: computed(() => unsaved.value !== null),
    editable,
    outcome,
    result,
    calculated,
    waiting,
    resting,
    moving: computed(() => waiting.value || (resting.value?.result ?? null) !== result.value),
    hasNew: computed(() => NEW in works.value),
    isChanged: (at) => at in works.value && (analyses.value.find(({ id }) => String(id) === at)?.mayEdit ?? false),
    select,
    start,
    asking,
    setWork,
    setOptions: (change) => present.value && setWork({ options: { ...present.value.options, ...change } }),
    discard,
    unsavedOf,
    settle,
    mayCreate,
    history,
  }
  provide(key, bench)
  const canStart = snapshot.value.inputs.series.length > 0 && isPumped(snapshot.value.inputs)
  if (selected.value !== null) select(selected.value)
  else if (mayCreate.value && canStart) start('cooper-jacob')
  return bench
}

/** The workbench around a component. @throws when used outside it */
export function useWorkbench(): Workbench {
  const bench = inject(key, null)
  if (!bench) throw new Error('useWorkbench belongs inside the workbench of a test')
  return bench
}

export const phaseOf = (method: MethodId) => methods[method].needs.phase
