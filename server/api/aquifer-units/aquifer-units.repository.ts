import { and, asc, eq, isNull, sql } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import {
  adoptedValues,
  aquiferUnits,
  pumpingTests,
  streams,
  unitPicks,
  unitStreams,
  wells,
} from '../../db/schema/index.ts'

export const listUnits = (executor: Executor) =>
  executor.select().from(aquiferUnits).orderBy(asc(aquiferUnits.depthOrder))

export async function findUnit(executor: Executor, id: number) {
  const [row] = await executor.select().from(aquiferUnits).where(eq(aquiferUnits.id, id))
  return row ?? null
}

/** Current values per unit and quantity that the viewer may see. */
export const countValues = (executor: Executor, viewer: Viewer) =>
  executor
    .select({
      unitId: adoptedValues.unitId,
      quantity: adoptedValues.quantity,
      n: sql<number>`count(*)`.mapWith(Number),
    })
    .from(adoptedValues)
    .innerJoin(pumpingTests, eq(pumpingTests.id, adoptedValues.pumpingTestId))
    .where(and(isNull(adoptedValues.validTo), readable.pumpingTests(viewer)))
    .groupBy(adoptedValues.unitId, adoptedValues.quantity)

/** Picks of the unit in wells that the viewer may see. */
export async function countPicks(executor: Executor, viewer: Viewer, unitId: number): Promise<number> {
  const [row] = await executor
    .select({ n: sql<number>`count(*)`.mapWith(Number) })
    .from(unitPicks)
    .innerJoin(wells, eq(wells.id, unitPicks.wellId))
    .where(and(eq(unitPicks.unitId, unitId), readable.wells(viewer)))
  return row?.n ?? 0
}

export const streamsOfUnit = (executor: Executor, unitId: number) =>
  executor
    .select({ id: streams.id, name: streams.name })
    .from(unitStreams)
    .innerJoin(streams, eq(streams.id, unitStreams.streamId))
    .where(eq(unitStreams.unitId, unitId))
    .orderBy(asc(streams.streamOrder), asc(streams.name))

export async function insertUnit(executor: Executor, row: typeof aquiferUnits.$inferInsert): Promise<number> {
  const [inserted] = await executor.insert(aquiferUnits).values(row).$returningId()
  return inserted!.id
}

export const connectStreams = (executor: Executor, unitId: number, streamIds: number[]) =>
  executor.insert(unitStreams).values(streamIds.map((streamId) => ({ unitId, streamId })))
