import { computed, inject, provide, ref, shallowRef, type ComputedRef, type InjectionKey, type Ref } from 'vue'
import type { Analysis, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { AnalysisOptions, AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { plotOfMethod, type PlotKind } from '#shared/charts/plot-kinds.ts'
import { useSession } from '../../stores/session.ts'
import { firstOptions } from './first-options.ts'
import { keepWhileOpen, readWork, type Work } from './kept-work.ts'
import { isFitted, outcomeOf, resultOf, type Outcome } from './outcome.ts'
import { useResting } from './use-resting.ts'

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
  /** The result while nothing moves: what takes longer, or stands aside, follows it and not the mouse. */
  resting: Readonly<Ref<AnalysisResult | null>>
  moving: ComputedRef<boolean>
  hasNew: ComputedRef<boolean>
  isChanged(key: string): boolean
  select(key: string | null): void
  start(method: MethodId, given?: Partial<Work>): void
  setOptions(change: Partial<AnalysisOptions>): void
  setWork(change: Partial<Work>): void
  /** Forgets unsaved changes of a key. */
  discard(key: string): void
  mayCreate: ComputedRef<boolean>
}

const key: InjectionKey<Workbench> = Symbol('workbench')
const NEW = 'new'

interface Given {
  test: () => PumpingTest
  snapshot: () => WorkbenchInputs
  analyses: () => readonly Analysis[]
  /** Opened by the address. */
  opened: number | null
}

const workOf = (analysis: Analysis | null): Work | null =>
  analysis && isFitted(analysis)
    ? { method: analysis.method, options: analysis.options, label: analysis.label, rowVersion: analysis.rowVersion }
    : null

/** Which analysis is open first: the one asked for, unsaved work, the accepted one, the newest. */
function firstKey({ analyses, opened }: Given, works: Record<string, Work>): string | null {
  const fitted = analyses().filter(isFitted)
  const found = fitted.find(({ id }) => id === opened) ?? fitted.find(({ id }) => works[id])
  if (found) return String(found.id)
  if (works[NEW]) return NEW
  const best = fitted.find(({ state }) => state === 'accepted') ?? fitted.at(-1)
  return best ? String(best.id) : null
}

export function provideWorkbench(given: Given): Workbench {
  const session = useSession()
  const testId = given.test().id
  const works = shallowRef<Record<string, Work>>(readWork(testId))
  const selected = ref(firstKey(given, works.value))
  const plotKind = ref<PlotKind>('semi-log')

  const snapshot = computed(given.snapshot)
  const analyses = computed(given.analyses)
  const kept = computed(() => analyses.value.find(({ id }) => String(id) === selected.value) ?? null)
  const unsaved = computed(() => (selected.value === null ? null : (works.value[selected.value] ?? null)))
  const present = computed(() => unsaved.value ?? workOf(kept.value))
  const mayCreate = computed(() => session.can('analyses/create'))
  const editable = computed(() => (selected.value === NEW ? mayCreate.value : (kept.value?.mayEdit ?? false)))

  const outcome = computed<Outcome | null>(() => {
    if (!present.value) return null
    if (!unsaved.value && kept.value) return { result: kept.value.result as AnalysisResult }
    return outcomeOf(present.value.method, snapshot.value.inputs, present.value.options)
  })

  function put(at: string, changed: Work | null) {
    const { [at]: _gone, ...others } = works.value
    works.value = changed ? { ...others, [at]: changed } : others
  }

  function select(wanted: string | null) {
    selected.value = wanted
    const method = present.value?.method
    if (method) plotKind.value = plotOfMethod[method]
  }

  function start(method: MethodId, rest: Partial<Work> = {}) {
    put(NEW, { method, options: firstOptions(method, snapshot.value.inputs), label: null, rowVersion: null, ...rest })
    select(NEW)
  }

  function setWork(change: Partial<Work>) {
    if (selected.value !== null && present.value && editable.value) put(selected.value, { ...present.value, ...change })
  }

  function discard(at: string) {
    put(at, null)
    if (at === selected.value && at === NEW) select(firstKey(given, works.value))
  }

  keepWhileOpen(testId, works)

  const result = computed(() => resultOf(outcome.value))
  const resting = useResting(result)

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
    resting,
    moving: computed(() => resting.value !== result.value),
    hasNew: computed(() => NEW in works.value),
    isChanged: (at) => at in works.value,
    select,
    start,
    setWork,
    setOptions: (change) => present.value && setWork({ options: { ...present.value.options, ...change } }),
    discard,
    mayCreate,
  }
  provide(key, bench)
  const canStart = snapshot.value.inputs.series.length > 0 && snapshot.value.inputs.rates.length > 0
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
