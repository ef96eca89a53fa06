import { and, desc, eq, like, or } from 'drizzle-orm'
import type { OutboxQuery } from '#shared/contracts/outbox.ts'
import type { Executor } from '../../db/client.ts'
import { containing } from '../../db/like.ts'
import { mailOutbox } from '../../db/schema/index.ts'

export type MailRow = typeof mailOutbox.$inferSelect

const matching = ({ state, search }: OutboxQuery) => {
  const pattern = containing(search ?? '')
  return and(
    state ? eq(mailOutbox.state, state) : undefined,
    search ? or(like(mailOutbox.recipient, pattern), like(mailOutbox.subject, pattern)) : undefined,
  )
}

export const listMail = (executor: Executor, query: OutboxQuery): Promise<MailRow[]> =>
  executor
    .select()
    .from(mailOutbox)
    .where(matching(query))
    .orderBy(desc(mailOutbox.id))
    .limit(query.limit)
    .offset(query.offset)

export const countMail = (executor: Executor, query: OutboxQuery): Promise<number> =>
  executor.$count(mailOutbox, matching(query))
