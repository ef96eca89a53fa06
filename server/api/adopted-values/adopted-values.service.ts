import type { AdoptedValueFilters, AdoptedValueQuery } from '#shared/contracts/adopted-values.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { pageOf } from '../page-of.ts'
import * as repository from './adopted-values.repository.ts'
import { bumpDataVersions, dataVersion } from './data-versions.repository.ts'
import { adoptedValuesCsv } from './export-csv.ts'
import { statisticsOf } from './statistics.ts'
import { countCurrentOf, unitsWithValues, type Subject } from './units-with-values.repository.ts'
import { adoptedValueView } from './view.ts'

export type NewValue = Omit<repository.NewAdoptedValue, 'validFrom' | 'validTo' | 'replacedBy'>

export interface AdoptedValuesNeeds {
  withdrawAnalysis: (executor: Executor, analysisId: number) => Promise<unknown>
}

export function createAdoptedValuesService(deps: Deps, { withdrawAnalysis }: AdoptedValuesNeeds) {
  const { db } = deps.connection
  const { now, jobs } = deps

  /** Moves the units' data versions and asks for new models; in the transaction of the change. */
  async function changed(executor: Executor, unitIds: number[]) {
    await bumpDataVersions(executor, unitIds)
    for (const unitId of new Set(unitIds)) {
      await jobs.enqueue(executor, 'refit-models', { payload: { unitId }, uniqueKey: `refit-models:${unitId}` })
    }
  }

  return {
    changed,
    dataVersion,
    unitsWithValues,

    /** A well or test is another now: estimates that use its values are made anew. */
    changedAt: async (executor: Executor, subject: Subject, id: number) =>
      changed(executor, await unitsWithValues(executor, subject, [id])),

    async list(viewer: Viewer, query: AdoptedValueQuery) {
      const [rows, logarithms] = await Promise.all([
        repository.listCurrent(db, viewer, query),
        repository.listLogarithms(db, viewer, query),
      ])
      return { ...pageOf(rows.map(adoptedValueView), logarithms.length, query), statistics: statisticsOf(logarithms) }
    },

    async get(viewer: Viewer, id: number) {
      const found = await repository.findValue(db, viewer, id)
      if (!found) throw notFound()
      return adoptedValueView(found)
    },

    ofWell: async (viewer: Viewer, wellId: number) =>
      (await repository.listCurrent(db, viewer, { wellId })).map(adoptedValueView),

    async exportCsv(viewer: Viewer, filters: AdoptedValueFilters, unitSystem: string | undefined) {
      const rows = await repository.listCurrent(db, viewer, filters)
      return adoptedValuesCsv(rows.map(adoptedValueView), unitSystemById(unitSystem ?? ''))
    },

    /** Every value the test ever had; the current ones are those without an end. */
    async history(viewer: Viewer, testId: number) {
      return { items: (await repository.listHistory(db, viewer, testId)).map(adoptedValueView) }
    },

    /** Puts the values of an accepted analysis into the regional table; those the test had before end, and stay in its history. */
    async adopt(executor: Executor, testId: number, values: NewValue[]) {
      const at = now()
      const before = await repository.lockCurrent(executor, testId)
      const ids: number[] = []
      for (const value of values) ids.push(await repository.insertValue(executor, { ...value, validFrom: at }))
      for (const old of before) {
        const heir = values.findIndex(({ unitId, quantity }) => unitId === old.unitId && quantity === old.quantity)
        await repository.endValues(executor, [old.id], at, heir === -1 ? null : ids[heir]!)
      }
      await changed(
        executor,
        [...before, ...values].map(({ unitId }) => unitId),
      )
      return ids
    },

    withdraw: (viewer: Viewer, id: number, reason: string) =>
      inTransaction(deps, async (tx) => {
        const found = await repository.findValue(tx, viewer, id)
        if (!found) throw notFound()
        const current = await repository.lockCurrent(tx, found.row.pumpingTestId)
        const row = current.find((candidate) => candidate.id === id)
        if (!row) throw new AppError('adopted-value/not-current')
        await repository.endValues(tx, [id], now(), null)
        if ((await countCurrentOf(tx, row.analysisId)) === 0) await withdrawAnalysis(tx, row.analysisId)
        await changed(tx, [row.unitId])
        const details = { reason, quantity: row.quantity, pumpingTestId: row.pumpingTestId }
        await recordAudit(tx, {
          viewer,
          at: now(),
          action: 'adopted-values/withdraw',
          subject: 'adopted-value',
          subjectId: id,
          details,
        })
        return {}
      }),
  }
}
