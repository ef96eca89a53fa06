import type { PasswordChange, Preferences } from '#shared/contracts/account.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { passwordChangedMail } from '#shared/words/mails.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, fieldError } from '../../errors.ts'
import { queueMail } from '../../mail/queue-mail.ts'
import { endSessionsOf } from '../../middleware/session.repository.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import type { RegionService } from '../region/region.service.ts'
import { hashPassword, passwordFits } from '../session/passwords.ts'
import { findCredentials, savePassword, savePreferences } from './account.repository.ts'

/** @throws AppError when a password gives itself away by the address. */
export function checkPassword(path: string, password: string, email: string): void {
  if (password.trim().toLowerCase() === email) throw fieldError(path, 'password/like-email')
}

export function createAccountService(deps: Deps, region: RegionService) {
  const { connection, now } = deps

  return {
    async savePreferences({ id }: Viewer, wanted: Preferences): Promise<Preferences> {
      await savePreferences(connection.db, id!, wanted)
      return wanted
    },

    /** Ends all sessions of the person; the caller begins a new one for who asked. */
    async changePassword(viewer: Viewer, { currentPassword, newPassword }: PasswordChange): Promise<void> {
      const id = viewer.id!
      const found = await findCredentials(connection.db, id)
      if (!found) throw new AppError('session/required')
      if (!(await passwordFits(found.passwordHash, currentPassword)))
        throw fieldError('currentPassword', 'password/wrong')
      checkPassword('newPassword', newPassword, found.email)
      const hash = await hashPassword(newPassword)
      await inTransaction(deps, async (tx) => {
        await savePassword(tx, id, hash)
        await endSessionsOf(tx, id)
        const words = passwordChangedMail({ region: (await region.get(tx)).name, name: found.name })
        await queueMail(tx, deps, { to: found.email, ...words })
        await recordAudit(tx, { viewer, at: now(), action: 'password/change', subject: 'person', subjectId: id })
      })
    },
  }
}
