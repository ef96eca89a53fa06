import type { ComputedRef, Ref } from 'vue'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { Undo } from './use-undo.ts'

/** An analysis as it is being worked on: not saved, or changed since. */
export interface Work {
  method: string
  options: object
  label: string | null
  /** Row version of the draft that it changes; null for a new one. */
  rowVersion: number | null
}

/** Key of the analysis that was not saved yet. */
export const NEW = 'new'

/** The analyses of one test: which is open, and what of them is changed and not saved. */
export interface Desk<W extends Work = Work> {
  test: ComputedRef<PumpingTest>
  /** Those that can be opened, oldest first. */
  analyses: ComputedRef<readonly Analysis[]>
  /** Key of what is open: an analysis' id, or `new`; null when nothing is. */
  selected: Ref<string | null>
  /** The analysis of the key, as the server keeps it. */
  kept: ComputedRef<Analysis | null>
  /** What is calculated with now: kept options, or changed ones. */
  present: ComputedRef<W | null>
  /** The kept result stands as it was kept. */
  stands: ComputedRef<boolean>
  changed: ComputedRef<boolean>
  editable: ComputedRef<boolean>
  hasNew: ComputedRef<boolean>
  mayCreate: ComputedRef<boolean>
  isChanged(key: string): boolean
  select(key: string | null): void
  /** Begins a new analysis; asks first where that would replace another one that somebody has worked on. */
  start(method: W['method'], given?: Partial<W>): void
  /** What `start` asks about: how it goes on, or null. */
  asking: Ref<(() => void) | null>
  setOptions(change: Partial<W['options']>): void
  setWork(change: Partial<W>): void
  /** Forgets unsaved changes of a key. */
  discard(key: string): void
  /** Unsaved changes of a key as they are now, to be told from later ones. */
  unsavedOf(key: string): W | null
  /** After saving: what was sent is no longer unsaved; what was changed meanwhile goes on as a change of the saved one. */
  settle(from: string, sent: W | null, saved: Analysis): void
  /** Back and forth through unsaved changes. */
  history: Pick<Undo<W>, 'canUndo' | 'canRedo' | 'undo' | 'redo'>
}
