import type { Analysis, SubmissionInput } from '#shared/contracts/analyses.ts'
import { analysisResult } from '#shared/contracts/analysis-result.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import * as repository from './analyses.repository.ts'
import type { AnalysisRow } from './analyses.repository.ts'
import { checkRepeats } from './calculate.ts'
import { checkAdoptable } from './check-adoptable.ts'
import { everything } from './everything.ts'
import type { createInputsService } from './inputs.service.ts'
import { lockDraft } from './lock-draft.ts'
import { readPackedInputs } from './packed-inputs.repository.ts'
import { mayTakeBack } from './view.ts'

export interface SubmissionsNeeds {
  inputs: Pick<ReturnType<typeof createInputsService>, 'snapshot'>
  view: (executor: Executor, viewer: Viewer, id: number) => Promise<Analysis>
}

/** An analysis on its way to a reviewer, and back. */
export function createSubmissions(deps: Deps, { inputs, view }: SubmissionsNeeds) {
  const { now } = deps
  const { db } = deps.connection

  function checkSubmitted(row: AnalysisRow | null | undefined): AnalysisRow {
    if (!row) throw notFound()
    if (row.state !== 'submitted') throw new AppError('review/not-submitted')
    return row
  }

  async function lockSubmitted(executor: Executor, viewer: Viewer, id: number) {
    return checkSubmitted(await repository.lockAnalysis(executor, viewer, id))
  }

  return {
    /** Freezes an analysis for review; its inputs must be those of the test as it is now. */
    submit: (viewer: Viewer, id: number, { rowVersion, rationale, confirmed }: SubmissionInput) =>
      inTransaction(deps, async (tx) => {
        const row = await lockDraft(tx, viewer, id)
        const snapshot = await inputs.snapshot(tx, everything, row.pumpingTestId)
        if (snapshot.sha256 !== row.inputsSha256) throw new AppError('analysis/inputs-changed')
        if (snapshot.test.found.test.visibility === 'private') throw new AppError('analysis/private-test')
        checkAdoptable(analysisResult.parse(row.result), confirmed)
        const change = { state: 'submitted' as const, rationale, submittedAt: now() }
        if (!(await repository.updateAnalysis(tx, id, rowVersion, change))) throw new AppError('edit/conflict')
        await repository.addEditor(tx, id, viewer)
        const details = { rationale, confirmed }
        const about = { subject: 'analysis', subjectId: id, details }
        await recordAudit(tx, { viewer, at: now(), action: 'analyses/submit', ...about })
        return view(tx, viewer, id)
      }),

    /**
     * Ends a submission that nobody has decided about: the analysis is a draft again. It is immutable only while it
     * waits, or was decided about; what waited stays in the audit trail.
     */
    takeBack: (viewer: Viewer, id: number, rowVersion: number) =>
      inTransaction(deps, async (tx) => {
        const row = await lockSubmitted(tx, viewer, id)
        if (row.method === 'reported') throw new AppError('analysis/reported-stays')
        if (!mayTakeBack(viewer, row)) throw new AppError('analysis/not-yours')
        const change = { state: 'draft' as const, submittedAt: null }
        if (!(await repository.updateAnalysis(tx, id, rowVersion, change))) throw new AppError('edit/conflict')
        const { method, methodVersion, inputsSha256, options, rationale } = row
        const details = { method, methodVersion, inputsSha256, options, rationale, submittedAt: row.submittedAt }
        const about = { subject: 'analysis', subjectId: id, details }
        await recordAudit(tx, { viewer, at: now(), action: 'analyses/take-back', ...about })
        return view(tx, viewer, id)
      }),

    /** The locked analysis that waits for review, when the viewer took no part in it. */
    async lockForReview(executor: Executor, viewer: Viewer, id: number) {
      const row = await lockSubmitted(executor, viewer, id)
      const found = await repository.findAnalysis(executor, viewer, id)
      if (found?.tookPart) throw new AppError('review/own-work')
      return row
    },

    /**
     * Repeats an analysis that is about to be accepted from its own snapshot. It comes before the transaction, which no
     * calculation may hold open: `settle` refuses any other version of the analysis than the one repeated here.
     */
    async repeat(viewer: Viewer, id: number, rowVersion: number) {
      const found = await repository.findAnalysis(db, viewer, id)
      const row = checkSubmitted(found?.row)
      if (found?.tookPart) throw new AppError('review/own-work')
      if (row.rowVersion !== rowVersion) throw new AppError('edit/conflict')
      if (row.inputsChanged) throw new AppError('analysis/inputs-changed')
      await checkRepeats(deps.workers, row, await readPackedInputs(db, id))
    },

    async settle(executor: Executor, id: number, rowVersion: number, state: 'accepted' | 'returned') {
      if (!(await repository.updateAnalysis(executor, id, rowVersion, { state }))) throw new AppError('edit/conflict')
    },
  }
}
