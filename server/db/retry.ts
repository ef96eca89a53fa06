import { setTimeout as pause } from 'node:timers/promises'

/** Deadlock (also a cluster's certification failure), lock wait, node not ready, connection lost: the work may simply be done again. */
const passing = new Set([
  'ER_LOCK_DEADLOCK',
  'ER_LOCK_WAIT_TIMEOUT',
  'ER_UNKNOWN_COM_ERROR',
  'PROTOCOL_CONNECTION_LOST',
])
/** The database cannot be reached at all. */
const unreachable = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'ETIMEDOUT',
  'EPIPE',
  'ENOENT',
  'PROTOCOL_CONNECTION_LOST',
  'PROTOCOL_ENQUEUE_AFTER_FATAL_ERROR',
  'ER_SERVER_SHUTDOWN',
  'ER_CON_COUNT_ERROR',
  'ER_UNKNOWN_COM_ERROR',
])

/** There is no room left: for the database's tables, or for files. */
const full = new Set(['ER_DISK_FULL', 'ER_RECORD_FILE_FULL', 'ENOSPC', 'EDQUOT'])

/**
 * The driver's code of an error, looked for behind the wrappers that libraries put around it. A rollback on a connection
 * that is gone fails without a code and hides why; whether the commit before it arrived is not known then, so that this
 * is unreachable, and not to be done again.
 */
export function databaseCode(error: unknown): string | null {
  for (let cause = error; cause instanceof Error; cause = cause.cause) {
    if ('code' in cause && typeof cause.code === 'string') return cause.code
    if ('fatal' in cause && cause.fatal === true) return 'PROTOCOL_ENQUEUE_AFTER_FATAL_ERROR'
  }
  return null
}

export const isDuplicate = (error: unknown) => databaseCode(error) === 'ER_DUP_ENTRY'
export const isFull = (error: unknown) => full.has(databaseCode(error) ?? '')
export const isUnreachable = (error: unknown) => unreachable.has(databaseCode(error) ?? '')

/** Runs a transaction again when the database says that it only lost a race. */
export async function withRetry<T>(work: () => Promise<T>, attempts = 4): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await work()
    } catch (error) {
      if (attempt >= attempts || !passing.has(databaseCode(error) ?? '')) throw error
      await pause(20 * 2 ** attempt + Math.random() * 20)
    }
  }
}
