import { eq } from 'drizzle-orm'
import type { Executor } from '../db/client.ts'
import { mailOutbox } from '../db/schema/index.ts'
import type { Message } from './mail.ts'

export async function insertMail(executor: Executor, { to, subject, text }: Message, now: Date): Promise<number> {
  const [row] = await executor
    .insert(mailOutbox)
    .values({ recipient: to, subject, body: text, state: 'waiting', createdAt: now })
    .$returningId()
  return row!.id
}

export async function findMail(executor: Executor, id: number) {
  const [row] = await executor.select().from(mailOutbox).where(eq(mailOutbox.id, id))
  return row ?? null
}

/** `body` is what the outbox goes on showing. */
export const markSent = (executor: Executor, id: number, now: Date, body: string) =>
  executor.update(mailOutbox).set({ state: 'sent', sentAt: now, error: null, body }).where(eq(mailOutbox.id, id))

export const markFailed = (executor: Executor, id: number, error: string) =>
  executor.update(mailOutbox).set({ state: 'failed', error }).where(eq(mailOutbox.id, id))
