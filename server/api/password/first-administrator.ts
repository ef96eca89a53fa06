import { isLoopback } from '../../config/loopback.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { makeOnlyLink } from './links.ts'
import { findRecipient, hasAdministrator, insertPlaceholder } from './password.repository.ts'

/** Holds the place until somebody follows the link and gives an address; nobody can be mailed here. */
export const placeholderEmail = 'first-administrator@basinbook.invalid'

/**
 * A one-time link for whoever starts an installation in which no administrator can sign in, or null where one can.
 * Each call makes the earlier link useless.
 */
export async function ensureFirstAdministratorLink(
  deps: Pick<Deps, 'connection' | 'config' | 'now'>,
): Promise<string | null> {
  return inTransaction(deps, async (tx) => {
    if (await hasAdministrator(tx, isLoopback(deps.config.host))) return null
    const createdAt = deps.now()
    await insertPlaceholder(tx, {
      email: placeholderEmail,
      name: 'First administrator',
      role: 'administrator',
      createdAt,
    })
    const { id } = (await findRecipient(tx, placeholderEmail))!
    return makeOnlyLink(tx, deps, id, 'first-administrator')
  })
}
