import type { Deps } from '../deps.ts'
import type { Executor } from './client.ts'
import { withRetry } from './retry.ts'

/** Runs work in a transaction: a plain one, or one that a repeated request does not repeat. */
export type Transaction = <T>(work: (tx: Executor) => Promise<T>) => Promise<T>

/** One transaction, done again when it lost a race. What `work` does outside the database must be safe to repeat. */
export const inTransaction = <T>(
  { connection }: Pick<Deps, 'connection'>,
  work: (tx: Executor) => Promise<T>,
): Promise<T> => withRetry(() => connection.db.transaction(work))

export const transactionOf =
  (deps: Pick<Deps, 'connection'>): Transaction =>
  (work) =>
    inTransaction(deps, work)
