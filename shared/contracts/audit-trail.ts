import { z } from 'zod'
import { instant, listOf, paging, recordId } from './common.ts'

/** Everything that is recorded, as `area/what`; the words are in shared/words/audit-actions.ts. */
export type AuditAction =
  | 'adopted-values/withdraw'
  | `analyses/${'create' | 'delete' | 'edit' | 'report' | 'submit' | 'take-back'}`
  | 'aquifer-units/create'
  | 'boundaries/create'
  | `corrections/${'create' | 'edit' | 'delete'}`
  | 'jobs/cancel'
  | `password/${'change' | 'set'}`
  | `other-wells/${'create' | 'edit' | 'delete'}`
  | `outside-series/${'add' | 'delete' | 'replace'}`
  | `people/${'edit' | 'invite' | 'invite-again'}`
  | `pumping-tests/${'create' | 'delete' | 'edit' | 'report'}`
  | `readings/${'add' | 'decide' | 'delete'}`
  | 'region/edit'
  | `reviews/${'accept' | 'return'}`
  | 'streams/create'
  | `visibility/${'edit' | 'lift-embargo'}`
  | `wells/${'create' | 'edit'}`

export const auditEntry = z.object({
  id: recordId,
  at: instant,
  /** Null: the program itself. */
  actorId: recordId.nullable(),
  actorName: z.string(),
  /** `area/what`, as in `people/edit`; older entries may hold one that is no longer recorded. */
  action: z.string(),
  subject: z.string(),
  subjectId: recordId.nullable(),
  details: z.record(z.string(), z.unknown()),
})
export type AuditEntry = z.infer<typeof auditEntry>

export const auditQuery = paging.extend({
  actorId: z.coerce.number().int().positive().optional(),
  /** Part of the actor's name at the time. */
  actor: z.string().trim().max(120).optional(),
  /** A whole action, or its area: `people` finds `people/edit`. */
  action: z.string().trim().max(60).optional(),
  subject: z.string().trim().max(40).optional(),
  subjectId: z.coerce.number().int().positive().optional(),
  from: instant.optional(),
  to: instant.optional(),
})
export type AuditQuery = z.infer<typeof auditQuery>

export const auditList = listOf(auditEntry)
