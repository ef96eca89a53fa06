import { onScopeDispose, watch, type Ref } from 'vue'
import { z } from 'zod'
import type { Work } from './work.ts'

/** Whose work, on which test: one window may see several people, and none gets what another has not saved. */
export interface Seat {
  personId: number | null
  testId: number
}

const address = ({ personId, testId }: Seat) => `basinbook:workbench:${personId ?? 'visitor'}:${testId}`

/** What a reload of the page must not lose; for this window only. By the id of the analysis, or `new`. */
export function readWorks<W extends Work>(seat: Seat, schema: z.ZodType<W>): Record<string, W> {
  const kept = z.object({ version: z.literal(1), works: z.record(z.string(), schema) })
  try {
    const found = kept.safeParse(JSON.parse(sessionStorage.getItem(address(seat)) ?? 'null'))
    return found.success ? found.data.works : {}
  } catch {
    return {}
  }
}

export function keepWorks(seat: Seat, works: Record<string, Work>) {
  try {
    if (Object.keys(works).length === 0) sessionStorage.removeItem(address(seat))
    else sessionStorage.setItem(address(seat), JSON.stringify({ version: 1, works }))
  } catch {
    // A private window may forbid it: the work then holds until the page is closed.
  }
}

const KEEP_AFTER_MS = 300

/** Writes down unsaved work once it rests, and at the latest when the page goes. */
export function keepWhileOpen(seat: Seat, works: Readonly<Ref<Record<string, Work>>>) {
  let timer: ReturnType<typeof setTimeout> | undefined
  const keep = () => {
    clearTimeout(timer)
    keepWorks(seat, works.value)
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
