import { and, asc, desc, eq, sql } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { analyses, pumpingTests, reviews, users, wells } from '../../db/schema/index.ts'
import { tookPart } from '../../db/took-part.ts'

const submitted = (viewer: Viewer) => and(eq(analyses.state, 'submitted'), readable.pumpingTests(viewer))

/** Analyses that wait for review, oldest submission first. */
export const listQueue = (executor: Executor, viewer: Viewer, limit: number, offset: number) =>
  executor
    .select({
      id: analyses.id,
      pumpingTestId: analyses.pumpingTestId,
      method: analyses.method,
      label: analyses.label,
      rationale: analyses.rationale,
      result: analyses.result,
      submittedAt: analyses.submittedAt,
      tookPart: tookPart(viewer),
      author: users.name,
      wellCode: wells.code,
      startAt: pumpingTests.startAt,
      zone: pumpingTests.zone,
      startPrecision: pumpingTests.startPrecision,
      inputsChanged: analyses.inputsChanged,
    })
    .from(analyses)
    .innerJoin(pumpingTests, eq(pumpingTests.id, analyses.pumpingTestId))
    .innerJoin(wells, eq(wells.id, pumpingTests.wellId))
    .leftJoin(users, eq(users.id, analyses.createdBy))
    .where(submitted(viewer))
    .orderBy(asc(analyses.submittedAt), asc(analyses.id))
    .limit(limit)
    .offset(offset)

export async function countQueue(executor: Executor, viewer: Viewer): Promise<number> {
  const [row] = await executor
    .select({ n: sql<number>`count(*)`.mapWith(Number) })
    .from(analyses)
    .innerJoin(pumpingTests, eq(pumpingTests.id, analyses.pumpingTestId))
    .where(submitted(viewer))
  return row?.n ?? 0
}

export async function insertReview(executor: Executor, row: typeof reviews.$inferInsert): Promise<number> {
  const [inserted] = await executor.insert(reviews).values(row).$returningId()
  return inserted!.id
}

/** What was decided lately, newest first. */
export const listDecided = (executor: Executor, viewer: Viewer, limit: number) =>
  executor
    .select({
      reviewId: reviews.id,
      id: analyses.id,
      pumpingTestId: analyses.pumpingTestId,
      decision: reviews.decision,
      comment: reviews.comment,
      reviewer: users.name,
      createdAt: reviews.createdAt,
      wellCode: wells.code,
      method: analyses.method,
    })
    .from(reviews)
    .innerJoin(analyses, eq(analyses.id, reviews.analysisId))
    .innerJoin(pumpingTests, eq(pumpingTests.id, analyses.pumpingTestId))
    .innerJoin(wells, eq(wells.id, pumpingTests.wellId))
    .leftJoin(users, eq(users.id, reviews.reviewerId))
    .where(readable.pumpingTests(viewer))
    .orderBy(desc(reviews.id))
    .limit(limit)
