import { z } from 'zod'
import { resetMail } from '#shared/words/mails.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import type { JobHandler } from '../../jobs/jobs.ts'
import { queueMail } from '../../mail/queue-mail.ts'
import { createRegionService } from '../region/region.service.ts'
import { makeLink } from './links.ts'
import { countTokens, findRecipient } from './password.repository.ts'

const payload = z.object({ email: z.string() })
const hour = 3_600_000
const mailsPerHour = 5

/**
 * Mails a link to the person behind an address, if there is one. A job, so that the request takes the same time and
 * gets the same answer whether or not the address is known.
 */
export function mailResetLink(deps: Deps): JobHandler {
  const region = createRegionService(deps)
  return async (input) => {
    const { email } = payload.parse(input)
    await inTransaction(deps, async (tx) => {
      const person = await findRecipient(tx, email)
      if (!person?.active || person.demo) return
      const since = new Date(deps.now().getTime() - hour)
      if ((await countTokens(tx, person.id, 'reset', since)) >= mailsPerHour) return
      const link = await makeLink(tx, deps, person.id, 'reset')
      const { name: regionName } = await region.get(tx)
      await queueMail(tx, deps, { to: person.email, ...resetMail({ region: regionName, name: person.name, link }) })
    })
  }
}
