import type { OutboxItem, OutboxMessage, OutboxQuery } from '#shared/contracts/outbox.ts'
import type { Deps } from '../../deps.ts'
import { notFound } from '../../errors.ts'
import { findMail } from '../../mail/outbox.repository.ts'
import { pageOf } from '../page-of.ts'
import { countMail, listMail, type MailRow } from './outbox.repository.ts'

const itemOf = ({ id, recipient, subject, state, error, createdAt, sentAt }: MailRow): OutboxItem => ({
  id,
  recipient,
  subject,
  state,
  error,
  createdAt: createdAt.toISOString(),
  sentAt: sentAt?.toISOString() ?? null,
})

export function createOutboxService({ connection: { db } }: Deps) {
  return {
    async list(query: OutboxQuery) {
      const [rows, total] = await Promise.all([listMail(db, query), countMail(db, query)])
      return pageOf(rows.map(itemOf), total, query)
    },

    async message(id: number): Promise<OutboxMessage> {
      const row = await findMail(db, id)
      if (!row) throw notFound()
      return { ...itemOf(row), body: row.body }
    },
  }
}
