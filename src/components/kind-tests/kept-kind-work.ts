import { onScopeDispose, watch, type Ref } from 'vue'
import { z } from 'zod'
import { kindSchemas, ownMethod } from '#shared/contracts/kind-analyses.ts'

const ownOptions = z.union([
  kindSchemas.slug.options,
  kindSchemas.step.options,
  kindSchemas['specific-capacity'].options,
])

/** An analysis of a test of a kind of its own as it is being worked on: not saved, or changed since. */
const kindWork = z.object({
  method: ownMethod,
  options: ownOptions,
  label: z.string().nullable(),
  /** Row version of the draft that it changes; null for a new one. */
  rowVersion: z.number().nullable(),
})
export type KindWork = z.infer<typeof kindWork>

/** Unsaved work of one test, by the id of the analysis; `new` is the one that has none yet. */
const keptWorks = z.object({ version: z.literal(1), works: z.record(z.string(), kindWork) })

/** Whose work, on which test: one window may see several people, and none gets what another has not saved. */
export interface KindDesk {
  personId: number | null
  testId: number
}

const address = ({ personId, testId }: KindDesk) => `basinbook:kind-workbench:${personId ?? 'visitor'}:${testId}`

/** What a reload of the page must not lose; for this window only. */
export function readKindWork(desk: KindDesk): Record<string, KindWork> {
  try {
    const found = keptWorks.safeParse(JSON.parse(sessionStorage.getItem(address(desk)) ?? 'null'))
    return found.success ? found.data.works : {}
  } catch {
    return {}
  }
}

function writeKindWork(desk: KindDesk, works: Record<string, KindWork>) {
  try {
    if (Object.keys(works).length === 0) sessionStorage.removeItem(address(desk))
    else sessionStorage.setItem(address(desk), JSON.stringify({ version: 1, works }))
  } catch {
    // A private window may forbid it: the work then holds until the page is closed.
  }
}

/** Writes unsaved work down as it changes: these tests are changed by fields, not by dragging. */
export function keepKindWork(desk: KindDesk, works: Ref<Record<string, KindWork>>) {
  const keep = () => writeKindWork(desk, works.value)
  watch(works, keep)
  onScopeDispose(keep)
}
