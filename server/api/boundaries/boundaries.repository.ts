import { asc, eq, inArray } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { boundaries, boundaryUnits } from '../../db/schema/index.ts'

export const listBoundaries = (executor: Executor) => executor.select().from(boundaries).orderBy(asc(boundaries.id))
export const listBoundaryUnits = (executor: Executor) => executor.select().from(boundaryUnits)

export const boundariesOfUnits = (executor: Executor, unitIds: number[]) =>
  executor
    .selectDistinct({ id: boundaries.id, name: boundaries.name, kind: boundaries.kind, path: boundaries.path })
    .from(boundaries)
    .innerJoin(boundaryUnits, eq(boundaryUnits.boundaryId, boundaries.id))
    .where(inArray(boundaryUnits.unitId, unitIds))

export async function insertBoundary(
  executor: Executor,
  row: typeof boundaries.$inferInsert,
  unitIds: number[],
): Promise<number> {
  const [inserted] = await executor.insert(boundaries).values(row).$returningId()
  const boundaryId = inserted!.id
  await executor.insert(boundaryUnits).values(unitIds.map((unitId) => ({ boundaryId, unitId })))
  return boundaryId
}
