import { and, asc, eq, isNotNull, isNull, ne, or, sql, type SQL } from 'drizzle-orm'
import type { OutsideRowQuery } from '#shared/contracts/outside-series.ts'
import type { Executor } from '../../db/client.ts'
import { outsideReadings, outsideSeries, readings, readingSeries, users } from '../../db/schema/index.ts'

export type OutsideSeriesRow = typeof outsideSeries.$inferSelect
export type OutsideReadingRow = typeof outsideReadings.$inferSelect

const rowsPerStatement = 1_000

export async function insertSeries(executor: Executor, row: typeof outsideSeries.$inferInsert): Promise<number> {
  const [inserted] = await executor.insert(outsideSeries).values(row).$returningId()
  return inserted!.id
}

export async function insertReadings(executor: Executor, rows: OutsideReadingRow[]) {
  for (let start = 0; start < rows.length; start += rowsPerStatement)
    await executor.insert(outsideReadings).values(rows.slice(start, start + rowsPerStatement))
}

const withAuthor = (executor: Executor) =>
  executor
    .select({ row: outsideSeries, by: users.name })
    .from(outsideSeries)
    .leftJoin(users, eq(users.id, outsideSeries.createdBy))
export type FoundSeries = Awaited<ReturnType<typeof listSeries>>[number]

export const listSeries = (executor: Executor, testId: number) =>
  withAuthor(executor)
    .where(and(eq(outsideSeries.pumpingTestId, testId), isNull(outsideSeries.deletedAt)))
    .orderBy(asc(outsideSeries.id))

export async function findSeries(executor: Executor, id: number): Promise<FoundSeries | null> {
  const [found] = await withAuthor(executor).where(and(eq(outsideSeries.id, id), isNull(outsideSeries.deletedAt)))
  return found ?? null
}

/** False when the row version is stale. */
export async function endSeries(executor: Executor, id: number, version: number, at: Date): Promise<boolean> {
  const [result] = await executor
    .update(outsideSeries)
    .set({ deletedAt: at, rowVersion: version + 1 })
    .where(and(eq(outsideSeries.id, id), eq(outsideSeries.rowVersion, version)))
  return result.affectedRows === 1
}

/** Times and values that were taken, in the order of the file. */
export const listTaken = (executor: Executor, seriesId: number) =>
  executor
    .select({
      elapsedS: sql<number>`${outsideReadings.elapsedS}`.mapWith(Number),
      value: sql<number>`${outsideReadings.value}`.mapWith(Number),
    })
    .from(outsideReadings)
    .where(and(eq(outsideReadings.seriesId, seriesId), eq(outsideReadings.taken, true)))
    .orderBy(asc(outsideReadings.seq))

const conditions: Record<OutsideRowQuery['only'], SQL | undefined> = {
  all: undefined,
  'not-taken': eq(outsideReadings.taken, false),
  flagged: or(ne(outsideReadings.flags, ''), isNotNull(outsideReadings.issues)),
}
const matching = (seriesId: number, only: OutsideRowQuery['only']) =>
  and(eq(outsideReadings.seriesId, seriesId), conditions[only])

export const listRows = (executor: Executor, seriesId: number, { only, limit, offset }: OutsideRowQuery) =>
  executor
    .select()
    .from(outsideReadings)
    .where(matching(seriesId, only))
    .orderBy(asc(outsideReadings.seq))
    .limit(limit)
    .offset(offset)

export const countRows = (executor: Executor, seriesId: number, only: OutsideRowQuery['only']): Promise<number> =>
  executor.$count(outsideReadings, matching(seriesId, only))

/** First and last time of the readings of a test that were taken; null without any. */
export async function spanOfReadings(executor: Executor, testId: number) {
  const [span] = await executor
    .select({
      first: sql<number | null>`min(${readings.elapsedS})`,
      last: sql<number | null>`max(${readings.elapsedS})`,
    })
    .from(readings)
    .innerJoin(readingSeries, eq(readingSeries.id, readings.seriesId))
    .where(and(eq(readingSeries.pumpingTestId, testId), isNull(readingSeries.deletedAt), eq(readings.taken, true)))
  return span && span.first !== null && span.last !== null
    ? { first: Number(span.first), last: Number(span.last) }
    : null
}
