import type {
  PumpingTest,
  PumpingTestInput,
  PumpingTestQuery,
  PumpingTestUpdate,
} from '#shared/contracts/pumping-tests.ts'
import { kindOf } from '#shared/contracts/test-details.ts'
import { toSI } from '#shared/quantities/units.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction, transactionOf, type Transaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, fieldError, notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { pageOf } from '../page-of.ts'
import { testShowsHidden, type Exposure } from '../visibility/exposure.ts'
import { checkPublishing } from '../visibility/publishing.ts'
import type { createWellsService } from '../wells/wells.service.ts'
import { countPumpingTests, listPumpingTests, unitNames } from './list.repository.ts'
import { checkLogs } from './check-logs.ts'
import * as repository from './pumping-tests.repository.ts'
import { startTime } from './start-time.ts'
import { testedInterval } from './tested-interval.ts'
import { pumpedWellRow, testWellRows, type WellForTest } from './test-wells.ts'
import { mayEdit, pumpingTestView, summaryView } from './view.ts'

export interface PumpingTestsNeeds {
  wells: Pick<ReturnType<typeof createWellsService>, 'screensOf'>
  /** Compares every analysis of a test with the test as it is now. */
  markInputsChanged: (executor: Executor, testId: number) => Promise<void>
  /** Says that estimates which use the test's values must be made anew. */
  valuesChanged: (executor: Executor, testId: number) => Promise<void>
}

export type ReportedTest = Pick<
  PumpingTestInput,
  | 'wellId'
  | 'startLocal'
  | 'zone'
  | 'aquifer'
  | 'units'
  | 'intervalBasis'
  | 'intervalTopM'
  | 'intervalBottomM'
  | 'thicknessM'
  | 'thicknessBasis'
  | 'visibility'
> & { source: string }

export function createPumpingTestsService(deps: Deps, { wells, markInputsChanged, valuesChanged }: PumpingTestsNeeds) {
  const { db } = deps.connection
  const { now } = deps
  /** Every check of an input against the database, and the rows to write. */
  async function resolve(executor: Executor, viewer: Viewer, input: PumpingTestInput, embargoUntil: Date | null) {
    const ids = [input.wellId, ...input.observationWells.map(({ wellId }) => wellId)]
    const found = await repository.findWellsForTest(executor, viewer, ids)
    const known = new Map<number, WellForTest>(found.map((well) => [well.id, well]))
    const wellRows = testWellRows(input, known)
    const start = startTime(input.startLocal, input.zone, now())
    const screens = await wells.screensOf(executor, [input.wellId])
    const interval = testedInterval(input, known.get(input.wellId)!, screens, start.at)
    const unitIds = new Set(input.units.map(({ unitId }) => unitId))
    if ((await repository.countUnits(executor, [...unitIds])) !== input.units.length)
      throw fieldError('units', 'pumping-test/unknown-unit')
    checkVisibility({ visibility: input.visibility, embargoUntil }, input.wellId, found)
    return { wellRows, row: { ...columns(input), ...interval, startAt: start.at, startPrecision: start.precision } }
  }

  async function find(executor: Executor, viewer: Viewer, id: number) {
    const found = await repository.findPumpingTest(executor, viewer, id)
    if (!found) throw notFound()
    return found
  }

  /** A test with everything that belongs to it, as far as the viewer may see it. */
  async function whole(executor: Executor, viewer: Viewer, id: number) {
    const found = await find(executor, viewer, id)
    // One after the other: inside a transaction there is one connection.
    const testWells = await repository.listTestWells(executor, viewer, id)
    const units = await repository.listTestUnits(executor, id)
    const steps = await repository.listRateSteps(executor, id)
    const series = await repository.listSeries(executor, id)
    return { found, parts: { wells: testWells, units, steps, series } }
  }

  async function get(viewer: Viewer, id: number, executor: Executor = db): Promise<PumpingTest> {
    const { found, parts } = await whole(executor, viewer, id)
    return pumpingTestView(viewer, found, parts)
  }

  /** The locked row of a test that the viewer may change. */
  async function lockForEdit(executor: Executor, viewer: Viewer, id: number) {
    const row = await repository.lockPumpingTest(executor, viewer, id)
    if (!row) throw notFound()
    if (!mayEdit(viewer, row)) throw new AppError('pumping-test/not-editable')
    return row
  }

  async function list(viewer: Viewer, query: PumpingTestQuery) {
    const [rows, total] = await Promise.all([listPumpingTests(db, viewer, query), countPumpingTests(db, viewer, query)])
    const names = await unitNames(
      db,
      rows.map(({ test }) => test.id),
    )
    return pageOf(
      rows.map((row) => summaryView(row, names)),
      total,
      query,
    )
  }

  return {
    get,
    whole,

    /** A test with its units alone. */
    async withUnits(executor: Executor, viewer: Viewer, id: number) {
      const found = await find(executor, viewer, id)
      return { found, parts: { units: await repository.listTestUnits(executor, id) } }
    },

    async maySee(executor: Executor, viewer: Viewer, id: number): Promise<boolean> {
      return (await repository.findPumpingTest(executor, viewer, id)) !== null
    },

    /** Keeps a test that the viewer may see from being changed until the transaction ends; false where there is none. */
    async hold(executor: Executor, viewer: Viewer, id: number): Promise<boolean> {
      return (await repository.lockPumpingTest(executor, viewer, id)) !== null
    },

    lockForEdit,

    ofWell: async (viewer: Viewer, wellId: number) =>
      (await list(viewer, { wellId, sort: '-start', limit: 200, offset: 0 })).items,

    list,

    create: (viewer: Viewer, input: PumpingTestInput, transaction: Transaction = transactionOf(deps)) =>
      transaction(async (tx) => {
        checkPublishing(viewer, input)
        const { row, wellRows } = await resolve(tx, viewer, input, null)
        const at = now()
        const id = await repository.insertPumpingTest(tx, {
          ...row,
          kind: kindOf(input),
          createdBy: viewer.id,
          createdAt: at,
        })
        await repository.insertTestWells(tx, id, wellRows)
        await repository.insertUnits(tx, id, input.units)
        await repository.insertSteps(tx, id, input.rateSteps.map(stepRow))
        await recordAudit(tx, { viewer, at, action: 'pumping-tests/create', subject: 'pumping-test', subjectId: id })
        return { id }
      }),

    /** Enters a test of which only values came down to us. */
    createReported: (viewer: Viewer, { wellId, startLocal, units, ...facts }: ReportedTest) =>
      inTransaction(deps, async (tx) => {
        checkPublishing(viewer, facts)
        const [well] = await repository.findWellsForTest(tx, viewer, [wellId])
        if (!well) throw fieldError('wellId', 'pumping-test/unknown-well')
        checkVisibility({ visibility: facts.visibility, embargoUntil: null }, wellId, [well])
        const start = startTime(startLocal, facts.zone, now())
        const at = now()
        const row = {
          ...facts,
          wellId,
          startAt: start.at,
          startPrecision: start.precision,
          createdBy: viewer.id,
          createdAt: at,
        }
        const id = await repository.insertPumpingTest(tx, {
          ...row,
          kind: 'reported',
          thicknessError: 0.1,
          rateError: 0.05,
        })
        await repository.insertTestWells(tx, id, [pumpedWellRow(wellId, null)])
        await repository.insertUnits(tx, id, units)
        await recordAudit(tx, { viewer, at, action: 'pumping-tests/report', subject: 'pumping-test', subjectId: id })
        return { id }
      }),

    /** A test that was entered for its values alone is nothing without them; what it was stays in the audit trail. */
    async removeReported(executor: Executor, viewer: Viewer, id: number): Promise<void> {
      const row = await repository.lockPumpingTest(executor, viewer, id)
      if (row?.kind !== 'reported' || (await repository.listSeries(executor, id)).length > 0) return
      await repository.deleteBareTest(executor, id)
      const { wellId, startAt, startPrecision, source } = row
      const details = { wellId, startAt, startPrecision, source }
      const about = { subject: 'pumping-test', subjectId: id, details }
      await recordAudit(executor, { viewer, at: now(), action: 'pumping-tests/delete', ...about })
    },

    /** Who may see the test stays as it is: showing and hiding is the stewards' business. */
    update: (viewer: Viewer, id: number, { rowVersion, ...changed }: PumpingTestUpdate) =>
      inTransaction(deps, async (tx) => {
        const before = await lockForEdit(tx, viewer, id)
        if (kindOf(changed) !== before.kind) throw fieldError('kind', 'pumping-test/kind-stays')
        const input = { ...changed, visibility: before.visibility }
        const { row, wellRows } = await resolve(tx, viewer, input, before.embargoUntil)
        if (!(await repository.updatePumpingTest(tx, id, rowVersion, row))) throw new AppError('edit/conflict')
        const logged = await repository.listLoggedWells(tx, id)
        checkLogs({ logged, clockSeries: await repository.countClockSeries(tx, id) }, before, row, wellRows)
        await repository.changeTestWells(tx, id, wellRows)
        await repository.deleteUnitsAndSteps(tx, id)
        await repository.insertUnits(tx, id, input.units)
        await repository.insertSteps(tx, id, input.rateSteps.map(stepRow))
        await markInputsChanged(tx, id)
        await valuesChanged(tx, id)
        await recordAudit(tx, {
          viewer,
          at: now(),
          action: 'pumping-tests/edit',
          subject: 'pumping-test',
          subjectId: id,
        })
        return get(viewer, id, tx)
      }),
  }
}

function columns(input: PumpingTestInput) {
  const {
    wellId,
    zone,
    aquifer,
    intervalBasis,
    thicknessM,
    thicknessBasis,
    thicknessError,
    rateError,
    checklist = null,
    conditions,
    visibility,
    details = null,
  } = input
  return {
    wellId,
    zone,
    aquifer,
    intervalBasis,
    thicknessM,
    thicknessBasis,
    thicknessError,
    rateError,
    checklist,
    conditions,
    visibility,
    details,
  }
}

function stepRow({ startS, rate }: PumpingTestInput['rateSteps'][number]): repository.NewRateStep {
  return { startS, rateM3S: toSI(rate.value, rate.unit), enteredValue: rate.value, enteredUnit: rate.unit }
}

/** The rule of the visibility service, also for a test that is entered or gets other wells. */
function checkVisibility(test: Exposure, wellId: number, wells: (Exposure & { id: number })[]) {
  const well = wells.find(({ id }) => id === wellId)!
  const hasPrivateWells = wells.some(({ visibility }) => visibility === 'private')
  if (testShowsHidden(test, well, hasPrivateWells))
    throw fieldError('visibility', 'pumping-test/more-visible-than-well')
}
