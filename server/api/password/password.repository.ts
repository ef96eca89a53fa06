import { and, eq, gt, isNotNull, isNull } from 'drizzle-orm'
import type { LinkPurpose } from '#shared/contracts/password.ts'
import type { Executor } from '../../db/client.ts'
import { passwordTokens, users } from '../../db/schema/index.ts'

const recipient = {
  id: users.id,
  email: users.email,
  name: users.name,
  active: users.active,
  demo: users.demo,
}

export async function findRecipient(executor: Executor, email: string) {
  const [row] = await executor.select(recipient).from(users).where(eq(users.email, email))
  return row ?? null
}

export const insertToken = (executor: Executor, row: typeof passwordTokens.$inferInsert) =>
  executor.insert(passwordTokens).values(row)

/** How many links a person was sent since. */
export const countTokens = (executor: Executor, userId: number, purpose: LinkPurpose, since: Date) =>
  executor.$count(
    passwordTokens,
    and(eq(passwordTokens.userId, userId), eq(passwordTokens.purpose, purpose), gt(passwordTokens.createdAt, since)),
  )

const usable = (tokenHash: string, now: Date) =>
  and(
    eq(passwordTokens.tokenHash, tokenHash),
    isNull(passwordTokens.usedAt),
    gt(passwordTokens.expiresAt, now),
    eq(users.active, true),
  )

/** A token that still works, with whom it is for. */
export async function findToken(executor: Executor, tokenHash: string, now: Date) {
  const [row] = await executor
    .select({ purpose: passwordTokens.purpose, person: recipient })
    .from(passwordTokens)
    .innerJoin(users, eq(users.id, passwordTokens.userId))
    .where(usable(tokenHash, now))
  return row ?? null
}

/** Uses a token up; false when another request was faster. */
export async function useToken(executor: Executor, tokenHash: string, now: Date): Promise<boolean> {
  const [used] = await executor
    .update(passwordTokens)
    .set({ usedAt: now })
    .where(and(eq(passwordTokens.tokenHash, tokenHash), isNull(passwordTokens.usedAt)))
  return used.affectedRows === 1
}

/** Ends all links of a person that were not used. */
export const endTokensOf = (executor: Executor, userId: number, now: Date) =>
  executor
    .update(passwordTokens)
    .set({ usedAt: now })
    .where(and(eq(passwordTokens.userId, userId), isNull(passwordTokens.usedAt)))

export const savePerson = (executor: Executor, id: number, set: Partial<typeof users.$inferInsert>) =>
  executor.update(users).set(set).where(eq(users.id, id))

export const insertPlaceholder = (executor: Executor, row: typeof users.$inferInsert) =>
  executor.insert(users).ignore().values(row)

/** Whether any administrator could sign in; demo accounts count where they are let in. */
export async function hasAdministrator(executor: Executor, withDemo: boolean): Promise<boolean> {
  const able = and(eq(users.role, 'administrator'), eq(users.active, true), isNotNull(users.passwordHash))
  return (await executor.$count(users, and(able, withDemo ? undefined : eq(users.demo, false)))) > 0
}
