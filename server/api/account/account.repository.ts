import { eq } from 'drizzle-orm'
import type { Preferences } from '#shared/contracts/account.ts'
import type { Executor } from '../../db/client.ts'
import { users } from '../../db/schema/index.ts'

export async function findCredentials(executor: Executor, id: number) {
  const [row] = await executor
    .select({ email: users.email, name: users.name, passwordHash: users.passwordHash })
    .from(users)
    .where(eq(users.id, id))
  return row ?? null
}

export const savePassword = (executor: Executor, id: number, passwordHash: string) =>
  executor.update(users).set({ passwordHash }).where(eq(users.id, id))

/** Not an edit of the person: the row version stays. */
export const savePreferences = (executor: Executor, id: number, preferences: Preferences) =>
  executor.update(users).set({ preferences }).where(eq(users.id, id))
