import { and, asc, eq, isNotNull, isNull, like, ne, or, sql } from 'drizzle-orm'
import type { PeopleQuery } from '#shared/contracts/people.ts'
import type { Executor } from '../../db/client.ts'
import { containing } from '../../db/like.ts'
import { users } from '../../db/schema/index.ts'

export type PersonRow = Omit<typeof users.$inferSelect, 'passwordHash' | 'preferences'> & { joined: boolean }

const columns = {
  id: users.id,
  email: users.email,
  name: users.name,
  role: users.role,
  mayReview: users.mayReview,
  active: users.active,
  demo: users.demo,
  joined: sql<boolean>`${users.passwordHash} is not null`.mapWith(Boolean),
  createdAt: users.createdAt,
  lastSeenAt: users.lastSeenAt,
  rowVersion: users.rowVersion,
}

const inState = {
  active: and(eq(users.active, true), isNotNull(users.passwordHash)),
  invited: and(eq(users.active, true), isNull(users.passwordHash)),
  deactivated: eq(users.active, false),
}

const matching = ({ search, role, state }: PeopleQuery) => {
  const pattern = containing(search ?? '')
  return and(
    search ? or(like(users.name, pattern), like(users.email, pattern)) : undefined,
    role ? eq(users.role, role) : undefined,
    state ? inState[state] : undefined,
  )
}

export const listPeople = (executor: Executor, query: PeopleQuery): Promise<PersonRow[]> =>
  executor
    .select(columns)
    .from(users)
    .where(matching(query))
    .orderBy(asc(users.name), asc(users.id))
    .limit(query.limit)
    .offset(query.offset)

export const countPeople = (executor: Executor, query: PeopleQuery): Promise<number> =>
  executor.$count(users, matching(query))

export async function findPerson(executor: Executor, id: number): Promise<PersonRow | null> {
  const [row] = await executor.select(columns).from(users).where(eq(users.id, id))
  return row ?? null
}

export async function insertPerson(executor: Executor, row: typeof users.$inferInsert): Promise<number> {
  const [inserted] = await executor.insert(users).values(row).$returningId()
  return inserted!.id
}

/** False when somebody else changed the person since `rowVersion`. */
export async function updatePerson(
  executor: Executor,
  id: number,
  rowVersion: number,
  set: Partial<typeof users.$inferInsert>,
): Promise<boolean> {
  const [changed] = await executor
    .update(users)
    .set({ ...set, rowVersion: sql`${users.rowVersion} + 1` })
    .where(and(eq(users.id, id), eq(users.rowVersion, rowVersion)))
  return changed.affectedRows === 1
}

/**
 * Whether somebody other than `id` can still administer. Locks those rows, so that two administrators who demote
 * each other at the same moment cannot both succeed.
 */
export async function hasOtherAdministrator(executor: Executor, id: number): Promise<boolean> {
  const rows = await executor
    .select({ id: users.id })
    .from(users)
    .where(and(eq(users.role, 'administrator'), inState.active, ne(users.id, id)))
    .for('update')
  return rows.length > 0
}
