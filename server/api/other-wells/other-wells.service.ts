import type { z } from 'zod'
import type { otherWellInput, otherWellUpdate } from '#shared/contracts/other-wells.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { geodesicDistance } from '#shared/geodesy/index.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction, transactionOf, type Transaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, fieldError, notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import type { createPumpingTestsService } from '../pumping-tests/pumping-tests.service.ts'
import type { TestWellRow } from '../pumping-tests/view.ts'
import * as repository from './other-wells.repository.ts'
import { inputOf, pumpedOf, siteOf, viewOf } from './view.ts'

export interface OtherWellsNeeds {
  pumpingTests: Pick<ReturnType<typeof createPumpingTestsService>, 'lockForEdit' | 'whole'>
  markInputsChanged: (executor: Executor, testId: number) => Promise<void>
}

type Wanted = z.output<typeof otherWellInput>

/** More than any test has about it; each costs every fit as much time as a well of the test. */
const MOST_LISTED = 60

/** Closer than this two wells are one and the same. */
const SAME_PLACE_M = 0.5

export function createOtherWellsService(deps: Deps, { pumpingTests, markInputsChanged }: OtherWellsNeeds) {
  const { db } = deps.connection
  const { now } = deps

  /** The row to write. @throws AppError for a well that is not there, is in the test, or is listed already */
  async function resolve(tx: Executor, viewer: Viewer, testId: number, wanted: Wanted, own: number | null) {
    const { found, parts } = await pumpingTests.whole(tx, viewer, testId)
    if (found.test.kind !== 'constant-rate') throw new AppError('correction/wrong-kind')
    const wellId = wanted.place.kind === 'well' ? wanted.place.wellId : null
    const well = wellId === null ? null : await repository.findWellForTest(tx, viewer, wellId)
    if (wellId !== null && !well) throw fieldError('place.wellId', 'pumping-test/unknown-well')
    // As for observation wells: nobody analyses what rests on a well that they may not see.
    if (well?.visibility === 'private' && found.test.visibility !== 'private')
      throw fieldError('place.wellId', 'correction/other-well-private')
    const label = wanted.label ?? well!.code
    const listed = await repository.listOtherWells(tx, viewer, testId)
    if (listed.some(({ row }) => row.id !== own && row.label === label))
      throw fieldError('label', 'correction/other-well-twice', { label })
    if (own === null && listed.length >= MOST_LISTED)
      throw new AppError('correction/other-wells-many', { most: MOST_LISTED })
    const { place, rateSteps, fitted, active } = wanted
    const row = { wellId, label, place, rateSteps, fitted, active }
    checkApart(row, well?.position ?? null, parts.wells)
    return row
  }

  const about = (testId: number) => ({ subject: 'pumping-test', subjectId: testId })

  async function view(executor: Executor, viewer: Viewer, testId: number, id: number) {
    const { parts } = await pumpingTests.whole(executor, viewer, testId)
    const listed = await repository.listOtherWells(executor, viewer, testId)
    const [shown] = listed.filter(({ row }) => row.id === id).flatMap((found) => viewOf(found, parts.wells))
    if (!shown) throw notFound()
    return shown
  }

  /** The other well, when the viewer may see it and its test. */
  async function findVisible(viewer: Viewer, id: number) {
    const row = await repository.findOtherWell(db, id)
    if (!row) throw notFound()
    await view(db, viewer, row.pumpingTestId, id)
    return row
  }

  return {
    /** Those that the viewer may see. */
    async list(executor: Executor, viewer: Viewer, testId: number) {
      const { parts } = await pumpingTests.whole(executor, viewer, testId)
      const listed = await repository.listOtherWells(executor, viewer, testId)
      return listed.flatMap((found) => viewOf(found, parts.wells))
    },

    create: (viewer: Viewer, testId: number, wanted: Wanted, transaction: Transaction = transactionOf(deps)) =>
      transaction(async (tx) => {
        await pumpingTests.lockForEdit(tx, viewer, testId)
        const row = await resolve(tx, viewer, testId, wanted, null)
        const at = now()
        const set = { createdBy: viewer.id, createdAt: at, changedBy: viewer.id, changedAt: at }
        const id = await repository.insertOtherWell(tx, { ...row, ...set, pumpingTestId: testId })
        await markInputsChanged(tx, testId)
        const details = { otherWellId: id, ...row }
        await recordAudit(tx, { viewer, at, action: 'other-wells/create', ...about(testId), details })
        return view(tx, viewer, testId, id)
      }),

    async update(viewer: Viewer, id: number, { rowVersion, ...wanted }: z.output<typeof otherWellUpdate>) {
      const { pumpingTestId: testId } = await findVisible(viewer, id)
      return inTransaction(deps, async (tx) => {
        await pumpingTests.lockForEdit(tx, viewer, testId)
        const row = await resolve(tx, viewer, testId, wanted, id)
        const at = now()
        const change = { ...row, changedBy: viewer.id, changedAt: at }
        if (!(await repository.updateOtherWell(tx, id, rowVersion, change))) throw new AppError('edit/conflict')
        await markInputsChanged(tx, testId)
        const details = { otherWellId: id, ...row }
        await recordAudit(tx, { viewer, at, action: 'other-wells/edit', ...about(testId), details })
        return view(tx, viewer, testId, id)
      })
    },

    async remove(viewer: Viewer, id: number, rowVersion: number) {
      const { pumpingTestId: testId, label, place, rateSteps } = await findVisible(viewer, id)
      return inTransaction(deps, async (tx) => {
        await pumpingTests.lockForEdit(tx, viewer, testId)
        const at = now()
        const change = { active: false, deletedAt: at, changedBy: viewer.id, changedAt: at }
        if (!(await repository.updateOtherWell(tx, id, rowVersion, change))) throw new AppError('edit/conflict')
        await markInputsChanged(tx, testId)
        const details = { otherWellId: id, label, place, rateSteps }
        await recordAudit(tx, { viewer, at, action: 'other-wells/delete', ...about(testId), details })
        return {}
      })
    },

    /** Those switched on that the viewer may see, as analyses superpose them. */
    async partsOf(executor: Executor, viewer: Viewer, testId: number, wells: TestWellRow[]) {
      const listed = await repository.listOtherWells(executor, viewer, testId)
      return listed.length === 0 ? [] : listed.flatMap((found) => inputOf(found, wells))
    },

    testsListing: repository.testsListing,
  }
}

/** @throws AppError where the other well stands on one of the test */
function checkApart(
  row: { label: string; place: unknown },
  position: [number, number] | null,
  wells: TestWellRow[],
): void {
  const site = siteOf({ row: row as never, position }, pumpedOf(wells))
  const near = wells.some(({ position: [lon, lat] }) => site && geodesicDistance({ lon, lat }, site.at) < SAME_PLACE_M)
  if (near) throw fieldError('place', 'correction/other-well-in-test', { label: row.label })
}

export type OtherWellsService = ReturnType<typeof createOtherWellsService>
