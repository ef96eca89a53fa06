import { and, eq, inArray, isNotNull, isNull, lte, ne, or, type SQL } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { otherWells, pumpingTests, testWells, wells } from '../../db/schema/index.ts'
import { recountingWells } from '../../db/well-cells.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Exposure } from './exposure.ts'

const tables = { well: wells, 'pumping-test': pumpingTests }
export type Subject = keyof typeof tables

/** What counts the rows by how visible they are keeps pace with a change. */
const recounting: Record<Subject, typeof recountingWells> = {
  well: recountingWells,
  'pumping-test': (_executor, _ids, change) => change(),
}

const fragment = { well: readable.wells, 'pumping-test': readable.pumpingTests }

export async function lockSubject(executor: Executor, viewer: Viewer, subject: Subject, id: number) {
  const table = tables[subject]
  const [row] = await executor
    .select({ id: table.id, visibility: table.visibility, embargoUntil: table.embargoUntil })
    .from(table)
    .where(and(eq(table.id, id), fragment[subject](viewer)))
    .for('update')
  return row ?? null
}

/** False when the row version is stale. */
export async function saveExposure(
  executor: Executor,
  subject: Subject,
  id: number,
  version: number,
  exposure: Exposure,
) {
  const table = tables[subject]
  const [result] = await recounting[subject](executor, [id], () =>
    executor
      .update(table)
      .set({ ...exposure, rowVersion: version + 1 })
      .where(and(eq(table.id, id), eq(table.rowVersion, version))),
  )
  return result.affectedRows === 1
}

/** The well a test belongs to, with how visible it is. */
export async function exposureOfParent(executor: Executor, testId: number): Promise<Exposure> {
  const [row] = await executor
    .select({ visibility: wells.visibility, embargoUntil: wells.embargoUntil })
    .from(wells)
    .innerJoin(pumpingTests, eq(pumpingTests.wellId, wells.id))
    .where(and(eq(pumpingTests.id, testId), readable.wells(steward)))
  return row!
}

const steward: Viewer = { id: null, name: 'Basinbook', role: 'steward', mayReview: false }

export const exposuresOfTests = (executor: Executor, wellId: number): Promise<Exposure[]> =>
  executor
    .select({ visibility: pumpingTests.visibility, embargoUntil: pumpingTests.embargoUntil })
    .from(pumpingTests)
    .where(and(eq(pumpingTests.wellId, wellId), readable.pumpingTests(steward)))

/** Tests that are not private and in which the well is observed, or superposed: they would hold a private well. */
export const countOpenTestsWith = (executor: Executor, wellId: number): Promise<number> =>
  executor.$count(
    pumpingTests,
    and(
      ne(pumpingTests.visibility, 'private'),
      or(
        inArray(
          pumpingTests.id,
          executor.select({ id: testWells.pumpingTestId }).from(testWells).where(eq(testWells.wellId, wellId)),
        ),
        inArray(
          pumpingTests.id,
          executor
            .select({ id: otherWells.pumpingTestId })
            .from(otherWells)
            .where(and(eq(otherWells.wellId, wellId), isNull(otherWells.deletedAt))),
        ),
      ),
      readable.pumpingTests(steward),
    ),
  )

export const countPrivateWellsOf = (executor: Executor, testId: number): Promise<number> =>
  executor.$count(
    wells,
    and(
      eq(wells.visibility, 'private'),
      or(
        inArray(
          wells.id,
          executor.select({ id: testWells.wellId }).from(testWells).where(eq(testWells.pumpingTestId, testId)),
        ),
        inArray(
          wells.id,
          executor
            .select({ id: otherWells.wellId })
            .from(otherWells)
            .where(and(eq(otherWells.pumpingTestId, testId), isNull(otherWells.deletedAt))),
        ),
      ),
      readable.wells(steward),
    ),
  )

/**
 * Ends the embargoes whose time has come, and says whose they were. Looking for them locks nothing: no index leads to
 * the dates, and a locking search would hold every row of the table.
 */
export async function liftEmbargoes(executor: Executor, subject: Subject, now: Date): Promise<number[]> {
  const table = tables[subject]
  const isDue = and(isNotNull(table.embargoUntil), lte(table.embargoUntil, now), fragment[subject](steward))
  const due = (where: SQL | undefined) => executor.select({ id: table.id }).from(table).where(where)
  const found = (await due(isDue)).map(({ id }) => id)
  if (found.length === 0) return []
  const ids = (await due(and(inArray(table.id, found), isDue)).for('update')).map(({ id }) => id)
  if (ids.length > 0)
    await recounting[subject](executor, ids, () =>
      executor.update(table).set({ embargoUntil: null }).where(inArray(table.id, ids)),
    )
  return ids
}
