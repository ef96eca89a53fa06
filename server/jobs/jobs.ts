import type { Executor } from '../db/client.ts'

export interface JobProgress {
  done: number
  total: number | null
  message: string
}

/** What a handler gets: it reports progress, and asks whether it should stop. */
export interface JobContext {
  jobId: number
  report(progress: JobProgress): Promise<void>
  /** Throws when somebody cancelled the job. */
  checkCancelled(): Promise<void>
}

export interface EnqueueOptions {
  payload?: unknown
  /** While a job with this key waits, another is not added. */
  uniqueKey?: string
  runAt?: Date
  createdBy?: number | null
}

/** Handlers are resumable or safely repeatable: a job may be started again after its process died. */
export type JobHandler = (payload: unknown, context: JobContext) => Promise<unknown>

export interface Jobs {
  /** Registers the handler of a kind; before `start`. */
  handle(kind: string, handler: JobHandler): void
  /** Adds a job inside the caller's transaction; returns its id, or null when one with the key waits already. */
  enqueue(executor: Executor, kind: string, options?: EnqueueOptions): Promise<number | null>
  /** Begins to claim and run jobs in this process. */
  start(): void
  /** Stops claiming, hands running jobs back, and waits for what is in flight. */
  stop(): Promise<void>
  /** Runs everything that is due now, in this process; for tests and seeding. */
  drain(): Promise<void>
}
