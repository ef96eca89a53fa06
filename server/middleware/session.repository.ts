import { and, eq, gt } from 'drizzle-orm'
import type { Executor } from '../db/client.ts'
import { sessions } from '../db/schema/index.ts'

export async function findSession(executor: Executor, id: string, now: Date) {
  const [row] = await executor
    .select()
    .from(sessions)
    .where(and(eq(sessions.id, id), gt(sessions.expiresAt, now)))
  return row ?? null
}

export async function saveSession(executor: Executor, row: typeof sessions.$inferInsert): Promise<void> {
  const { data, userId, expiresAt } = row
  await executor.insert(sessions).values(row).onDuplicateKeyUpdate({ set: { data, userId, expiresAt } })
}

export const extendSession = (executor: Executor, id: string, expiresAt: Date) =>
  executor.update(sessions).set({ expiresAt }).where(eq(sessions.id, id))

export const deleteSession = (executor: Executor, id: string) => executor.delete(sessions).where(eq(sessions.id, id))

/** Signs a person out everywhere; belongs in the transaction that changes what they may do. */
export async function endSessionsOf(executor: Executor, userId: number): Promise<void> {
  await executor.delete(sessions).where(eq(sessions.userId, userId))
}
