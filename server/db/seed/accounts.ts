import type { Deps } from '../../deps.ts'
import type { Executor } from '../client.ts'
import { users } from '../schema/index.ts'
import { hashPassword } from '../../api/session/passwords.ts'
import accounts from './accounts.json' with { type: 'json' }

export type DemoAccount = (typeof accounts)[number]
export const demoAccounts: DemoAccount[] = accounts

const row = async ({ password, ...account }: DemoAccount, createdAt: Date): Promise<typeof users.$inferInsert> => ({
  ...account,
  role: account.role as (typeof users.$inferInsert)['role'],
  demo: true,
  passwordHash: await hashPassword(password),
  createdAt,
})

/** One invented person per role, and one with the review right; accounts that are there already stay as they are. */
export async function seedAccounts({ now }: Pick<Deps, 'now'>, executor: Executor): Promise<void> {
  const rows = await Promise.all(demoAccounts.map((account) => row(account, now())))
  await executor.insert(users).ignore().values(rows)
}
