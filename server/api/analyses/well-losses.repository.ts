import { and, desc, eq, inArray } from 'drizzle-orm'
import type { WellLoss } from '#shared/contracts/analyses.ts'
import { analysisResult } from '#shared/contracts/analysis-result.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { methodIdsOf } from '#shared/hydraulics/kinds.ts'
import { lossOf } from '#shared/hydraulics/step/step-method.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { analyses, pumpingTests } from '../../db/schema/index.ts'
import { localStart } from '../pumping-tests/start-time.ts'

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

export function wellLossView(row: Awaited<ReturnType<typeof listStepAnalyses>>[number]): WellLoss {
  const { others = [], extras } = analysisResult.parse(row.result)
  const { low: low_m3_s, high: high_m3_s } = lossOf(extras).rates
  return {
    analysisId: row.id,
    pumpingTestId: row.pumpingTestId,
    method: row.method,
    startLocal: localStart(row.startAt, row.zone, row.startPrecision),
    startPrecision: row.startPrecision,
    losses: others,
    rates: { low_m3_s, high_m3_s },
    inputsChanged: row.inputsChanged,
  }
}
