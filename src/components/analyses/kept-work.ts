import { onScopeDispose, watch, type Ref } from 'vue'
import { z } from 'zod'
import { fittedMethod } from '#shared/contracts/analyses.ts'
import { analysisOptions } from '#shared/contracts/analysis-result.ts'

/** An analysis as it is being worked on: not saved, or changed since. */
export const work = z.object({
  method: fittedMethod,
  options: analysisOptions,
  label: z.string().nullable(),
  /** Row version of the draft that it changes; null for a new one. */
  rowVersion: z.number().nullable(),
})
export type Work = z.infer<typeof work>

/** Unsaved work of one test, by the id of the analysis; `new` is the one that has none yet. */
const keptWork = z.object({ version: z.literal(1), works: z.record(z.string(), work) })

const address = (testId: number) => `basinbook:workbench:${testId}`

/** What a reload of the page must not lose; for this window only. */
export function readWork(testId: number): Record<string, Work> {
  try {
    const found = keptWork.safeParse(JSON.parse(sessionStorage.getItem(address(testId)) ?? 'null'))
    return found.success ? found.data.works : {}
  } catch {
    return {}
  }
}

export function keepWork(testId: number, works: Record<string, Work>) {
  try {
    if (Object.keys(works).length === 0) sessionStorage.removeItem(address(testId))
    else sessionStorage.setItem(address(testId), JSON.stringify({ version: 1, works }))
  } catch {
    // A private window may forbid it: the work then holds until the page is closed.
  }
}

const KEEP_AFTER_MS = 300

/** Writes down unsaved work once it rests, and at the latest when the page goes. */
export function keepWhileOpen(testId: number, works: Ref<Record<string, Work>>) {
  let timer: ReturnType<typeof setTimeout> | undefined
  const keep = () => {
    clearTimeout(timer)
    keepWork(testId, works.value)
  }
  watch(works, () => {
    clearTimeout(timer)
    timer = setTimeout(keep, KEEP_AFTER_MS)
  })
  window.addEventListener('pagehide', keep)
  onScopeDispose(() => {
    window.removeEventListener('pagehide', keep)
    keep()
  })
}
