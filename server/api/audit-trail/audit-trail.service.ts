import type { AuditQuery } from '#shared/contracts/audit-trail.ts'
import type { Deps } from '../../deps.ts'
import { pageOf } from '../page-of.ts'
import { countAudit, listAudit } from './audit-trail.repository.ts'

export function createAuditTrailService({ connection: { db } }: Deps) {
  return {
    async list(query: AuditQuery) {
      const [rows, total] = await Promise.all([listAudit(db, query), countAudit(db, query)])
      const items = rows.map((row) => ({ ...row, at: row.at.toISOString() }))
      return pageOf(items, total, query)
    },
  }
}
