import { z } from 'zod'
import { instant, listOf, recordId } from './common.ts'

export const jobState = z.enum(['waiting', 'running', 'done', 'failed', 'cancelled'])

export const job = z.object({
  id: recordId,
  kind: z.string(),
  state: jobState,
  done: z.int().nonnegative(),
  /** Null while the amount of work is not known. */
  total: z.int().nonnegative().nullable(),
  message: z.string().nullable(),
  errorCode: z.string().nullable(),
  attempts: z.int(),
  cancelRequested: z.boolean(),
  createdAt: instant,
  finishedAt: instant.nullable(),
})
export type Job = z.infer<typeof job>

export const jobList = listOf(job)
