import type { Database } from '../db/client.ts'
import { AppError } from '../errors.ts'
import type { JobContext, JobHandler } from './jobs.ts'
import { beat, saveProgress, type JobRow, type Outcome } from './jobs.repository.ts'

/** The process is shutting down: the job waits again for another. */
export class HandedBack extends Error {}

interface Running {
  db: Database
  holder: string
  now: () => Date
  beatMs: number
  signal: AbortSignal
}

/** Runs one claimed job with its heartbeat; throws what the handler throws. */
export async function runJob(job: JobRow, handler: JobHandler, running: Running): Promise<Outcome> {
  const { db, holder, now, beatMs, signal } = running
  let lost: Error | null = null

  async function listen() {
    const cancel = await beat(db, job.id, holder, now())
    if (cancel === null) lost = new HandedBack('another process took the job over')
    if (cancel) lost = new AppError('job/cancelled')
  }

  const context: JobContext = {
    jobId: job.id,
    report: async (progress) => void (await saveProgress(db, job.id, holder, progress)),
    async checkCancelled() {
      await listen()
      if (signal.aborted) throw new HandedBack('the process is stopping')
      if (lost) throw lost
    },
  }
  // A missed heartbeat is not fatal: the next one, or the take-over, settles it.
  const heart = setInterval(() => void listen().catch(() => undefined), beatMs)
  try {
    const result = await handler(job.payload, context)
    return { state: 'done', result: result ?? null, errorCode: undefined, errorDetail: undefined }
  } finally {
    clearInterval(heart)
  }
}
