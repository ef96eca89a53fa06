import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { AppError, notFound } from '../../errors.ts'
import { lockAnalysis, type AnalysisRow } from './analyses.repository.ts'
import { mayChange, mayTakeBack } from './view.ts'

/** The draft, when the viewer may change it. @throws AppError saying why not */
export function checkDraft(viewer: Viewer, row: AnalysisRow | null): AnalysisRow {
  if (!row) throw notFound()
  if (row.state !== 'draft') throw new AppError('analysis/not-draft')
  if (!mayChange(viewer, row)) throw new AppError('analysis/not-yours')
  return row
}

/** The locked draft, when the viewer may change it. */
export const lockDraft = async (executor: Executor, viewer: Viewer, id: number): Promise<AnalysisRow> =>
  checkDraft(viewer, await lockAnalysis(executor, viewer, id))

/** The locked analysis, when the viewer may delete it: a draft, or a reported value that waits for review. */
export async function lockRemovable(executor: Executor, viewer: Viewer, id: number): Promise<AnalysisRow> {
  const row = await lockAnalysis(executor, viewer, id)
  if (row?.method !== 'reported') return checkDraft(viewer, row)
  if (row.state !== 'submitted') throw new AppError('analysis/reported-decided')
  if (!mayTakeBack(viewer, row)) throw new AppError('analysis/not-yours')
  return row
}
