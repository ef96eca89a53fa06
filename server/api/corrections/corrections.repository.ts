import { and, asc, eq, isNull } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { testCorrections, users } from '../../db/schema/index.ts'

export type CorrectionRow = typeof testCorrections.$inferSelect
export type NewCorrection = typeof testCorrections.$inferInsert

const withAuthor = (executor: Executor) =>
  executor
    .select({ row: testCorrections, by: users.name })
    .from(testCorrections)
    .leftJoin(users, eq(users.id, testCorrections.changedBy))
export type FoundCorrection = Awaited<ReturnType<typeof listCorrections>>[number]

export const listCorrections = (executor: Executor, testId: number) =>
  withAuthor(executor)
    .where(and(eq(testCorrections.pumpingTestId, testId), isNull(testCorrections.deletedAt)))
    .orderBy(asc(testCorrections.id))

export async function findCorrection(executor: Executor, id: number): Promise<FoundCorrection | null> {
  const [found] = await withAuthor(executor).where(and(eq(testCorrections.id, id), isNull(testCorrections.deletedAt)))
  return found ?? null
}

export async function insertCorrection(executor: Executor, row: NewCorrection): Promise<number> {
  const [inserted] = await executor.insert(testCorrections).values(row).$returningId()
  return inserted!.id
}

/** False when the row version is stale. */
export async function updateCorrection(
  executor: Executor,
  id: number,
  version: number,
  change: Partial<NewCorrection>,
): Promise<boolean> {
  const [result] = await executor
    .update(testCorrections)
    .set({ ...change, rowVersion: version + 1 })
    .where(and(eq(testCorrections.id, id), eq(testCorrections.rowVersion, version)))
  return result.affectedRows === 1
}

const following = (seriesId: number) =>
  and(eq(testCorrections.outsideSeriesId, seriesId), isNull(testCorrections.deletedAt))

export const countFollowing = (executor: Executor, seriesId: number): Promise<number> =>
  executor.$count(testCorrections, following(seriesId))

export const listFollowing = (executor: Executor, seriesId: number): Promise<CorrectionRow[]> =>
  executor.select().from(testCorrections).where(following(seriesId))
