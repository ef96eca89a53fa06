import type { ForgottenPassword, LinkAnswer, PasswordSetting } from '#shared/contracts/password.ts'
import type { Executor } from '../../db/client.ts'
import { isDuplicate } from '../../db/retry.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { AppError, fieldError } from '../../errors.ts'
import { endSessionsOf } from '../../middleware/session.repository.ts'
import { checkPassword } from '../account/account.service.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { forgetAttempts } from '../session/attempts.ts'
import { hashPassword } from '../session/passwords.ts'
import { hashOf } from './links.ts'
import { endTokensOf, findToken, savePerson, useToken } from './password.repository.ts'

type Link = NonNullable<Awaited<ReturnType<typeof findToken>>>

/** The address and name that the account will have: given by the first administrator, known for everybody else. */
function identityOf({ purpose, person }: Link, { email, name }: PasswordSetting): { email: string; name: string } {
  if (purpose !== 'first-administrator') return { email: person.email, name: name ?? person.name }
  if (email === undefined) throw fieldError('email', 'field/required')
  if (name === undefined) throw fieldError('name', 'field/required')
  return { email, name }
}

async function saveOrRefuse(tx: Executor, id: number, set: Parameters<typeof savePerson>[2]): Promise<void> {
  try {
    await savePerson(tx, id, set)
  } catch (error) {
    throw isDuplicate(error) ? fieldError('email', 'people/address-taken') : error
  }
}

export function createPasswordService(deps: Deps) {
  const { connection, jobs, now } = deps

  async function linkOf(token: string): Promise<Link> {
    const found = await findToken(connection.db, hashOf(token), now())
    if (!found) throw new AppError('password/link-ended')
    return found
  }

  return {
    /** Answers the same to everybody; who is known is settled by the job. */
    async forgotten({ email }: ForgottenPassword): Promise<Record<string, never>> {
      await jobs.enqueue(connection.db, 'forgotten-password', { payload: { email } })
      return {}
    },

    async lookAt(token: string): Promise<LinkAnswer> {
      const { purpose, person } = await linkOf(token)
      if (purpose === 'first-administrator') return { purpose, email: null, name: null }
      return { purpose, email: person.email, name: person.name }
    },

    /** Uses the link up, ends all other links and sessions of the person, and gives the address to sign in with. */
    async set(setting: PasswordSetting): Promise<{ email: string }> {
      const link = await linkOf(setting.token)
      const { email, name } = identityOf(link, setting)
      checkPassword('password', setting.password, email)
      const passwordHash = await hashPassword(setting.password)
      const { id } = link.person
      await inTransaction(deps, async (tx) => {
        if (!(await useToken(tx, hashOf(setting.token), now()))) throw new AppError('password/link-ended')
        await endTokensOf(tx, id, now())
        await endSessionsOf(tx, id)
        await forgetAttempts(tx, email)
        await saveOrRefuse(tx, id, { email, name, passwordHash })
        const who = { viewer: { id, name }, at: now(), subject: 'person', subjectId: id }
        await recordAudit(tx, { ...who, action: 'password/set', details: { by: link.purpose } })
      })
      return { email }
    },
  }
}
