import { eq } from 'drizzle-orm'
import type { Executor } from '../db/client.ts'
import { users } from '../db/schema/index.ts'

const columns = {
  id: users.id,
  name: users.name,
  email: users.email,
  role: users.role,
  mayReview: users.mayReview,
  active: users.active,
  demo: users.demo,
  preferences: users.preferences,
  lastSeenAt: users.lastSeenAt,
}

export type Account = Pick<typeof users.$inferSelect, keyof typeof columns>

export async function findAccount(executor: Executor, id: number): Promise<Account | null> {
  const [row] = await executor.select(columns).from(users).where(eq(users.id, id))
  return row ?? null
}

/** Not an edit: the row version stays. */
export const markSeen = (executor: Executor, id: number, now: Date) =>
  executor.update(users).set({ lastSeenAt: now }).where(eq(users.id, id))
