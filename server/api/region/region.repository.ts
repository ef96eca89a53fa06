import { and, eq, sql } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { region, wells } from '../../db/schema/index.ts'

export type RegionRow = typeof region.$inferSelect

/** One installation is one region. */
const regionId = 1

export async function findRegion(executor: Executor): Promise<RegionRow | null> {
  const [row] = await executor.select().from(region).where(eq(region.id, regionId))
  return row ?? null
}

/** Does nothing when there is a region. */
export const insertRegion = (executor: Executor, row: Omit<typeof region.$inferInsert, 'id'>) =>
  executor
    .insert(region)
    .ignore()
    .values({ ...row, id: regionId })

/** False when somebody else changed the region since `rowVersion`. */
export async function updateRegion(executor: Executor, rowVersion: number, set: Partial<RegionRow>): Promise<boolean> {
  const [changed] = await executor
    .update(region)
    .set({ ...set, rowVersion: sql`${region.rowVersion} + 1` })
    .where(and(eq(region.id, regionId), eq(region.rowVersion, rowVersion)))
  return changed.affectedRows === 1
}

/**
 * Whether distances were ever computed in the region's system.
 * @everyRow Counts hidden wells too, and says nothing about any single one.
 */
export async function hasWells(executor: Executor): Promise<boolean> {
  return (await executor.$count(wells)) > 0
}
