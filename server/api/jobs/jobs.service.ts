import type { Job } from '#shared/contracts/jobs.ts'
import { atLeast, type Viewer } from '#shared/contracts/permissions.ts'
import type { Paging } from '#shared/contracts/common.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError } from '../../errors.ts'
import { activeJobs, cancelJob, countJobs, listJobs, type JobRow } from '../../jobs/jobs.repository.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { pageOf } from '../page-of.ts'

export function jobView(row: JobRow): Job {
  const { id, kind, state, done, total, message, errorCode, attempts, cancelRequested } = row
  const instants = { createdAt: row.createdAt.toISOString(), finishedAt: row.finishedAt?.toISOString() ?? null }
  return { id, kind, state, done, total, message, errorCode, attempts, cancelRequested, ...instants }
}

/** Stewards follow everybody's work, others their own. */
const scopeOf = (viewer: Viewer) => (atLeast(viewer, 'steward') ? null : viewer.id)

export function createJobsService(deps: Deps) {
  const { db } = deps.connection
  const { now } = deps
  return {
    async list({ limit, offset }: Paging) {
      const [rows, total] = await Promise.all([listJobs(db, null, limit, offset), countJobs(db)])
      return pageOf(rows.map(jobView), total, { offset })
    },

    async cancel(viewer: Viewer, id: number) {
      await inTransaction(deps, async (tx) => {
        if (!(await cancelJob(tx, id, now()))) throw new AppError('job/not-active')
        await recordAudit(tx, { viewer, at: now(), action: 'jobs/cancel', subject: 'job', subjectId: id })
      })
      return {}
    },

    async active(viewer: Viewer, endedSince: Date) {
      return (await activeJobs(db, scopeOf(viewer), endedSince)).map(jobView)
    },
  }
}
