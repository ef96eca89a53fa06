import { createHash } from 'node:crypto'
import type { OutsideInput, OutsideMapping, OutsideRowQuery } from '#shared/contracts/outside-series.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { outsideQuantities, type OutsideQuantity } from '#shared/hydraulics/corrections/kinds.ts'
import type { Outside } from '#shared/hydraulics/corrections/correction.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction, transactionOf, type Transaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { createCache } from '../../cache.ts'
import { AppError, fieldError, notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { isCorrectable } from '../corrections/check-applied.ts'
import type { createCorrectionsService } from '../corrections/corrections.service.ts'
import { pageOf } from '../page-of.ts'
import type { createPumpingTestsService } from '../pumping-tests/pumping-tests.service.ts'
import { mayEdit } from '../pumping-tests/view.ts'
import { readLogOnThread } from '../reading-series/read-log.ts'
import type { LogFile } from '../reading-series/reading-series.service.ts'
import { checkSeries } from './check-series.ts'
import * as repository from './outside-series.repository.ts'
import { drawnOf, outsideRowsOf, rowOf, summaryOf } from './view.ts'

export interface OutsideSeriesNeeds {
  pumpingTests: Pick<ReturnType<typeof createPumpingTestsService>, 'lockForEdit' | 'whole'>
  corrections: Pick<ReturnType<typeof createCorrectionsService>, 'isFollowed' | 'follow'>
  isInUse: (executor: Executor, testId: number) => Promise<boolean>
}

interface Wanted extends Omit<OutsideInput, 'mapping'> {
  mapping: OutsideMapping
}

export function createOutsideSeriesService(deps: Deps, { pumpingTests, corrections, isInUse }: OutsideSeriesNeeds) {
  const { db } = deps.connection
  const { now, storage, workers } = deps

  /** Asks for the right first: a file costs memory, a thread and room in the storage. */
  async function read(viewer: Viewer, testId: number, { bytes }: LogFile, mapping: OutsideMapping) {
    const { found } = await pumpingTests.whole(db, viewer, testId)
    if (!mayEdit(viewer, found.test)) throw new AppError('pumping-test/not-editable')
    if (!isCorrectable(found.test.kind)) throw new AppError('correction/wrong-kind')
    const start = { instant: found.test.startAt.toISOString(), zone: found.test.zone }
    // Neither weather nor river knows when a pump is switched.
    const input = { bytes, mapping, context: { start, events_s: [] } }
    return { reading: await readLogOnThread(workers, input), start: start.instant }
  }

  async function findVisible(viewer: Viewer, id: number) {
    const found = await repository.findSeries(db, id)
    if (!found) throw notFound()
    await pumpingTests.whole(db, viewer, found.row.pumpingTestId)
    return found
  }

  /** The series that another takes the place of. */
  async function findReplaced(tx: Executor, testId: number, { replaces, mapping }: Wanted) {
    if (!replaces) return null
    const found = await repository.findSeries(tx, replaces)
    if (found?.row.pumpingTestId !== testId) throw fieldError('replaces', 'correction/unknown-series')
    if (found.row.quantity !== mapping.value.quantity) throw fieldError('replaces', 'correction/other-quantity')
    return found.row
  }

  /** Ends one series; what followed it follows the other. */
  async function replace(tx: Executor, viewer: Viewer, old: repository.OutsideSeriesRow, id: number) {
    if (!(await repository.endSeries(tx, old.id, old.rowVersion, now()))) throw new AppError('edit/conflict')
    return corrections.follow(tx, viewer, old.pumpingTestId, { from: old.id, to: id })
  }

  return {
    /** Reads the file, keeps it as it came, and stores every line with its fate. */
    async create(
      viewer: Viewer,
      testId: number,
      file: LogFile,
      input: Wanted,
      transaction: Transaction = transactionOf(deps),
    ) {
      const { reading, start } = await read(viewer, testId, file, input.mapping)
      const extent = checkSeries(reading, input.mapping, await repository.spanOfReadings(db, testId))
      const fileSha256 = createHash('sha256').update(file.bytes).digest('hex')
      await storage.put(`logs/${fileSha256}`, file.bytes)
      return transaction(async (tx) => {
        const test = await pumpingTests.lockForEdit(tx, viewer, testId)
        if (test.startAt.toISOString() !== start) throw new AppError('edit/conflict')
        const replaced = await findReplaced(tx, testId, input)
        const { label, mapping } = input
        const counted = { rowCount: reading.rows.length, takenCount: reading.summary.taken }
        const fileName = file.name.slice(0, 200)
        const quantity = mapping.value.quantity
        const row = { pumpingTestId: testId, quantity, label, fileName, fileSha256, mapping, ...counted, ...extent }
        const at = now()
        const id = await repository.insertSeries(tx, { ...row, createdBy: viewer.id, createdAt: at })
        await repository.insertReadings(tx, outsideRowsOf(id, reading))
        const followed = replaced ? await replace(tx, viewer, replaced, id) : []
        const details = {
          seriesId: id,
          label,
          fileName,
          quantity,
          ...counted,
          replaces: replaced?.id ?? null,
          followed,
        }
        await recordAudit(tx, {
          viewer,
          at,
          action: replaced ? 'outside-series/replace' : 'outside-series/add',
          subject: 'pumping-test',
          subjectId: testId,
          details,
        })
        const series = summaryOf((await repository.findSeries(tx, id))!)
        return { series, counts: reading.summary.counts as Record<string, number> }
      })
    },

    async rows(viewer: Viewer, id: number, query: OutsideRowQuery) {
      await findVisible(viewer, id)
      const rows = await repository.listRows(db, id, query)
      return pageOf(rows.map(rowOf), await repository.countRows(db, id, query.only), query)
    },

    async values(viewer: Viewer, id: number) {
      await findVisible(viewer, id)
      return drawnOf(await repository.listTaken(db, id))
    },

    async file(viewer: Viewer, id: number): Promise<LogFile> {
      const { row } = await findVisible(viewer, id)
      const bytes = await storage.get(`logs/${row.fileSha256}`)
      if (!bytes) throw notFound()
      return { name: row.fileName, bytes }
    },

    /** A series that a correction follows, or that may stand behind a submitted or adopted value, stays. */
    async remove(viewer: Viewer, id: number, rowVersion: number) {
      const { row } = await findVisible(viewer, id)
      return inTransaction(deps, async (tx) => {
        await pumpingTests.lockForEdit(tx, viewer, row.pumpingTestId)
        if (await corrections.isFollowed(tx, id)) throw new AppError('correction/series-in-use')
        if (await isInUse(tx, row.pumpingTestId)) throw new AppError('pumping-test/in-use')
        if (!(await repository.endSeries(tx, id, rowVersion, now()))) throw new AppError('edit/conflict')
        const about = { subject: 'pumping-test', subjectId: row.pumpingTestId }
        const details = { seriesId: id, label: row.label, fileName: row.fileName }
        await recordAudit(tx, { viewer, at: now(), action: 'outside-series/delete', ...about, details })
        return {}
      })
    },
  }
}

/** Series of a test, as everybody sees them who sees the test. */
export const listOutsideSeries = async (executor: Executor, testId: number) =>
  (await repository.listSeries(executor, testId)).map(summaryOf)

/** Series whose values are kept, up to 5 MB each: every view of a test asks for them, and they never change. */
const mostKept = 8

/** What corrections follow, by series: as metres of water, on the clock of the test. */
export function createOutsideValues() {
  const kept = createCache<Outside>(mostKept)

  async function valuesOf(executor: Executor, id: number, quantity: OutsideQuantity): Promise<Outside> {
    const taken = await repository.listTaken(executor, id)
    const { toMetres } = outsideQuantities[quantity]
    return {
      elapsed_s: taken.map(({ elapsedS }) => elapsedS),
      value_m: taken.map(({ value }) => value * toMetres),
    }
  }

  return async (executor: Executor, ids: number[]): Promise<Map<number, Outside & { label: string }>> => {
    const found = new Map<number, Outside & { label: string }>()
    for (const id of ids) {
      const series = await repository.findSeries(executor, id)
      if (!series) continue
      const { label, quantity } = series.row
      found.set(id, { label, ...(await kept(String(id), () => valuesOf(executor, id, quantity))) })
    }
    return found
  }
}
