import { createHash } from 'node:crypto'
import type { Request } from 'express'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { isDuplicate } from '../../db/retry.ts'
import { inTransaction, type Transaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, fieldError } from '../../errors.ts'
import { findKey, keepAnswer, takeKey } from './idempotency.repository.ts'

interface Asked {
  req: Request
  viewer: Viewer
  body: unknown
}

const sha256 = (value: unknown) => createHash('sha256').update(JSON.stringify(value)).digest('hex')

/** A key belongs to who sends it: another person's same key is another key. */
const keyId = (viewer: Viewer, key: string) => sha256([viewer.id, key])

class Repeated extends Error {}

async function takeOrRepeat(tx: Executor, id: string, wanted: string, now: Date): Promise<void> {
  try {
    await takeKey(tx, id, wanted, now)
  } catch (error) {
    throw isDuplicate(error) ? new Repeated() : error
  }
}

/**
 * Runs `work` in one transaction. When the request carries an `Idempotency-Key`, the key and the answer are part of
 * that transaction, so that a repeated request gets the first answer and changes nothing; after a failure the key is
 * free again. `work` returns plain JSON values.
 * @throws AppError `request/repeated` when the key came with another request before.
 */
export async function once<Answer>(
  deps: Pick<Deps, 'connection' | 'now'>,
  { req, viewer, body }: Asked,
  work: (tx: Executor) => Promise<Answer>,
): Promise<Answer> {
  const key = req.get('idempotency-key')
  if (key === undefined) return inTransaction(deps, work)
  if (key.length > 200) throw fieldError('Idempotency-Key', 'field/too-long', { maximum: 200 })
  const id = keyId(viewer, key)
  const wanted = sha256([req.method, req.originalUrl, body])
  try {
    return await inTransaction(deps, async (tx) => {
      await takeOrRepeat(tx, id, wanted, deps.now())
      const answer = await work(tx)
      await keepAnswer(tx, id, answer)
      return answer
    })
  } catch (error) {
    if (!(error instanceof Repeated)) throw error
    const first = await findKey(deps.connection.db, id)
    if (first?.requestSha256 !== wanted) throw new AppError('request/repeated')
    return first.response as Answer
  }
}

/** The transaction of a request that must not happen twice, for a service to work in. */
export const onceOf =
  (deps: Pick<Deps, 'connection' | 'now'>, asked: Asked): Transaction =>
  (work) =>
    once(deps, asked, work)
