import { z } from 'zod'

export const fieldProblem = z.object({
  /** Dotted path in the request: `steps.2.rate`. */
  path: z.string(),
  code: z.string(),
  params: z.record(z.string(), z.union([z.string(), z.number()])),
})
export type FieldProblem = z.infer<typeof fieldProblem>

/** RFC 9457 problem details: the only error body. */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  code: z.string(),
  detail: z.string(),
  params: z.record(z.string(), z.union([z.string(), z.number()])),
  fields: z.array(fieldProblem),
  requestId: z.string(),
})
export type Problem = z.infer<typeof problem>
