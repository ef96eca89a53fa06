import { and, desc, eq, inArray } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { methodIdsOf } from '#shared/hydraulics/kinds.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { analyses, pumpingTests, wells } from '../../db/schema/index.ts'

/** Accepted analyses of the step-drawdown tests of a well that the viewer may see, newest test first. */
export const listStepAnalyses = (executor: Executor, viewer: Viewer, wellId: number) =>
  executor
    .select({
      id: analyses.id,
      pumpingTestId: analyses.pumpingTestId,
      method: analyses.method,
      result: analyses.result,
      inputsChanged: analyses.inputsChanged,
      startAt: pumpingTests.startAt,
      zone: pumpingTests.zone,
      startPrecision: pumpingTests.startPrecision,
    })
    .from(analyses)
    .innerJoin(pumpingTests, eq(pumpingTests.id, analyses.pumpingTestId))
    .where(
      and(
        eq(pumpingTests.wellId, wellId),
        eq(analyses.state, 'accepted'),
        inArray(analyses.method, methodIdsOf('step')),
        readable.pumpingTests(viewer),
        readable.analyses(viewer),
      ),
    )
    .orderBy(desc(pumpingTests.startAt), desc(analyses.id))

export type StepAnalysisRow = Awaited<ReturnType<typeof listStepAnalyses>>[number]

/** Whether the viewer may see the well at all. */
export const isWellSeen = async (executor: Executor, viewer: Viewer, wellId: number): Promise<boolean> =>
  (await executor.$count(wells, and(eq(wells.id, wellId), readable.wells(viewer)))) > 0
