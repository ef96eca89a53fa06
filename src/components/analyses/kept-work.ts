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

/** Whose work, on which test: one window may see several people, and none gets what another has not saved. */
export interface Desk {
  personId: number | null
  testId: number
}

const address = ({ personId, testId }: Desk) => `basinbook:workbench:${personId ?? 'visitor'}:${testId}`

/** What a reload of the page must not lose; for this window only. */
export function readWork(desk: Desk): Record<string, Work> {
  try {
    const found = keptWork.safeParse(JSON.parse(sessionStorage.getItem(address(desk)) ?? 'null'))
    return found.success ? found.data.works : {}
  } catch {
    return {}
  }
}

export function keepWork(desk: Desk, works: Record<string, Work>) {
  try {
    if (Object.keys(works).length === 0) sessionStorage.removeItem(address(desk))
    else sessionStorage.setItem(address(desk), JSON.stringify({ version: 1, works }))
  } catch {
    // A private window may forbid it: the work then holds until the page is closed.
  }
}

const KEEP_AFTER_MS = 300

/** Writes down unsaved work once it rests, and at the latest when the page goes. */
export function keepWhileOpen(desk: Desk, works: Ref<Record<string, Work>>) {
  let timer: ReturnType<typeof setTimeout> | undefined
  const keep = () => {
    clearTimeout(timer)
    keepWork(desk, works.value)
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
