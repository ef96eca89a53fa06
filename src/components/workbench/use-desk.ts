import { computed, ref, shallowRef, watch } from 'vue'
import type { z } from 'zod'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import { useSession } from '../../stores/session.ts'
import { keepWhileOpen, readWorks } from './kept-works.ts'
import { changedPart, useUndo } from './use-undo.ts'
import { NEW, type Desk, type Work } from './work.ts'

export interface DeskGiven<W extends Work> {
  test: () => PumpingTest
  analyses: () => readonly Analysis[]
  /** Opened by the address. */
  opened: () => number | null
  schema: z.ZodType<W>
  /** An analysis as work; null where it cannot be opened. */
  workOf: (analysis: Analysis) => W | null
  /** A new analysis that nobody has touched. */
  untouched: (method: W['method']) => W
  /** Method of the first analysis; null while there is nothing to analyse. */
  firstMethod: () => W['method'] | null
  /** When another analysis is opened. */
  onOpen?: (method: W['method']) => void
}

/** Which analysis is open first: the one asked for, unsaved work, the accepted one, the newest. */
function firstKey(newestFirst: readonly Analysis[], opened: number | null, works: Record<string, Work>): string | null {
  const found = newestFirst.find(({ id }) => id === opened) ?? newestFirst.find(({ id }) => works[id])
  if (found) return String(found.id)
  if (works[NEW]) return NEW
  const best = newestFirst.find(({ state }) => state === 'accepted') ?? newestFirst[0]
  return best ? String(best.id) : null
}

/** What is open on the workbench of a test of any kind, and what of it is not saved. */
export function useDesk<W extends Work>(given: DeskGiven<W>): Desk<W> {
  const session = useSession()
  const seat = { personId: session.viewer.id, testId: given.test().id }
  const works = shallowRef<Record<string, W>>(readWorks(seat, given.schema))
  const analyses = computed(() => given.analyses().filter((analysis) => given.workOf(analysis) !== null))
  const first = () => firstKey([...analyses.value].reverse(), given.opened(), works.value)
  const selected = ref<string | null>(null)
  const asking = shallowRef<(() => void) | null>(null)

  const kept = computed(() => analyses.value.find(({ id }) => String(id) === selected.value) ?? null)
  const mayCreate = computed(() => session.can('analyses/create'))
  const editable = computed(() => (selected.value === NEW ? mayCreate.value : (kept.value?.mayEdit ?? false)))
  const unsavedOf = (at: string) => works.value[at] ?? null
  /** What was submitted meanwhile is shown as it was submitted, never with changes that were not saved before. */
  const unsaved = computed(() => (selected.value !== null && editable.value ? unsavedOf(selected.value) : null))
  const present = computed(() => unsaved.value ?? (kept.value && given.workOf(kept.value)))
  // A draft of inputs that have changed is calculated anew, so that saving it can keep what the page shows.
  const stands = computed(() => kept.value !== null && !unsaved.value && !(kept.value.inputsChanged && editable.value))

  function put(at: string, changed: W | null) {
    const { [at]: _gone, ...others } = works.value
    works.value = changed ? { ...others, [at]: changed } : others
  }

  const history = useUndo(works, selected, put)

  function select(wanted: string | null) {
    selected.value = wanted
    if (present.value) given.onOpen?.(present.value.method)
  }

  /** Settings chosen by hand would be lost; a proposal that nobody touched would not be missed. */
  const isWorkedOn = (work: W | null) =>
    work !== null && JSON.stringify(work) !== JSON.stringify(given.untouched(work.method))

  function start(method: W['method'], rest: Partial<W> = {}) {
    const begin = () => {
      asking.value = null
      history.forget(NEW)
      put(NEW, { ...given.untouched(method), ...rest })
      select(NEW)
    }
    if (isWorkedOn(unsavedOf(NEW))) asking.value = begin
    else begin()
  }

  function settle(from: string, sent: W | null, saved: Analysis) {
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
    select(work && unsavedOf(NEW) ? NEW : first())
  }

  function setWork(change: Partial<W>) {
    if (selected.value === null || !present.value || !editable.value) return
    const changed = { ...present.value, ...change }
    history.remember(selected.value, unsavedOf(selected.value), changedPart(present.value, changed))
    put(selected.value, changed)
  }

  function setOptions(change: Partial<W['options']>) {
    if (present.value) setWork({ options: { ...present.value.options, ...change } } as Partial<W>)
  }

  function discard(at: string) {
    if (at === NEW) history.forget(at)
    else history.remember(at, unsavedOf(at))
    put(at, null)
    if (at === selected.value && at === NEW) select(first())
  }

  watch(analyses, rescue)
  watch(given.opened, (id) => {
    if (analyses.value.some((analysis) => analysis.id === id)) select(String(id))
  })
  keepWhileOpen(seat, works)
  select(first())
  /** A first analysis stands ready as soon as there are readings, also when they come while the page is open. */
  const begin = (method: W['method'] | null) => {
    if (method !== null && selected.value === null && mayCreate.value) start(method)
  }
  watch(given.firstMethod, begin, { immediate: true })

  return {
    test: computed(given.test),
    analyses,
    selected,
    kept,
    present,
    stands,
    changed: computed(() => unsaved.value !== null),
    editable,
    hasNew: computed(() => NEW in works.value),
    mayCreate,
    isChanged: (at) => at in works.value && (analyses.value.find(({ id }) => String(id) === at)?.mayEdit ?? false),
    select,
    start,
    asking,
    setOptions,
    setWork,
    discard,
    unsavedOf,
    settle,
    history,
  }
}
