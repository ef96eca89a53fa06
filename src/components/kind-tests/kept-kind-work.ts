import { z } from 'zod'
import { kindSchemas, ownMethod } from '#shared/contracts/kind-analyses.ts'

const ownOptions = z.union([
  kindSchemas.slug.options,
  kindSchemas.step.options,
  kindSchemas['specific-capacity'].options,
])

/** An analysis of a test of a kind of its own as it is being worked on. */
export const kindWork = z.object({
  method: ownMethod,
  options: ownOptions,
  label: z.string().nullable(),
  rowVersion: z.number().nullable(),
})
export type KindWork = z.infer<typeof kindWork>
