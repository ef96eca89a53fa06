import { createHash } from 'node:crypto'
import type {
  ReadingDecision,
  ReadingRow,
  ReadingRowQuery,
  SeriesCreated,
  SeriesInput,
} from '#shared/contracts/reading-series.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { LogReading } from '#shared/readings/model.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction, transactionOf, type Transaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { pageOf } from '../page-of.ts'
import type { createPumpingTestsService } from '../pumping-tests/pumping-tests.service.ts'
import { mayEdit, seriesView } from '../pumping-tests/view.ts'
import { readLogOnThread } from './read-log.ts'
import * as repository from './reading-series.repository.ts'
import { readingRows, rowView } from './rows.ts'

export interface ReadingSeriesNeeds {
  pumpingTests: Pick<ReturnType<typeof createPumpingTestsService>, 'lockForEdit' | 'whole'>
  markInputsChanged: (executor: Executor, testId: number) => Promise<void>
  isInUse: (executor: Executor, testId: number) => Promise<boolean>
}

export interface LogFile {
  name: string
  bytes: Uint8Array
}

export function createReadingSeriesService(
  deps: Deps,
  { pumpingTests, markInputsChanged, isInUse }: ReadingSeriesNeeds,
) {
  const { db } = deps.connection
  const { now, storage, workers } = deps

  /** Asks for the right first: a file costs memory, a thread and room in the storage. */
  async function read(
    viewer: Viewer,
    testId: number,
    { bytes }: LogFile,
    { mapping, testWellId }: SeriesInput,
  ): Promise<{ reading: LogReading; start: string }> {
    const { found, parts } = await pumpingTests.whole(db, viewer, testId)
    if (!mayEdit(viewer, found.test)) throw new AppError('pumping-test/not-editable')
    if (!parts.wells.some(({ row }) => row.id === testWellId)) throw notFound()
    const start = { instant: found.test.startAt.toISOString(), zone: found.test.zone }
    const context = { start, events_s: parts.steps.map(({ startS }) => startS) }
    return { reading: await readLogOnThread(workers, { bytes, mapping, context }), start: start.instant }
  }

  /** The series with its test, when the viewer may see the test. */
  async function findVisible(executor: Executor, viewer: Viewer, id: number) {
    const series = await repository.findSeries(executor, id)
    if (!series) throw notFound()
    const { parts } = await pumpingTests.whole(executor, viewer, series.pumpingTestId)
    if (!parts.wells.some(({ row }) => row.id === series.testWellId)) throw notFound()
    return series
  }

  return {
    /** Reads the file, keeps it as it came, and stores every line with its fate. */
    async create(
      viewer: Viewer,
      testId: number,
      file: LogFile,
      input: SeriesInput,
      transaction: Transaction = transactionOf(deps),
    ): Promise<SeriesCreated> {
      const { reading, start } = await read(viewer, testId, file, input)
      const fileSha256 = createHash('sha256').update(file.bytes).digest('hex')
      await storage.put(`logs/${fileSha256}`, file.bytes)
      return transaction(async (tx) => {
        const test = await pumpingTests.lockForEdit(tx, viewer, testId)
        if (test.startAt.toISOString() !== start) throw new AppError('edit/conflict')
        if (!(await repository.findTestWell(tx, testId, input.testWellId))) throw notFound()
        const { testWellId, mapping } = input
        const counted = { rowCount: reading.rows.length, takenCount: reading.summary.taken }
        const facts = {
          pumpingTestId: testId,
          testWellId,
          quantity: mapping.value.quantity,
          mapping,
          fileSha256,
          ...counted,
        }
        const row = { ...facts, fileName: file.name.slice(0, 200), createdBy: viewer.id, createdAt: now() }
        const id = await repository.insertSeries(tx, row)
        await repository.insertReadings(tx, readingRows(id, reading))
        await markInputsChanged(tx, testId)
        const details = { seriesId: id, fileName: row.fileName, ...counted }
        await recordAudit(tx, {
          viewer,
          at: now(),
          action: 'readings/add',
          subject: 'pumping-test',
          subjectId: testId,
          details,
        })
        const series = await repository.findSeries(tx, id)
        return { series: seriesView(series!), counts: reading.summary.counts as Record<string, number> }
      })
    },

    async rows(viewer: Viewer, id: number, query: ReadingRowQuery) {
      const series = await findVisible(db, viewer, id)
      const rows = await repository.listRows(db, series.id, query)
      const total = await repository.countRows(db, series.id, query.only)
      const seqs = rows.map(({ seq }) => seq)
      const decisions = await repository.listDecisions(db, series.id, seqs)
      const newest = new Map(
        decisions.map(({ row, by }) => [row.seq, { action: row.action, reason: row.reason, by: by ?? '' }]),
      )
      const items: ReadingRow[] = rows.map((row) => rowView(row, newest.get(row.seq) ?? null))
      return pageOf(items, total, query)
    },

    async file(viewer: Viewer, id: number): Promise<LogFile> {
      const series = await findVisible(db, viewer, id)
      const bytes = await storage.get(`logs/${series.fileSha256}`)
      if (!bytes) throw notFound()
      return { name: series.fileName, bytes }
    },

    /** Leaves readings out or takes them back, with a reason; the readings themselves stay as they came. */
    async decide(viewer: Viewer, id: number, { seqs, action, reason }: ReadingDecision) {
      // Looked up before the transaction, which begins with its lock and so reads nothing older.
      const series = await findVisible(db, viewer, id)
      return inTransaction(deps, async (tx) => {
        await pumpingTests.lockForEdit(tx, viewer, series.pumpingTestId)
        if (!(await repository.findSeries(tx, id))) throw notFound()
        const wanted = [...new Set(seqs)]
        if ((await repository.countReadings(tx, id, wanted)) !== wanted.length) throw notFound()
        const at = now()
        await repository.insertDecisions(
          tx,
          wanted.map((seq) => ({ seriesId: id, seq, action, reason, createdBy: viewer.id, createdAt: at })),
        )
        await markInputsChanged(tx, series.pumpingTestId)
        const details = { action, reason, count: wanted.length }
        await recordAudit(tx, {
          viewer,
          at,
          action: 'readings/decide',
          subject: 'reading-series',
          subjectId: id,
          details,
        })
        return {}
      })
    },

    /** A series behind a submitted or adopted value cannot be deleted. */
    async remove(viewer: Viewer, id: number, rowVersion: number) {
      const series = await findVisible(db, viewer, id)
      return inTransaction(deps, async (tx) => {
        await pumpingTests.lockForEdit(tx, viewer, series.pumpingTestId)
        if (await isInUse(tx, series.pumpingTestId)) throw new AppError('pumping-test/in-use')
        if (!(await repository.endSeries(tx, id, rowVersion, now()))) throw new AppError('edit/conflict')
        await markInputsChanged(tx, series.pumpingTestId)
        await recordAudit(tx, {
          viewer,
          at: now(),
          action: 'readings/delete',
          subject: 'reading-series',
          subjectId: id,
        })
        return {}
      })
    },
  }
}
