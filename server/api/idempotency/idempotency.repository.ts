import { eq } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { idempotencyKeys } from '../../db/schema/index.ts'

/** Takes a key; a second taker waits here until the first transaction ends, and then sees the duplicate. */
export const takeKey = (executor: Executor, id: string, requestSha256: string, createdAt: Date) =>
  executor.insert(idempotencyKeys).values({ id, requestSha256, createdAt })

export const keepAnswer = (executor: Executor, id: string, response: unknown) =>
  executor.update(idempotencyKeys).set({ response }).where(eq(idempotencyKeys.id, id))

export async function findKey(executor: Executor, id: string) {
  const [row] = await executor.select().from(idempotencyKeys).where(eq(idempotencyKeys.id, id))
  return row ?? null
}
