import type { Deps } from '../deps.ts'
import type { Executor } from './client.ts'
import { withRetry } from './retry.ts'

/** One transaction, done again when it lost a race. What `work` does outside the database must be safe to repeat. */
export const inTransaction = <T>(
  { connection }: Pick<Deps, 'connection'>,
  work: (tx: Executor) => Promise<T>,
): Promise<T> => withRetry(() => connection.db.transaction(work))
