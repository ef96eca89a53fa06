import { auditList, type AuditQuery } from '#shared/contracts/audit-trail.ts'
import { api } from './client.ts'

export const fetchAuditTrail = (query: AuditQuery, signal?: AbortSignal) =>
  api.get('/api/audit-trail', { query, response: auditList, signal })
