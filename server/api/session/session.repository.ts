import { eq } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { users } from '../../db/schema/index.ts'

/** What is needed to let a person in. */
export async function findByEmail(executor: Executor, email: string) {
  const [row] = await executor
    .select({ id: users.id, active: users.active, demo: users.demo, passwordHash: users.passwordHash })
    .from(users)
    .where(eq(users.email, email))
  return row ?? null
}
