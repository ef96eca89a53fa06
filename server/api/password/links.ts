import { createHash, randomBytes } from 'node:crypto'
import type { LinkPurpose } from '#shared/contracts/password.ts'
import type { Executor } from '../../db/client.ts'
import type { Deps } from '../../deps.ts'
import { endTokensOf, insertToken } from './password.repository.ts'

const hour = 3_600_000
const lifetimes: Record<LinkPurpose, number> = {
  reset: hour,
  invitation: 7 * 24 * hour,
  'first-administrator': 7 * 24 * hour,
}

export const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex')

/** A single-use link to the page that sets a password. The token stands after `#` and only its hash is kept. */
export async function makeLink(
  executor: Executor,
  { config, now }: Pick<Deps, 'config' | 'now'>,
  userId: number,
  purpose: LinkPurpose,
): Promise<string> {
  const token = randomBytes(32).toString('base64url')
  const createdAt = now()
  const expiresAt = new Date(createdAt.getTime() + lifetimes[purpose])
  await insertToken(executor, { userId, purpose, tokenHash: hashOf(token), createdAt, expiresAt })
  return `${config.publicUrl}/set-password#${token}`
}

/** A link that makes the person's earlier ones useless. */
export async function makeOnlyLink(...[executor, deps, userId, purpose]: Parameters<typeof makeLink>): Promise<string> {
  await endTokensOf(executor, userId, deps.now())
  return makeLink(executor, deps, userId, purpose)
}
