import {
  correctionSettings,
  type CorrectionInput,
  type CorrectionRecord,
  type CorrectionSettings,
  type CorrectionUpdate,
  type TestCorrections,
} from '#shared/contracts/corrections.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { correctionKinds } from '#shared/hydraulics/corrections/kinds.ts'
import { correctionName } from '#shared/words/corrections.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction, transactionOf, type Transaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, fieldError, notFound } from '../../errors.ts'
import type { SeriesProblem } from '../analyses/build-inputs.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import type { OtherWellsService } from '../other-wells/other-wells.service.ts'
import { createOutsideValues, listOutsideSeries } from '../outside-series/outside-series.service.ts'
import type { createPumpingTestsService } from '../pumping-tests/pumping-tests.service.ts'
import { mayEdit, type TestWellRow } from '../pumping-tests/view.ts'
import { checkProblems, isCorrectable } from './check-applied.ts'
import * as repository from './corrections.repository.ts'
import type { CorrectionRow, FoundCorrection } from './corrections.repository.ts'

export interface CorrectionsNeeds {
  pumpingTests: Pick<ReturnType<typeof createPumpingTestsService>, 'lockForEdit' | 'whole'>
  otherWells: Pick<OtherWellsService, 'list'>
  markInputsChanged: (executor: Executor, testId: number) => Promise<void>
  /** Logs of the test that give no corrected drawdown, and what the others are corrected by. */
  appliedTo: (executor: Executor, testId: number) => Promise<{ problems: SeriesProblem[]; applied: unknown }>
}

type Wanted = Required<Pick<CorrectionInput, 'settings' | 'wellIds' | 'active'>>

const settingsOf = ({ settings }: CorrectionRow): CorrectionSettings => correctionSettings.parse(settings)

const viewOf = ({ row, by }: FoundCorrection): CorrectionRecord => ({
  id: row.id,
  settings: settingsOf(row),
  wellIds: row.wellIds,
  active: row.active,
  by: by ?? '',
  changedAt: row.changedAt.toISOString(),
  rowVersion: row.rowVersion,
})

const columns = ({ settings, wellIds, active }: Wanted) => ({
  kind: settings.kind,
  settings,
  outsideSeriesId: 'seriesId' in settings ? settings.seriesId : null,
  wellIds,
  active,
})

/** A reader is told nothing of corrections of wells that are hidden from them. */
const ofWellsSeen = (listed: CorrectionRecord[], wells: TestWellRow[]): CorrectionRecord[] =>
  listed
    .map((one) => ({
      ...one,
      wellIds: one.wellIds?.filter((id) => wells.some(({ row }) => row.wellId === id)) ?? null,
    }))
    .filter(({ wellIds }) => wellIds?.length !== 0)

const covers = (wellIds: number[] | null, wellId: number) => wellIds === null || wellIds.includes(wellId)

export function createCorrectionsService(deps: Deps, needs: CorrectionsNeeds) {
  const { pumpingTests, otherWells, markInputsChanged, appliedTo } = needs
  const { db } = deps.connection
  const { now } = deps
  const outsideOf = createOutsideValues()

  /** Everything of a correction that can be checked without applying it. */
  async function check(tx: Executor, viewer: Viewer, testId: number, wanted: Wanted, own: number | null) {
    const { found, parts } = await pumpingTests.whole(tx, viewer, testId)
    if (!isCorrectable(found.test.kind)) throw new AppError('correction/wrong-kind')
    if (wanted.wellIds?.some((id) => !parts.wells.some(({ row }) => row.wellId === id)))
      throw fieldError('wellIds', 'correction/unknown-well')
    const { settings } = wanted
    if ('seriesId' in settings) {
      const series = (await listOutsideSeries(tx, testId)).find(({ id }) => id === settings.seriesId)
      if (series?.quantity !== correctionKinds[settings.kind].outside)
        throw fieldError('settings.seriesId', 'correction/unknown-series')
    }
    if (wanted.active) await checkOnce(tx, testId, wanted, own, parts.wells)
  }

  /** A well is corrected once for each cause. */
  async function checkOnce(tx: Executor, testId: number, wanted: Wanted, own: number | null, wells: TestWellRow[]) {
    const others = (await repository.listCorrections(tx, testId)).filter(
      ({ row }) => row.active && row.id !== own && row.kind === wanted.settings.kind,
    )
    const twice = wells.find(
      ({ row: { wellId } }) => covers(wanted.wellIds, wellId) && others.some(({ row }) => covers(row.wellIds, wellId)),
    )
    if (twice)
      throw new AppError('correction/twice', { well: twice.code, correction: correctionName(wanted.settings.kind) })
  }

  /** Applies what was written; a well that it cannot be applied to undoes it. */
  async function apply(tx: Executor, viewer: Viewer, testId: number, wanted: Wanted) {
    const { problems, applied } = await appliedTo(tx, testId)
    if (wanted.active) {
      const { parts } = await pumpingTests.whole(tx, viewer, testId)
      checkProblems(
        problems.filter(({ wellId }) => covers(wanted.wellIds, Number(wellId))),
        parts.wells,
      )
    }
    await markInputsChanged(tx, testId)
    return applied
  }

  async function view(executor: Executor, id: number): Promise<CorrectionRecord> {
    return viewOf((await repository.findCorrection(executor, id))!)
  }

  /** The correction, when the viewer may see its test. */
  async function findVisible(viewer: Viewer, id: number): Promise<CorrectionRow> {
    const found = await repository.findCorrection(db, id)
    if (!found) throw notFound()
    await pumpingTests.whole(db, viewer, found.row.pumpingTestId)
    return found.row
  }

  const about = (testId: number) => ({ subject: 'pumping-test', subjectId: testId })

  return {
    async list(viewer: Viewer, testId: number): Promise<TestCorrections> {
      const { found, parts } = await pumpingTests.whole(db, viewer, testId)
      const listed = (await repository.listCorrections(db, testId)).map(viewOf)
      const may = mayEdit(viewer, found.test)
      return {
        corrections: may ? listed : ofWellsSeen(listed, parts.wells),
        series: await listOutsideSeries(db, testId),
        otherWells: await otherWells.list(db, viewer, testId),
        mayEdit: may,
      }
    },

    create: (viewer: Viewer, testId: number, wanted: Wanted, transaction: Transaction = transactionOf(deps)) =>
      transaction(async (tx) => {
        await pumpingTests.lockForEdit(tx, viewer, testId)
        await check(tx, viewer, testId, wanted, null)
        const at = now()
        const set = { changedBy: viewer.id, changedAt: at }
        const row = { ...columns(wanted), ...set, pumpingTestId: testId, createdBy: viewer.id, createdAt: at }
        const id = await repository.insertCorrection(tx, row)
        const applied = await apply(tx, viewer, testId, wanted)
        const details = { correctionId: id, ...wanted, applied }
        await recordAudit(tx, { viewer, at, action: 'corrections/create', ...about(testId), details })
        return view(tx, id)
      }),

    /** Other figures or wells, or on and off. */
    async update(viewer: Viewer, id: number, { rowVersion, ...wanted }: Wanted & Pick<CorrectionUpdate, 'rowVersion'>) {
      const { pumpingTestId: testId } = await findVisible(viewer, id)
      return inTransaction(deps, async (tx) => {
        await pumpingTests.lockForEdit(tx, viewer, testId)
        await check(tx, viewer, testId, wanted, id)
        const at = now()
        const change = { ...columns(wanted), changedBy: viewer.id, changedAt: at }
        if (!(await repository.updateCorrection(tx, id, rowVersion, change))) throw new AppError('edit/conflict')
        const applied = await apply(tx, viewer, testId, wanted)
        const details = { correctionId: id, ...wanted, applied }
        await recordAudit(tx, { viewer, at, action: 'corrections/edit', ...about(testId), details })
        return view(tx, id)
      })
    },

    async remove(viewer: Viewer, id: number, rowVersion: number) {
      const { pumpingTestId: testId, settings, wellIds } = await findVisible(viewer, id)
      return inTransaction(deps, async (tx) => {
        await pumpingTests.lockForEdit(tx, viewer, testId)
        const at = now()
        const change = { active: false, deletedAt: at, changedBy: viewer.id, changedAt: at }
        if (!(await repository.updateCorrection(tx, id, rowVersion, change))) throw new AppError('edit/conflict')
        await markInputsChanged(tx, testId)
        const details = { correctionId: id, settings, wellIds }
        await recordAudit(tx, { viewer, at, action: 'corrections/delete', ...about(testId), details })
        return {}
      })
    },

    async isFollowed(executor: Executor, seriesId: number): Promise<boolean> {
      return (await repository.countFollowing(executor, seriesId)) > 0
    },

    /** Lets every correction that follows one series follow another one, and tells what each does then. */
    async follow(tx: Executor, viewer: Viewer, testId: number, { from, to }: { from: number; to: number }) {
      const followed: { correctionId: number; applied: unknown }[] = []
      for (const row of await repository.listFollowing(tx, from)) {
        const settings = correctionSettings.parse({ ...settingsOf(row), seriesId: to })
        const change = { settings, outsideSeriesId: to, changedBy: viewer.id, changedAt: now() }
        if (!(await repository.updateCorrection(tx, row.id, row.rowVersion, change)))
          throw new AppError('edit/conflict')
        const applied = await apply(tx, viewer, testId, { settings, wellIds: row.wellIds, active: row.active })
        followed.push({ correctionId: row.id, applied })
      }
      return followed
    },

    /** What is switched on, with the series that it follows. */
    async partsOf(executor: Executor, testId: number) {
      const active = (await repository.listCorrections(executor, testId)).filter(({ row }) => row.active)
      const followed = active.flatMap(({ row }) => (row.outsideSeriesId === null ? [] : [row.outsideSeriesId]))
      return {
        corrections: active.map(({ row }) => ({ settings: settingsOf(row), wellIds: row.wellIds })),
        outside: await outsideOf(executor, [...new Set(followed)]),
      }
    },
  }
}

export type CorrectionsService = ReturnType<typeof createCorrectionsService>
export type CorrectionParts = Awaited<ReturnType<CorrectionsService['partsOf']>>
