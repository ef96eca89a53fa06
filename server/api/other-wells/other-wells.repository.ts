import { and, asc, eq, isNull } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { otherWells, users, wells } from '../../db/schema/index.ts'

export type OtherWellRow = typeof otherWells.$inferSelect
export type NewOtherWell = typeof otherWells.$inferInsert

const live = (testId: number) => and(eq(otherWells.pumpingTestId, testId), isNull(otherWells.deletedAt))

/** Other wells of a test, with the position of those of the map that the viewer may see; null for every other. */
export const listOtherWells = (executor: Executor, viewer: Viewer, testId: number) =>
  executor
    .select({ row: otherWells, by: users.name, position: wells.position, code: wells.code })
    .from(otherWells)
    .leftJoin(users, eq(users.id, otherWells.changedBy))
    .leftJoin(wells, and(eq(wells.id, otherWells.wellId), readable.wells(viewer)))
    .where(live(testId))
    .orderBy(asc(otherWells.id))
export type FoundOtherWell = Awaited<ReturnType<typeof listOtherWells>>[number]

export async function findOtherWell(executor: Executor, id: number): Promise<OtherWellRow | null> {
  const [row] = await executor
    .select()
    .from(otherWells)
    .where(and(eq(otherWells.id, id), isNull(otherWells.deletedAt)))
  return row ?? null
}

/** A well of the map that the viewer may see. */
export async function findWellForTest(executor: Executor, viewer: Viewer, id: number) {
  const [row] = await executor
    .select({ id: wells.id, code: wells.code, position: wells.position, visibility: wells.visibility })
    .from(wells)
    .where(and(eq(wells.id, id), readable.wells(viewer)))
  return row ?? null
}

export async function insertOtherWell(executor: Executor, row: NewOtherWell): Promise<number> {
  const [inserted] = await executor.insert(otherWells).values(row).$returningId()
  return inserted!.id
}

/** False when the row version is stale. */
export async function updateOtherWell(
  executor: Executor,
  id: number,
  version: number,
  change: Partial<NewOtherWell>,
): Promise<boolean> {
  const [result] = await executor
    .update(otherWells)
    .set({ ...change, rowVersion: version + 1 })
    .where(and(eq(otherWells.id, id), eq(otherWells.rowVersion, version)))
  return result.affectedRows === 1
}

/** Tests that list a well of the map among the others. */
export async function testsListing(executor: Executor, wellId: number): Promise<number[]> {
  const rows = await executor
    .selectDistinct({ testId: otherWells.pumpingTestId })
    .from(otherWells)
    .where(and(eq(otherWells.wellId, wellId), isNull(otherWells.deletedAt)))
  return rows.map(({ testId }) => testId)
}
