import { z } from 'zod'
import type { Deps } from '../../deps.ts'
import { findMail, markFailed, markSent } from '../../mail/outbox.repository.ts'
import type { JobHandler } from '../jobs.ts'

const payload = z.object({ id: z.int() })

/** Once a mail server has a message, its one-time link is nobody's but the recipient's. */
const withoutLink = (text: string) => text.replace(/#[\w-]{43}$/gm, '#(link removed once sent)')

/** Delivers one outbox message; a message that was sent before is not sent twice. */
export function deliverMail({ connection: { db }, config, mail, now }: Deps): JobHandler {
  return async (input) => {
    const { id } = payload.parse(input)
    const message = await findMail(db, id)
    if (!message || message.state === 'sent') return
    try {
      await mail.send({ to: message.recipient, subject: message.subject, text: message.body })
    } catch (error) {
      await markFailed(db, id, error instanceof Error ? error.message : String(error))
      throw error
    }
    await markSent(db, id, now(), config.smtpUrl ? withoutLink(message.body) : message.body)
  }
}
