import { computed, shallowRef, type ComputedRef, type Ref } from 'vue'
import type { Work } from './work.ts'

/** Changes of the same setting that follow each other within this time are one: a handle that is dragged. */
const JOINS_MS = 600
const MOST_STEPS = 100

/** Unsaved states of one analysis; null is the analysis as it is kept. */
interface Course<W extends Work> {
  past: readonly (W | null)[]
  future: readonly (W | null)[]
  /** What was changed last, and when. */
  part: string
  at_ms: number
}

export interface Undo<W extends Work> {
  canUndo: ComputedRef<boolean>
  canRedo: ComputedRef<boolean>
  undo: () => void
  redo: () => void
  /** Before a change of a key: its unsaved state until now, and which settings change (none: all of it). */
  remember: (key: string, before: W | null, part?: string) => void
  /** After a change that nobody can go back behind: saving, or another analysis under the same key. */
  forget: (key: string) => void
}

/** Names of the settings in which two states differ. */
export function changedPart(one: Work, other: Work): string {
  const [before, after] = [one, other].map(({ options, ...rest }) => new Map(Object.entries({ ...rest, ...options })))
  const names = new Set([...(before?.keys() ?? []), ...(after?.keys() ?? [])])
  return [...names].filter((name) => before?.get(name) !== after?.get(name)).join()
}

/** Undo and redo of unsaved changes, for each analysis by itself. */
export function useUndo<W extends Work>(
  works: Readonly<Ref<Record<string, W>>>,
  selected: Readonly<Ref<string | null>>,
  put: (key: string, work: W | null) => void,
): Undo<W> {
  const courses = shallowRef<Readonly<Record<string, Course<W>>>>({})
  const here = computed(() => (selected.value === null ? undefined : courses.value[selected.value]))

  const keep = (key: string, course: Course<W>) => (courses.value = { ...courses.value, [key]: course })

  function remember(key: string, before: W | null, part = '') {
    const course = courses.value[key]
    const at_ms = performance.now()
    const joins = course && part !== '' && course.part === part && at_ms - course.at_ms < JOINS_MS
    const past = joins ? course.past : [...(course?.past ?? []), before].slice(-MOST_STEPS)
    keep(key, { past, future: [], part, at_ms })
  }

  function forget(key: string) {
    const { [key]: _gone, ...others } = courses.value
    courses.value = others
  }

  /** What somebody else saved meanwhile stays known: going back does not write over it unasked. */
  function restore(key: string, work: W | null) {
    const rowVersion = works.value[key]?.rowVersion
    put(key, work && rowVersion !== undefined ? { ...work, rowVersion } : work)
  }

  function step(from: 'past' | 'future', to: 'past' | 'future') {
    const key = selected.value
    const course = here.value
    const state = course?.[from].at(-1)
    if (key === null || !course || state === undefined) return
    const now = works.value[key] ?? null
    keep(key, { ...course, [from]: course[from].slice(0, -1), [to]: [...course[to], now], part: '', at_ms: 0 })
    restore(key, state)
  }

  return {
    canUndo: computed(() => (here.value?.past.length ?? 0) > 0),
    canRedo: computed(() => (here.value?.future.length ?? 0) > 0),
    undo: () => step('past', 'future'),
    redo: () => step('future', 'past'),
    remember,
    forget,
  }
}
