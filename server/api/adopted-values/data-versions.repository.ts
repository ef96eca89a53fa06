import { eq, inArray, sql } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { dataVersions } from '../../db/schema/index.ts'

/** Counts a change that would alter an estimate of the units. In order of id, so that two transactions cannot deadlock. */
export async function bumpDataVersions(executor: Executor, unitIds: number[]) {
  const rows = [...new Set(unitIds)].sort((a, b) => a - b).map((unitId) => ({ unitId, version: 1 }))
  if (rows.length === 0) return
  await executor
    .insert(dataVersions)
    .values(rows)
    .onDuplicateKeyUpdate({ set: { version: sql`version + 1` } })
}

export async function dataVersion(executor: Executor, unitId: number): Promise<number> {
  const [row] = await executor.select().from(dataVersions).where(eq(dataVersions.unitId, unitId))
  return row?.version ?? 0
}

export const listDataVersions = (executor: Executor, unitIds: number[]) =>
  unitIds.length === 0
    ? Promise.resolve([])
    : executor.select().from(dataVersions).where(inArray(dataVersions.unitId, unitIds))
