import type { z } from 'zod'
import type { AnalysisInput, AnalysisUpdate, anyWorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { kindOfMethod } from '#shared/hydraulics/any-kind.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction, transactionOf, type Transaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { listAdopted } from './adopted.repository.ts'
import * as repository from './analyses.repository.ts'
import { adoptedRows } from './adoption.ts'
import { appliedCorrections } from './applied-corrections.ts'
import { calculate, checkExpected } from './calculate.ts'
import type { Digest } from './digest.ts'
import { createDigests } from './digests.ts'
import { everything } from './everything.ts'
import type { createInputsService } from './inputs.service.ts'
import { checkDraft, lockDraft } from './lock-draft.ts'
import { createRemoval, type RemovalNeeds } from './removal.ts'
import { createReporting } from './reporting.ts'
import { createSubmissions } from './submissions.ts'
import { analysisView, type Surroundings } from './view.ts'
import { wellLossView } from './well-loss-view.ts'
import { isWellSeen, listStepAnalyses } from './well-losses.repository.ts'
import { withoutHiddenWells } from './without-hidden-wells.ts'

export function createAnalysesService(deps: Deps, inputs: ReturnType<typeof createInputsService>, needs: RemovalNeeds) {
  const { db } = deps.connection
  const { now, workers } = deps

  const siblingsOf = async (executor: Executor, testId: number) =>
    (await repository.listAnalyses(executor, everything, testId)).map(({ row }) => row)

  const digest = createDigests(workers)

  /** One after the other: a transaction has one connection. */
  async function digestsOf(executor: Executor, rows: repository.AnalysisRow[]) {
    const made = new Map<number, Digest>()
    for (const row of rows) made.set(row.id, await digest(executor, row))
    return made
  }

  /** Analyses of one test as the viewer sees them. */
  async function views(executor: Executor, viewer: Viewer, testId: number, found: repository.FoundAnalysis[]) {
    const ids = found.map(({ row }) => row.id)
    const seen = await inputs.wellsSeen(executor, viewer, testId)
    const adopted = await listAdopted(executor, ids)
    const settled = new Set(seen === null ? adopted.map(({ analysisId }) => analysisId) : [])
    const around: Surroundings = {
      adopted,
      siblings: await siblingsOf(executor, testId),
      reviews: await repository.listReviews(executor, ids),
      test: await inputs.testOf(executor, everything, testId),
      digests: await digestsOf(
        executor,
        found.map(({ row }) => row).filter(({ id }) => !settled.has(id)),
      ),
    }
    return found.map((one) => {
      const shown = analysisView(viewer, one, around)
      return seen === null ? shown : withoutHiddenWells(shown, around.digests.get(one.row.id)!.wells, seen)
    })
  }

  async function view(executor: Executor, viewer: Viewer, id: number) {
    const found = await repository.findAnalysis(executor, viewer, id)
    if (!found) throw notFound()
    const [shown] = await views(executor, viewer, found.row.pumpingTestId, [found])
    return shown!
  }

  /**
   * Calculates what is to be saved. It comes before the transaction, which no calculation may hold open; in it
   * `checkUnchanged` asks whether the inputs are still those.
   */
  async function compute(testId: number, input: AnalysisInput) {
    const snapshot = await inputs.snapshot(db, everything, testId)
    if (snapshot.sha256 !== input.inputsSha256) throw new AppError('analysis/inputs-changed')
    if (kindOfMethod(input.method) !== snapshot.kind) throw new AppError('analysis/wrong-kind')
    const kept = { ...snapshot.inputs, setting: snapshot.setting }
    const { result, packedInputs } = await calculate(workers, kept, input)
    checkExpected(result, input.expected)
    const { method, options, label } = input
    const { methodVersion } = result
    const inputsSha256 = snapshot.sha256
    return { method, methodVersion, options, label, result, packedInputs, inputsSha256, inputsChanged: false }
  }

  async function checkUnchanged(tx: Executor, testId: number, { inputsSha256 }: Pick<AnalysisInput, 'inputsSha256'>) {
    const { sha256 } = await inputs.snapshot(tx, everything, testId)
    if (sha256 !== inputsSha256) throw new AppError('analysis/inputs-changed')
  }

  async function computeNew(viewer: Viewer, testId: number, input: AnalysisInput) {
    if (!(await inputs.maySee(db, viewer, testId))) throw notFound()
    return compute(testId, input)
  }

  async function computeAgain(viewer: Viewer, id: number, input: AnalysisInput) {
    const found = await repository.findAnalysis(db, viewer, id)
    const { pumpingTestId } = checkDraft(viewer, found?.row ?? null)
    return compute(pumpingTestId, input)
  }

  const { submit, takeBack, repeat, lockForReview, settle } = createSubmissions(deps, { inputs, view })

  return {
    ...createRemoval(deps, needs),
    ...createReporting(deps, { inputs, view }),
    submit,
    takeBack,
    repeat,
    lockForReview,
    settle,
    isInUse: repository.isInUse,

    async workbench(viewer: Viewer, testId: number) {
      const { kind, inputs: built, sha256, readings, problems, test } = await inputs.snapshot(db, viewer, testId)
      const shown = { inputs: built, sha256, readings, problems }
      const answer =
        kind === 'constant-rate' ? { ...shown, surroundings: await inputs.surroundings(db, test) } : { kind, ...shown }
      // The kind and its inputs go together, which taking them apart hides.
      return answer as z.input<typeof anyWorkbenchInputs>
    },

    async list(viewer: Viewer, testId: number) {
      const rows = await repository.listAnalyses(db, viewer, testId)
      return { items: rows.length === 0 ? [] : await views(db, viewer, testId, rows) }
    },

    get: (viewer: Viewer, id: number, executor: Executor = db) => view(executor, viewer, id),

    async create(viewer: Viewer, testId: number, input: AnalysisInput, transaction: Transaction = transactionOf(deps)) {
      const computing = computeNew(viewer, testId, input)
      // Its refusal is told inside the transaction: a repeated request gets its first answer, whatever changed since.
      await Promise.allSettled([computing])
      return transaction(async (tx) => {
        if (!(await inputs.hold(tx, viewer, testId))) throw notFound()
        const computed = await computing
        await checkUnchanged(tx, testId, input)
        const row = {
          ...computed,
          pumpingTestId: testId,
          state: 'draft' as const,
          createdBy: viewer.id,
          createdAt: now(),
        }
        const id = await repository.insertAnalysis(tx, row)
        await repository.addEditor(tx, id, viewer)
        await recordAudit(tx, {
          viewer,
          at: now(),
          action: 'analyses/create',
          subject: 'analysis',
          subjectId: id,
          details: { testId },
        })
        return view(tx, viewer, id)
      })
    },

    async update(viewer: Viewer, id: number, { rowVersion, ...input }: AnalysisUpdate) {
      const computed = await computeAgain(viewer, id, input)
      return inTransaction(deps, async (tx) => {
        const row = await lockDraft(tx, viewer, id)
        await checkUnchanged(tx, row.pumpingTestId, input)
        if (!(await repository.replaceCalculation(tx, id, rowVersion, computed))) throw new AppError('edit/conflict')
        await repository.addEditor(tx, id, viewer)
        await recordAudit(tx, { viewer, at: now(), action: 'analyses/edit', subject: 'analysis', subjectId: id })
        return view(tx, viewer, id)
      })
    },

    /** The values stood for by an analysis that was repeated from its own snapshot and accepted. */
    async valuesOf(executor: Executor, id: number) {
      const found = await repository.findAnalysis(executor, everything, id)
      if (!found) throw notFound()
      if (found.row.inputsChanged) throw new AppError('analysis/inputs-changed')
      const test = await inputs.testOf(executor, everything, found.row.pumpingTestId)
      if (test.found.test.visibility === 'private') throw new AppError('analysis/private-test')
      return {
        pumpingTestId: found.row.pumpingTestId,
        values: adoptedRows(
          found.row,
          await digest(executor, found.row),
          await siblingsOf(executor, found.row.pumpingTestId),
          test,
        ),
      }
    },

    /** Compares every analysis of a test with the test as it is now, and marks those that were made from other inputs. */
    async markInputsChanged(executor: Executor, testId: number) {
      const fitted = await repository.listHashes(executor, testId)
      if (fitted.length === 0) return
      const { sha256 } = await inputs.snapshot(executor, everything, testId)
      for (const row of fitted) {
        const inputsChanged = row.inputsSha256 !== sha256
        if (inputsChanged !== row.inputsChanged) await repository.setInputsChanged(executor, row.id, inputsChanged)
      }
    },

    testsOfWell: repository.analysedTestsOf,

    /** Logs of a test that give no drawdown, and what the others were corrected by. */
    async appliedTo(executor: Executor, testId: number) {
      const { problems, inputs: built } = await inputs.snapshot(executor, everything, testId)
      return { problems, applied: appliedCorrections(built) }
    },

    /** Losses of a well by its accepted step-drawdown tests that the viewer may see, newest test first. */
    async wellLosses(viewer: Viewer, wellId: number) {
      if (!(await isWellSeen(db, viewer, wellId))) throw notFound()
      return { items: (await listStepAnalyses(db, viewer, wellId)).map(wellLossView) }
    },

    /** The last of its values left the regional table: nothing rests on it any more. */
    withdraw: (executor: Executor, id: number) => repository.setWithdrawn(executor, id),
  }
}

export type AnalysesService = ReturnType<typeof createAnalysesService>
