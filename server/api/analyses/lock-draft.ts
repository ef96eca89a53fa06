import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { AppError, notFound } from '../../errors.ts'
import { lockAnalysis, type AnalysisRow } from './analyses.repository.ts'
import { mayChange } from './view.ts'

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
