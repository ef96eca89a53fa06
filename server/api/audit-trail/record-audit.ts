import type { AuditAction } from '#shared/contracts/audit-trail.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { insertAudit } from './audit-trail.repository.ts'

export interface AuditRecord {
  /** Who did it; null for the program itself. */
  viewer: Pick<Viewer, 'id' | 'name'> | null
  at: Date
  action: AuditAction
  subject: string
  subjectId?: number | null
  /** What changed, for a person to read later; never a secret. */
  details?: Record<string, unknown>
}

/** Writes one line of the audit trail; belongs in the transaction of the change itself. */
export async function recordAudit(executor: Executor, record: AuditRecord): Promise<void> {
  const { viewer, at, action, subject, subjectId = null, details = {} } = record
  const actor = { actorId: viewer?.id ?? null, actorName: viewer?.name ?? 'Basinbook' }
  await insertAudit(executor, { at, ...actor, action, subject, subjectId, details })
}
