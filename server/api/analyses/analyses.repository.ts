import { and, asc, desc, eq, inArray, isNull, ne, sql } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import {
  adoptedValues,
  analyses,
  analysisEditors,
  pumpingTests,
  reviews,
  testWells,
  users,
} from '../../db/schema/index.ts'
import { tookPart } from '../../db/took-part.ts'
import { deletePackedInputs, savePackedInputs } from './packed-inputs.repository.ts'

export type AnalysisRow = typeof analyses.$inferSelect
export type NewAnalysis = typeof analyses.$inferInsert
/** The snapshot that goes with a calculated result, packed. */
interface Packed {
  packedInputs: Uint8Array
}

const withAuthor = (executor: Executor, viewer: Viewer) =>
  executor
    .select({ row: analyses, authorName: users.name, tookPart: tookPart(viewer) })
    .from(analyses)
    .innerJoin(pumpingTests, eq(pumpingTests.id, analyses.pumpingTestId))
    .leftJoin(users, eq(users.id, analyses.createdBy))

export type FoundAnalysis = Awaited<ReturnType<typeof listAnalyses>>[number]

const shown = (viewer: Viewer) => and(readable.pumpingTests(viewer), readable.analyses(viewer))

/** Analyses of one test that the viewer may see, oldest first. */
export const listAnalyses = (executor: Executor, viewer: Viewer, testId: number) =>
  withAuthor(executor, viewer)
    .where(and(eq(analyses.pumpingTestId, testId), shown(viewer)))
    .orderBy(asc(analyses.id))

export async function findAnalysis(executor: Executor, viewer: Viewer, id: number): Promise<FoundAnalysis | null> {
  const [found] = await withAuthor(executor, viewer).where(and(eq(analyses.id, id), shown(viewer)))
  return found ?? null
}

/**
 * Locks an analysis with its test, so that neither is changed before the transaction ends. It comes first in a
 * transaction: what is read without a lock afterwards is then as new as what is locked.
 */
export async function lockAnalysis(executor: Executor, viewer: Viewer, id: number): Promise<AnalysisRow | null> {
  const [found] = await executor
    .select({ row: analyses })
    .from(analyses)
    .innerJoin(pumpingTests, eq(pumpingTests.id, analyses.pumpingTestId))
    .where(and(eq(analyses.id, id), shown(viewer)))
    .for('update')
  return found?.row ?? null
}

/** What tells whether fitted analyses of a test were made from its inputs as they are. */
export const listHashes = (executor: Executor, testId: number) =>
  executor
    .select({ id: analyses.id, inputsSha256: analyses.inputsSha256, inputsChanged: analyses.inputsChanged })
    .from(analyses)
    .where(and(eq(analyses.pumpingTestId, testId), ne(analyses.method, 'reported')))

/** Tests with analyses that a well takes part in. */
export async function analysedTestsOf(executor: Executor, wellId: number): Promise<number[]> {
  const rows = await executor
    .selectDistinct({ testId: testWells.pumpingTestId })
    .from(testWells)
    .innerJoin(analyses, eq(analyses.pumpingTestId, testWells.pumpingTestId))
    .where(eq(testWells.wellId, wellId))
  return rows.map(({ testId }) => testId)
}

export async function insertAnalysis(executor: Executor, { packedInputs, ...row }: NewAnalysis & Packed) {
  const [inserted] = await executor.insert(analyses).values(row).$returningId()
  await savePackedInputs(executor, inserted!.id, packedInputs)
  return inserted!.id
}

/** Another calculation in place of the stored one. False when the row version is stale. */
export async function replaceCalculation(
  executor: Executor,
  id: number,
  version: number,
  { packedInputs, ...change }: Partial<NewAnalysis> & Packed,
): Promise<boolean> {
  if (!(await updateAnalysis(executor, id, version, change))) return false
  await savePackedInputs(executor, id, packedInputs)
  return true
}

/** False when the row version is stale. */
export async function updateAnalysis(executor: Executor, id: number, version: number, change: Partial<NewAnalysis>) {
  const [result] = await executor
    .update(analyses)
    .set({ ...change, rowVersion: version + 1 })
    .where(and(eq(analyses.id, id), eq(analyses.rowVersion, version)))
  return result.affectedRows === 1
}

/** Not an edit: the row version stays, so that a person who is working on the analysis is not thrown out. */
export const setInputsChanged = (executor: Executor, id: number, inputsChanged: boolean) =>
  executor.update(analyses).set({ inputsChanged }).where(eq(analyses.id, id))

export const setWithdrawn = (executor: Executor, id: number) =>
  executor
    .update(analyses)
    .set({ state: 'withdrawn', rowVersion: sql`${analyses.rowVersion} + 1` })
    .where(and(eq(analyses.id, id), eq(analyses.state, 'accepted')))

export async function deleteAnalysis(executor: Executor, id: number): Promise<void> {
  await executor.delete(analysisEditors).where(eq(analysisEditors.analysisId, id))
  await deletePackedInputs(executor, id)
  await executor.delete(analyses).where(eq(analyses.id, id))
}

/** Remembers who had a hand in an analysis, once each. */
export async function addEditor(executor: Executor, analysisId: number, { id: userId }: Viewer): Promise<void> {
  if (userId === null) return
  const row = { analysisId, userId }
  await executor.insert(analysisEditors).values(row).onDuplicateKeyUpdate({ set: row })
}

/** Whether an analysis that waits for review, or a value of the regional table, rests on the test's inputs. */
export async function isInUse(executor: Executor, testId: number): Promise<boolean> {
  const waiting = and(eq(analyses.pumpingTestId, testId), eq(analyses.state, 'submitted'))
  const current = and(eq(adoptedValues.pumpingTestId, testId), isNull(adoptedValues.validTo))
  return (await executor.$count(analyses, waiting)) > 0 || (await executor.$count(adoptedValues, current)) > 0
}

export const listReviews = (executor: Executor, analysisIds: number[]) =>
  analysisIds.length === 0
    ? Promise.resolve([])
    : executor
        .select({ row: reviews, reviewer: users.name })
        .from(reviews)
        .leftJoin(users, eq(users.id, reviews.reviewerId))
        .where(inArray(reviews.analysisId, analysisIds))
        .orderBy(desc(reviews.id))
