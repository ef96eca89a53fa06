import type { Deps } from '../deps.ts'
import { registerHandlers } from './handlers.ts'
import { startRecurring } from './recurring.ts'

const hour = 3_600_000

/** Starts the queue and the recurring work of this process; the answer stops both. */
export function startBackgroundWork(deps: Deps): () => Promise<void> {
  const { jobs, connection, log, now } = deps
  registerHandlers(deps)
  jobs.start()
  const stopRecurring = startRecurring(connection.db, jobs, log, now, [
    { kind: 'clean-up', everyMs: hour },
    { kind: 'lift-embargoes', everyMs: hour },
  ])
  return async () => {
    stopRecurring()
    await jobs.stop()
  }
}
