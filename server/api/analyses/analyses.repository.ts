import { and, asc, desc, eq, inArray } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { analyses, pumpingTests, reviews, users } from '../../db/schema/index.ts'

export type AnalysisRow = typeof analyses.$inferSelect
export type NewAnalysis = typeof analyses.$inferInsert

const withAuthor = (executor: Executor) =>
  executor
    .select({ row: analyses, authorName: users.name })
    .from(analyses)
    .innerJoin(pumpingTests, eq(pumpingTests.id, analyses.pumpingTestId))
    .leftJoin(users, eq(users.id, analyses.createdBy))

export type FoundAnalysis = Awaited<ReturnType<typeof listAnalyses>>[number]

/** Analyses of one test that the viewer may see, oldest first. */
export const listAnalyses = (executor: Executor, viewer: Viewer, testId: number) =>
  withAuthor(executor)
    .where(and(eq(analyses.pumpingTestId, testId), readable.pumpingTests(viewer)))
    .orderBy(asc(analyses.id))

export async function findAnalysis(executor: Executor, viewer: Viewer, id: number): Promise<FoundAnalysis | null> {
  const [found] = await withAuthor(executor).where(and(eq(analyses.id, id), readable.pumpingTests(viewer)))
  return found ?? null
}

export async function lockAnalysis(executor: Executor, id: number): Promise<AnalysisRow | null> {
  const [row] = await executor.select().from(analyses).where(eq(analyses.id, id)).for('update')
  return row ?? null
}

export async function insertAnalysis(executor: Executor, row: NewAnalysis): Promise<number> {
  const [inserted] = await executor.insert(analyses).values(row).$returningId()
  return inserted!.id
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

export const deleteAnalysis = (executor: Executor, id: number) => executor.delete(analyses).where(eq(analyses.id, id))

/** Whether anything submitted or accepted rests on the test's inputs. */
export async function hasSubmitted(executor: Executor, testId: number): Promise<boolean> {
  const states = ['submitted', 'accepted'] as const
  const where = and(eq(analyses.pumpingTestId, testId), inArray(analyses.state, [...states]))
  return (await executor.$count(analyses, where)) > 0
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
