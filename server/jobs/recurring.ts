import type { Logger } from 'pino'
import type { Database } from '../db/client.ts'
import type { Jobs } from './jobs.ts'
import { takeLease } from './jobs.repository.ts'

export interface Recurring {
  kind: string
  everyMs: number
}

/** Enqueues recurring work: whichever process takes the lease first does it, once per period. */
export function startRecurring(db: Database, jobs: Jobs, log: Logger, now: () => Date, work: Recurring[]): () => void {
  async function look() {
    for (const { kind, everyMs } of work) {
      await db.transaction(async (tx) => {
        const due = await takeLease(
          tx,
          `recurring:${kind}`,
          String(process.pid),
          now(),
          new Date(now().getTime() + everyMs),
        )
        if (due) await jobs.enqueue(tx, kind, { uniqueKey: `recurring:${kind}` })
      })
    }
  }
  const safely = () =>
    void look().catch((error: unknown) => log.warn({ err: error }, 'recurring work could not be enqueued'))
  safely()
  const timer = setInterval(safely, 60_000)
  return () => clearInterval(timer)
}
