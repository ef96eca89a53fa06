import { inArray } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../client.ts'
import { users } from '../../schema/index.ts'
import { demoAccounts } from '../accounts.ts'

export interface Cast {
  analyst: Viewer
  reviewer: Viewer
  steward: Viewer
  administrator: Viewer
}

/** The demo people, who do everything in the demo region as people would. */
export async function castOf(executor: Executor): Promise<Cast> {
  const emails = demoAccounts.map(({ email }) => email)
  const rows = await executor.select().from(users).where(inArray(users.email, emails))
  const viewer = (name: string): Viewer => {
    const row = rows.find(({ email }) => email.startsWith(`${name}@`))
    if (!row) throw new Error(`The demo account ${name} is missing`)
    return { id: row.id, name: row.name, role: row.role, mayReview: row.mayReview }
  }
  return {
    analyst: viewer('analyst'),
    reviewer: viewer('reviewer'),
    steward: viewer('steward'),
    administrator: viewer('administrator'),
  }
}
