import { eq, sql } from 'drizzle-orm'
import type { Executor } from '../db/client.ts'
import { rateLimits } from '../db/schema/index.ts'

export interface Counted {
  hits: number
  resetAt: Date
}

/** Counts one attempt under `id`, in one statement: processes that count at the same time cannot miss each other. */
export async function countHit(executor: Executor, id: string, now: Date, windowMs: number): Promise<Counted> {
  const resetAt = new Date(now.getTime() + windowMs)
  // MariaDB assigns from left to right: `hits` still sees the old end of the window.
  await executor
    .insert(rateLimits)
    .values({ id, hits: 1, resetAt })
    .onDuplicateKeyUpdate({
      set: {
        hits: sql`if(${rateLimits.resetAt} <= ${now}, 1, ${rateLimits.hits} + 1)`,
        resetAt: sql`if(${rateLimits.resetAt} <= ${now}, ${resetAt}, ${rateLimits.resetAt})`,
      },
    })
  const [row] = await executor.select().from(rateLimits).where(eq(rateLimits.id, id))
  return row ?? { hits: 1, resetAt }
}

export const takeBackHit = (executor: Executor, id: string) =>
  executor
    .update(rateLimits)
    .set({ hits: sql`greatest(${rateLimits.hits} - 1, 0)` })
    .where(eq(rateLimits.id, id))

export const forgetHits = (executor: Executor, id: string) => executor.delete(rateLimits).where(eq(rateLimits.id, id))
