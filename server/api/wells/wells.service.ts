import type { AdoptedValue } from '#shared/contracts/adopted-values.ts'
import { atLeast, type Viewer } from '#shared/contracts/permissions.ts'
import type { PumpingTestSummary } from '#shared/contracts/pumping-tests.ts'
import type { Well, WellInput, WellQuery, WellUpdate } from '#shared/contracts/wells.ts'
import type { Executor } from '../../db/client.ts'
import { isDuplicate } from '../../db/retry.ts'
import { inTransaction, transactionOf, type Transaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, fieldError, notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { pageOf } from '../page-of.ts'
import type { RegionService } from '../region/region.service.ts'
import { checkPublishing } from '../visibility/publishing.ts'
import { wellPosition } from './position.ts'
import { listScreens } from './screens.repository.ts'
import { summaryView, wellView } from './view.ts'
import * as repository from './wells.repository.ts'

export interface WellsNeeds {
  region: Pick<RegionService, 'get'>
  testsOf: (viewer: Viewer, wellId: number) => Promise<PumpingTestSummary[]>
  valuesOf: (viewer: Viewer, wellId: number) => Promise<AdoptedValue[]>
  /** Says that analyses and estimates rest on another position or construction now. */
  wellChanged: (executor: Executor, wellId: number) => Promise<void>
}

export function createWellsService(deps: Deps, { region, testsOf, valuesOf, wellChanged }: WellsNeeds) {
  const { db } = deps.connection
  const { now } = deps

  async function columns(executor: Executor, input: WellInput) {
    const { screens: _screens, picks, confirmOutside: _, x: _x, y: _y, epsg: _epsg, ...facts } = input
    checkConstruction(input)
    const unitIds = picks.map(({ unitId }) => unitId)
    if ((await repository.countUnits(executor, unitIds)) !== new Set(unitIds).size)
      throw fieldError('picks', 'well/unknown-unit')
    return { ...facts, ...wellPosition(input, await region.get(executor)) }
  }

  function writeParts(executor: Executor, id: number, { screens, picks }: WellInput) {
    const instant = (text: string | null) => (text === null ? null : new Date(text))
    const rows = screens.map((screen) => ({
      ...screen,
      validFrom: instant(screen.validFrom),
      validTo: instant(screen.validTo),
    }))
    return repository.insertParts(executor, id, rows, picks)
  }

  const mayEdit = (viewer: Viewer, { createdBy }: repository.WellRow) =>
    atLeast(viewer, 'steward') || (atLeast(viewer, 'analyst') && createdBy === viewer.id)

  return {
    /** All screens of wells, whenever they were valid. */
    screensOf: listScreens,

    /** Depths of the units at wells, metres below ground. */
    picksOf: repository.listPicks,

    async list(viewer: Viewer, query: WellQuery) {
      const rows = await repository.listWells(db, viewer, query)
      return pageOf(rows.map(summaryView), await repository.countWells(db, viewer, query), query)
    },

    async get(viewer: Viewer, id: number): Promise<Well> {
      const row = await repository.findWell(db, viewer, id)
      if (!row) throw notFound()
      const [screens, picks, tests, values] = await Promise.all([
        listScreens(db, [id]),
        repository.listPicks(db, [id]),
        testsOf(viewer, id),
        valuesOf(viewer, id),
      ])
      return wellView(row, { screens, picks, tests, values, mayEdit: mayEdit(viewer, row) })
    },

    create: (viewer: Viewer, input: WellInput, transaction: Transaction = transactionOf(deps)) =>
      refusingTakenCode(input, () =>
        transaction(async (tx) => {
          checkPublishing(viewer, input)
          const row = { ...(await columns(tx, input)), createdBy: viewer.id, createdAt: now() }
          const id = await repository.insertWell(tx, row)
          await writeParts(tx, id, input)
          await recordAudit(tx, {
            viewer,
            at: now(),
            action: 'wells/create',
            subject: 'well',
            subjectId: id,
            details: { code: input.code },
          })
          return { id }
        }),
      ),

    update: (viewer: Viewer, id: number, { rowVersion, ...input }: WellUpdate) =>
      refusingTakenCode(input, () =>
        inTransaction(deps, async (tx) => {
          const before = await repository.findWell(tx, viewer, id)
          if (!before) throw notFound()
          if (!mayEdit(viewer, before)) throw new AppError('well/not-editable')
          const { visibility: _kept, ...change } = await columns(tx, input)
          if (samePosition(input, before)) change.positionAccuracyM = before.positionAccuracyM
          if (!(await repository.updateWell(tx, id, rowVersion, change))) throw new AppError('edit/conflict')
          await repository.deleteParts(tx, id)
          await writeParts(tx, id, input)
          await wellChanged(tx, id)
          await recordAudit(tx, { viewer, at: now(), action: 'wells/edit', subject: 'well', subjectId: id })
          return { id }
        }),
      ),
  }
}

async function refusingTakenCode<T>({ code }: WellInput, work: () => Promise<T>): Promise<T> {
  try {
    return await work()
  } catch (error) {
    if (isDuplicate(error)) throw fieldError('code', 'well/code-taken', { code })
    throw error
  }
}

/** The error of the datum shift is in the kept accuracy already: saving again must not add it once more. */
const samePosition = (input: WellInput, before: repository.WellRow) =>
  input.x === before.originalX &&
  input.y === before.originalY &&
  input.epsg === before.originalEpsg &&
  input.positionAccuracyM === before.positionAccuracyM

/** @throws AppError naming the screen or unit that cannot be right. */
function checkConstruction({ depthM, screens, picks }: WellInput): void {
  for (const [i, { bottomM }] of screens.entries()) {
    if (depthM !== null && bottomM > depthM + 0.5) {
      throw fieldError(`screens.${i}.bottomM`, 'well/screen-too-deep', { bottom: bottomM, depth: depthM })
    }
  }
  for (const [i, { unitId, topM, bottomM }] of picks.entries()) {
    if (bottomM !== null && bottomM <= topM) throw fieldError(`picks.${i}.bottomM`, 'well/pick-order')
    if (picks.findIndex((pick) => pick.unitId === unitId) !== i)
      throw fieldError(`picks.${i}.unitId`, 'well/pick-twice')
  }
}

export type WellsService = ReturnType<typeof createWellsService>
