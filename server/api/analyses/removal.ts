import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import * as repository from './analyses.repository.ts'
import { everything } from './everything.ts'
import { lockRemovable } from './lock-draft.ts'

export interface RemovalNeeds {
  /** Takes a test of which only values were reported out of the books. */
  removeReportedTest: (executor: Executor, viewer: Viewer, testId: number) => Promise<void>
}

type Row = repository.AnalysisRow

/** What was waiting stays in the audit trail, as when a submission is taken back. */
const wasWaiting = ({ method, result, rationale, submittedAt, pumpingTestId }: Row) => ({
  method,
  result,
  rationale,
  submittedAt,
  testId: pumpingTestId,
})

export function createRemoval(deps: Deps, { removeReportedTest }: RemovalNeeds) {
  const recorded = (executor: Executor, viewer: Viewer, row: Row) => {
    const about = { viewer, at: deps.now(), subject: 'analysis', subjectId: row.id }
    return row.state === 'draft'
      ? recordAudit(executor, { ...about, action: 'analyses/delete' })
      : recordAudit(executor, { ...about, action: 'analyses/take-back', details: wasWaiting(row) })
  }

  return {
    /**
     * Deletes a draft; or a reported value that nobody has decided about, which has no draft to go back to. A test that
     * was entered for its values alone goes with the last of them.
     */
    remove: (viewer: Viewer, id: number) =>
      inTransaction(deps, async (tx) => {
        const row = await lockRemovable(tx, viewer, id)
        await repository.deleteAnalysis(tx, id)
        await recorded(tx, viewer, row)
        const left = await repository.listAnalyses(tx, everything, row.pumpingTestId)
        if (row.method === 'reported' && left.length === 0) await removeReportedTest(tx, viewer, row.pumpingTestId)
        return {}
      }),
  }
}
