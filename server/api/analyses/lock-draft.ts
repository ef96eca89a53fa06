import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { AppError, notFound } from '../../errors.ts'
import { lockAnalysis } from './analyses.repository.ts'
import { mayChange } from './view.ts'

/** The locked draft, when the viewer may change it. */
export async function lockDraft(executor: Executor, viewer: Viewer, id: number) {
  const row = await lockAnalysis(executor, viewer, id)
  if (!row) throw notFound()
  if (row.state !== 'draft') throw new AppError('analysis/not-draft')
  if (!mayChange(viewer, row)) throw new AppError('analysis/not-yours')
  return row
}
