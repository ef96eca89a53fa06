import { eq, sql } from 'drizzle-orm'
import type { Executor } from '../db/client.ts'
import { rawRows } from '../db/raw-rows.ts'
import { withRetry } from '../db/retry.ts'
import { rateLimits } from '../db/schema/index.ts'

export interface Counted {
  hits: number
  resetAt: Date
}

/**
 * Counts one attempt under `id` and tells the number, in one statement: attempts at the same time, in any process,
 * each get a number of their own.
 */
export async function countHit(executor: Executor, id: string, now: Date, windowMs: number): Promise<Counted> {
  const resetAt = new Date(now.getTime() + windowMs)
  // MariaDB assigns from left to right: `hits` still sees the old end of the window.
  const statement = sql`
    insert into rate_limits (id, hits, reset_at) values (${id}, 1, ${resetAt})
    on duplicate key update
      hits = if(reset_at <= ${now}, 1, hits + 1),
      reset_at = if(reset_at <= ${now}, ${resetAt}, reset_at)
    returning hits, reset_at as resetAt`
  const rows = await withRetry(() => rawRows<{ hits: number; resetAt: string }>(executor, statement))
  const { hits, resetAt: told } = rows[0]!
  return { hits, resetAt: rateLimits.resetAt.mapFromDriverValue(told) as Date }
}

export const takeBackHit = (executor: Executor, id: string) =>
  executor
    .update(rateLimits)
    .set({ hits: sql`greatest(${rateLimits.hits} - 1, 0)` })
    .where(eq(rateLimits.id, id))

export const forgetHits = (executor: Executor, id: string) => executor.delete(rateLimits).where(eq(rateLimits.id, id))
