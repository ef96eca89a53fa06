import { and, asc, eq, inArray, like, or, type SQL } from 'drizzle-orm'
import type { WellQuery } from '#shared/contracts/wells.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { containing } from '../../db/like.ts'
import { readable } from '../../db/readable.ts'
import { aquiferUnits, unitPicks, wells, wellScreens } from '../../db/schema/index.ts'
import { addToCells, recountingWells } from '../../db/well-cells.ts'

export type WellRow = typeof wells.$inferSelect
export type NewWell = typeof wells.$inferInsert
export type NewScreen = Omit<typeof wellScreens.$inferInsert, 'wellId'>
export type NewPick = Omit<typeof unitPicks.$inferInsert, 'wellId'>

function matching(viewer: Viewer, { text }: WellQuery): SQL | undefined {
  const pattern = text ? containing(text) : null
  return and(readable.wells(viewer), pattern ? or(like(wells.code, pattern), like(wells.name, pattern)) : undefined)
}

export const listWells = (executor: Executor, viewer: Viewer, query: WellQuery) =>
  executor
    .select()
    .from(wells)
    .where(matching(viewer, query))
    .orderBy(asc(wells.code))
    .limit(query.limit)
    .offset(query.offset)

export const countWells = (executor: Executor, viewer: Viewer, query: WellQuery): Promise<number> =>
  executor.$count(wells, matching(viewer, query))

export async function findWell(executor: Executor, viewer: Viewer, id: number): Promise<WellRow | null> {
  const [row] = await executor
    .select()
    .from(wells)
    .where(and(eq(wells.id, id), readable.wells(viewer)))
  return row ?? null
}

export async function insertWell(executor: Executor, row: NewWell): Promise<number> {
  const [inserted] = await executor.insert(wells).values(row).$returningId()
  const { id } = inserted!
  await addToCells(executor, eq(wells.id, id))
  return id
}

/** False when the row version is stale. */
export async function updateWell(executor: Executor, id: number, version: number, change: Partial<NewWell>) {
  const [result] = await recountingWells(executor, [id], () =>
    executor
      .update(wells)
      .set({ ...change, rowVersion: version + 1 })
      .where(and(eq(wells.id, id), eq(wells.rowVersion, version))),
  )
  return result.affectedRows === 1
}

export async function insertParts(executor: Executor, wellId: number, screens: NewScreen[], picks: NewPick[]) {
  if (screens.length > 0) await executor.insert(wellScreens).values(screens.map((row) => ({ ...row, wellId })))
  if (picks.length > 0) await executor.insert(unitPicks).values(picks.map((row) => ({ ...row, wellId })))
}

export async function deleteParts(executor: Executor, wellId: number) {
  await executor.delete(wellScreens).where(eq(wellScreens.wellId, wellId))
  await executor.delete(unitPicks).where(eq(unitPicks.wellId, wellId))
}

/** Depths of the units at the wells; the uppermost first. */
export const listPicks = (executor: Executor, wellIds: number[]) =>
  executor
    .select({
      wellId: unitPicks.wellId,
      unitId: unitPicks.unitId,
      unitName: aquiferUnits.name,
      topM: unitPicks.topM,
      bottomM: unitPicks.bottomM,
      source: unitPicks.source,
    })
    .from(unitPicks)
    .innerJoin(aquiferUnits, eq(aquiferUnits.id, unitPicks.unitId))
    .where(inArray(unitPicks.wellId, wellIds))
    .orderBy(asc(unitPicks.topM))

export const countUnits = (executor: Executor, ids: number[]): Promise<number> =>
  executor.$count(aquiferUnits, inArray(aquiferUnits.id, ids))
