import type { ClientRateLimitInfo, Options, Store } from 'express-rate-limit'
import type { Deps } from '../deps.ts'
import { countHit, forgetHits, takeBackHit } from './rate-limit.repository.ts'

/** Counters in MariaDB: all processes count together, and a restart forgets nothing. */
export function databaseRateStore({ connection: { db }, now }: Deps, prefix: string): Store {
  let windowMs = 0
  const idOf = (key: string) => `${prefix}:${key}`.slice(0, 190)
  return {
    localKeys: false,
    init: (options: Options) => void (windowMs = options.windowMs),
    async increment(key): Promise<ClientRateLimitInfo> {
      const { hits, resetAt } = await countHit(db, idOf(key), now(), windowMs)
      return { totalHits: hits, resetTime: resetAt }
    },
    decrement: async (key) => void (await takeBackHit(db, idOf(key))),
    resetKey: async (key) => void (await forgetHits(db, idOf(key))),
  }
}
