import { lt } from 'drizzle-orm'
import type { Deps } from '../../deps.ts'
import { idempotencyKeys, passwordTokens, rateLimits, sessions } from '../../db/schema/index.ts'
import type { JobHandler } from '../jobs.ts'

const day = 86_400_000

/** Removes what has run out: sessions, tokens, counters, request keys. */
export function cleanUp({ connection: { db }, now }: Deps): JobHandler {
  return async () => {
    const at = now()
    await db.delete(sessions).where(lt(sessions.expiresAt, at))
    await db.delete(rateLimits).where(lt(rateLimits.resetAt, at))
    await db.delete(passwordTokens).where(lt(passwordTokens.expiresAt, new Date(at.getTime() - 30 * day)))
    await db.delete(idempotencyKeys).where(lt(idempotencyKeys.createdAt, new Date(at.getTime() - day)))
  }
}
