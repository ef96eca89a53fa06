import { outboxList, outboxMessage, type OutboxQuery } from '#shared/contracts/outbox.ts'
import { api } from './client.ts'

export const fetchOutbox = (query: OutboxQuery, signal?: AbortSignal) =>
  api.get('/api/outbox', { query, response: outboxList, signal })

export const fetchOutboxMessage = (id: number, signal?: AbortSignal) =>
  api.get(`/api/outbox/${id}`, { response: outboxMessage, signal })
