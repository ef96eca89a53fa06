import { createHash } from 'node:crypto'
import type { Executor } from '../../db/client.ts'
import { AppError } from '../../errors.ts'
import { countHit, forgetHits } from '../../middleware/rate-limit.repository.ts'

/** Wrong passwords for one account, from anywhere, before it rests. Known and unknown addresses are counted alike. */
const limit = 10
const windowMs = 15 * 60_000

const counterOf = (email: string) => `account:${createHash('sha256').update(email).digest('hex')}`

/**
 * Counted before the password is looked at, so that attempts at the same time cannot slip past the limit.
 * @throws AppError when the account rests.
 */
export async function countAttempt(executor: Executor, email: string, now: Date): Promise<void> {
  const { hits, resetAt } = await countHit(executor, counterOf(email), now, windowMs)
  if (hits <= limit) return
  const seconds = Math.max(1, Math.ceil((resetAt.getTime() - now.getTime()) / 1000))
  throw new AppError('session/too-many-attempts', { seconds })
}

/** After the right password, or a new one. */
export async function forgetAttempts(executor: Executor, email: string): Promise<void> {
  await forgetHits(executor, counterOf(email))
}
