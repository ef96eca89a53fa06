import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import {
  aquiferUnits,
  outsideSeries,
  pumpingTests,
  rateSteps,
  readingSeries,
  testUnits,
  testWells,
  users,
  wells,
} from '../../db/schema/index.ts'

export type PumpingTestRow = typeof pumpingTests.$inferSelect
export type NewPumpingTest = typeof pumpingTests.$inferInsert
export type NewTestWell = Omit<typeof testWells.$inferInsert, 'pumpingTestId'>
export type NewRateStep = Omit<typeof rateSteps.$inferInsert, 'pumpingTestId'>
export type NewTestUnit = Omit<typeof testUnits.$inferInsert, 'pumpingTestId'>

/** The test when the viewer may see it, or null. */
export async function findPumpingTest(executor: Executor, viewer: Viewer, id: number) {
  const [row] = await executor
    .select({ test: pumpingTests, wellCode: wells.code, wellDepthM: wells.depthM, createdByName: users.name })
    .from(pumpingTests)
    .innerJoin(wells, eq(wells.id, pumpingTests.wellId))
    .leftJoin(users, eq(users.id, pumpingTests.createdBy))
    .where(and(eq(pumpingTests.id, id), readable.pumpingTests(viewer)))
  return row ?? null
}

/** Serialises edits of one test: of two people who save at once, the second meets the first one's row version. */
export async function lockPumpingTest(executor: Executor, viewer: Viewer, id: number): Promise<PumpingTestRow | null> {
  const [row] = await executor
    .select()
    .from(pumpingTests)
    .where(and(eq(pumpingTests.id, id), readable.pumpingTests(viewer)))
    .for('update')
  return row ?? null
}

export async function insertPumpingTest(executor: Executor, row: NewPumpingTest): Promise<number> {
  const [inserted] = await executor.insert(pumpingTests).values(row).$returningId()
  return inserted!.id
}

/** False when the row version is stale. */
export async function updatePumpingTest(
  executor: Executor,
  id: number,
  version: number,
  change: Partial<NewPumpingTest>,
) {
  const [result] = await executor
    .update(pumpingTests)
    .set({ ...change, rowVersion: version + 1 })
    .where(and(eq(pumpingTests.id, id), eq(pumpingTests.rowVersion, version)))
  return result.affectedRows === 1
}

/** A test without readings, rates and analyses, with its wells and units. */
export async function deleteBareTest(executor: Executor, id: number): Promise<void> {
  await executor.delete(testWells).where(eq(testWells.pumpingTestId, id))
  await executor.delete(testUnits).where(eq(testUnits.pumpingTestId, id))
  await executor.delete(pumpingTests).where(eq(pumpingTests.id, id))
}

/** Wells of a test that the viewer may see, with code and place; the pumped well first. */
export function listTestWells(executor: Executor, viewer: Viewer, testId: number) {
  return executor
    .select({
      row: testWells,
      code: wells.code,
      position: wells.position,
      wellRadiusM: wells.wellRadiusM,
      casingRadiusM: wells.casingRadiusM,
      measuringPointM: wells.measuringPointM,
      staticDepthM: wells.staticDepthM,
    })
    .from(testWells)
    .innerJoin(wells, eq(wells.id, testWells.wellId))
    .where(and(eq(testWells.pumpingTestId, testId), readable.wells(viewer)))
    .orderBy(asc(testWells.role), asc(testWells.distanceM))
}

export function listTestUnits(executor: Executor, testId: number) {
  return executor
    .select({ unitId: testUnits.unitId, share: testUnits.share, basis: testUnits.basis, name: aquiferUnits.name })
    .from(testUnits)
    .innerJoin(aquiferUnits, eq(aquiferUnits.id, testUnits.unitId))
    .where(eq(testUnits.pumpingTestId, testId))
    .orderBy(asc(aquiferUnits.depthOrder))
}

export const listRateSteps = (executor: Executor, testId: number) =>
  executor.select().from(rateSteps).where(eq(rateSteps.pumpingTestId, testId)).orderBy(asc(rateSteps.startS))

export const listSeries = (executor: Executor, testId: number) =>
  executor
    .select()
    .from(readingSeries)
    .where(and(eq(readingSeries.pumpingTestId, testId), isNull(readingSeries.deletedAt)))
    .orderBy(asc(readingSeries.id))

/** Wells of a test that have readings, and whether their times came from a clock. */
export const listLoggedWells = (executor: Executor, testId: number) =>
  executor
    .select({
      wellId: testWells.wellId,
      role: testWells.role,
      timeKind: sql<string | null>`json_value(${readingSeries.mapping}, '$.time.kind')`,
    })
    .from(readingSeries)
    .innerJoin(testWells, eq(testWells.id, readingSeries.testWellId))
    .where(and(eq(readingSeries.pumpingTestId, testId), isNull(readingSeries.deletedAt)))

/** How many series from outside were put on the clock of a test by their clock times. */
export const countClockSeries = (executor: Executor, testId: number): Promise<number> =>
  executor.$count(
    outsideSeries,
    and(
      eq(outsideSeries.pumpingTestId, testId),
      isNull(outsideSeries.deletedAt),
      sql`json_value(${outsideSeries.mapping}, '$.time.kind') = 'clock'`,
    ),
  )

/** Wells the viewer may see, with what a test needs of them. */
export function findWellsForTest(executor: Executor, viewer: Viewer, ids: number[]) {
  return executor
    .select({
      id: wells.id,
      code: wells.code,
      position: wells.position,
      accuracyM: wells.positionAccuracyM,
      depthM: wells.depthM,
      visibility: wells.visibility,
      embargoUntil: wells.embargoUntil,
    })
    .from(wells)
    .where(and(inArray(wells.id, ids), readable.wells(viewer)))
}

export async function countUnits(executor: Executor, ids: number[]): Promise<number> {
  return executor.$count(aquiferUnits, inArray(aquiferUnits.id, ids))
}

export async function insertSteps(executor: Executor, testId: number, steps: NewRateStep[]) {
  if (steps.length === 0) return
  await executor.insert(rateSteps).values(steps.map((step) => ({ ...step, pumpingTestId: testId })))
}

export async function insertUnits(executor: Executor, testId: number, units: NewTestUnit[]) {
  await executor.insert(testUnits).values(units.map((unit) => ({ ...unit, pumpingTestId: testId })))
}

export async function deleteUnitsAndSteps(executor: Executor, testId: number) {
  await executor.delete(rateSteps).where(eq(rateSteps.pumpingTestId, testId))
  await executor.delete(testUnits).where(eq(testUnits.pumpingTestId, testId))
}

export async function insertTestWells(executor: Executor, testId: number, rows: NewTestWell[]) {
  await executor.insert(testWells).values(rows.map((row) => ({ ...row, pumpingTestId: testId })))
}

/** Wells that stay keep their rows, so that their series stay too. */
export async function changeTestWells(executor: Executor, testId: number, rows: NewTestWell[]) {
  const before = await executor.select().from(testWells).where(eq(testWells.pumpingTestId, testId))
  const kept = new Set(rows.map(({ wellId }) => wellId))
  const gone = before.filter(({ wellId }) => !kept.has(wellId)).map(({ id }) => id)
  if (gone.length > 0) await executor.delete(testWells).where(inArray(testWells.id, gone))
  for (const row of rows) {
    const old = before.find(({ wellId }) => wellId === row.wellId)
    if (old) await executor.update(testWells).set(row).where(eq(testWells.id, old.id))
    else await executor.insert(testWells).values({ ...row, pumpingTestId: testId })
  }
}
