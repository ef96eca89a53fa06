import { z } from 'zod'
import { instant, listOf, paging, recordId } from './common.ts'

export const mailState = z.enum(['waiting', 'sent', 'failed'])

export const outboxItem = z.object({
  id: recordId,
  recipient: z.string(),
  subject: z.string(),
  state: mailState,
  error: z.string().nullable(),
  createdAt: instant,
  sentAt: instant.nullable(),
})
export type OutboxItem = z.infer<typeof outboxItem>

export const outboxMessage = outboxItem.extend({ body: z.string() })
export type OutboxMessage = z.infer<typeof outboxMessage>

export const outboxQuery = paging.extend({
  state: mailState.optional(),
  /** Part of the address or subject. */
  search: z.string().trim().max(120).optional(),
})
export type OutboxQuery = z.infer<typeof outboxQuery>

export const outboxList = listOf(outboxItem)
