import { z } from 'zod'
import { fittedMethod } from '#shared/contracts/analyses.ts'
import { analysisOptions } from '#shared/contracts/analysis-result.ts'

/** An analysis of a pumping test as it is being worked on. */
export const work = z.object({
  method: fittedMethod,
  options: analysisOptions,
  label: z.string().nullable(),
  rowVersion: z.number().nullable(),
})
export type Work = z.infer<typeof work>
