import { randomUUID } from 'node:crypto'
import type { Logger } from 'pino'
import type { Database } from '../db/client.ts'
import { isUnreachable, withRetry } from '../db/retry.ts'
import { AppError } from '../errors.ts'
import type { JobHandler, Jobs } from './jobs.ts'
import { claimJob, finishJob, insertJob, takeBackSilent, type JobRow } from './jobs.repository.ts'
import { runJob, HandedBack } from './run-job.ts'

export interface QueueOptions {
  db: Database
  log: Logger
  now: () => Date
  pollMs?: number
  /** A running job whose heartbeat is older is taken over. */
  silentMs?: number
  beatMs?: number
  concurrency?: number
}

/** The job queue over one MariaDB table; any number of processes may run it. */
export function createQueue(options: QueueOptions): Jobs {
  const { db, log, now, pollMs = 500, silentMs = 30_000, beatMs = 5_000, concurrency = 2 } = options
  const holder = `${process.pid}-${randomUUID().slice(0, 8)}`
  const handlers = new Map<string, JobHandler>()
  const running = new Set<Promise<void>>()
  const stopping = new AbortController()
  let timer: NodeJS.Timeout | undefined

  const claim = () => withRetry(() => claimJob(db, [...handlers.keys()], holder, now()))

  async function execute(job: JobRow) {
    const outcome = await runJob(job, handlers.get(job.kind)!, {
      db,
      holder,
      now,
      beatMs,
      signal: stopping.signal,
    }).catch((error: unknown) => failure(job, error))
    await finishJob(db, job.id, holder, now(), outcome)
  }

  function failure(job: JobRow, error: unknown) {
    if (error instanceof HandedBack) return { state: 'waiting' as const, runAt: now() }
    if (error instanceof AppError && error.code === 'job/cancelled') return { state: 'cancelled' as const }
    log.error({ err: error, jobId: job.id, kind: job.kind }, 'job failed')
    const errorCode = error instanceof AppError ? error.code : 'job/failed'
    const errorDetail = error instanceof Error ? error.message : String(error)
    if (error instanceof AppError || job.attempts >= job.maxAttempts)
      return { state: 'failed' as const, errorCode, errorDetail }
    return {
      state: 'waiting' as const,
      errorCode,
      errorDetail,
      runAt: new Date(now().getTime() + 2 ** job.attempts * 1000),
    }
  }

  function launch(job: JobRow) {
    const work = execute(job)
      .catch((error: unknown) => log.error({ err: error, jobId: job.id }, 'job outcome could not be stored'))
      .finally(() => running.delete(work))
    running.add(work)
    return work
  }

  async function tick() {
    try {
      await takeBackSilent(db, new Date(now().getTime() - silentMs), now())
      while (running.size < concurrency && !stopping.signal.aborted) {
        const job = await claim()
        if (!job) break
        void launch(job)
      }
    } catch (error) {
      log[isUnreachable(error) ? 'warn' : 'error']({ err: error }, 'the job queue could not be read')
    }
    if (!stopping.signal.aborted) timer = setTimeout(tick, pollMs)
  }

  return {
    handle: (kind, handler) => void handlers.set(kind, handler),
    enqueue: (executor, kind, enqueueOptions = {}) => insertJob(executor, kind, now(), enqueueOptions),
    start: () => void tick(),
    async stop() {
      stopping.abort()
      clearTimeout(timer)
      await Promise.allSettled(running)
    },
    async drain() {
      for (let job = await claim(); job; job = await claim()) await launch(job)
    },
  }
}
