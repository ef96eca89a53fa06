import { and, eq, inArray, isNotNull, isNull, lte } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { adoptedValues, pumpingTests, wells } from '../../db/schema/index.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'

export interface Exposure {
  visibility: 'published' | 'internal' | 'private'
  embargoUntil: Date | null
}

const tables = { well: wells, 'pumping-test': pumpingTests }
export type Subject = keyof typeof tables

const fragment = { well: readable.wells, 'pumping-test': readable.pumpingTests }
const ofSubject = { well: adoptedValues.wellId, 'pumping-test': adoptedValues.pumpingTestId }

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
  const [result] = await executor
    .update(table)
    .set({ ...exposure, rowVersion: version + 1 })
    .where(and(eq(table.id, id), eq(table.rowVersion, version)))
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

/** Units whose estimates change when the subject is shown or hidden. */
export async function unitsWithValues(executor: Executor, subject: Subject, ids: number[]): Promise<number[]> {
  if (ids.length === 0) return []
  const rows = await executor
    .selectDistinct({ unitId: adoptedValues.unitId })
    .from(adoptedValues)
    .where(and(inArray(ofSubject[subject], ids), isNull(adoptedValues.validTo)))
  return rows.map(({ unitId }) => unitId)
}

/** Ends the embargoes whose time has come, and says whose they were. */
export async function liftEmbargoes(executor: Executor, subject: Subject, now: Date): Promise<number[]> {
  const table = tables[subject]
  const due = await executor
    .select({ id: table.id })
    .from(table)
    .where(and(isNotNull(table.embargoUntil), lte(table.embargoUntil, now), fragment[subject](steward)))
    .for('update')
  const ids = due.map(({ id }) => id)
  if (ids.length > 0) await executor.update(table).set({ embargoUntil: null }).where(inArray(table.id, ids))
  return ids
}
