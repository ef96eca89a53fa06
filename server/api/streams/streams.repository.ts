import { asc, eq } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { aquiferUnits, streams, unitStreams } from '../../db/schema/index.ts'

export const listStreams = (executor: Executor) =>
  executor.select().from(streams).orderBy(asc(streams.streamOrder), asc(streams.name))

export async function findStream(executor: Executor, id: number) {
  const [row] = await executor.select().from(streams).where(eq(streams.id, id))
  return row ?? null
}

export const unitsOfStream = (executor: Executor, streamId: number) =>
  executor
    .select({ id: aquiferUnits.id, name: aquiferUnits.name })
    .from(unitStreams)
    .innerJoin(aquiferUnits, eq(aquiferUnits.id, unitStreams.unitId))
    .where(eq(unitStreams.streamId, streamId))
    .orderBy(asc(aquiferUnits.depthOrder))

export async function insertStream(executor: Executor, row: typeof streams.$inferInsert): Promise<number> {
  const [inserted] = await executor.insert(streams).values(row).$returningId()
  return inserted!.id
}
