import type { Deps } from '../deps.ts'
import type { Executor } from '../db/client.ts'
import type { Message } from './mail.ts'
import { insertMail } from './outbox.repository.ts'

/** Writes a message into the outbox and a job that delivers it, both in the caller's transaction. */
export async function queueMail(
  executor: Executor,
  { jobs, now }: Pick<Deps, 'jobs' | 'now'>,
  message: Message,
): Promise<number> {
  const id = await insertMail(executor, message, now())
  await jobs.enqueue(executor, 'mail', { payload: { id } })
  return id
}
