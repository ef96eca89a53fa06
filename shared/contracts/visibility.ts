import { z } from 'zod'
import { instant, rowVersion } from './common.ts'
import { visibility } from './pumping-tests.ts'

export const visibilityInput = z.object({
  rowVersion,
  visibility,
  /** Published records stay hidden from readers until this instant. */
  embargoUntil: instant.nullable(),
})
export type VisibilityInput = z.infer<typeof visibilityInput>

export const visibilityAnswer = z.object({ visibility, embargoUntil: instant.nullable(), rowVersion })
