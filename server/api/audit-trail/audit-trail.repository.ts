import { and, desc, eq, gte, like, lt, or } from 'drizzle-orm'
import type { AuditQuery } from '#shared/contracts/audit-trail.ts'
import type { Executor } from '../../db/client.ts'
import { containing } from '../../db/like.ts'
import { auditTrail } from '../../db/schema/index.ts'

export type AuditRow = typeof auditTrail.$inferSelect

export const insertAudit = (executor: Executor, row: typeof auditTrail.$inferInsert) =>
  executor.insert(auditTrail).values(row)

const underArea = (area: string) => `${containing(area).slice(1, -1)}/%`

const matching = ({ actorId, actor, action, subject, subjectId, from, to }: AuditQuery) =>
  and(
    actorId === undefined ? undefined : eq(auditTrail.actorId, actorId),
    actor ? like(auditTrail.actorName, containing(actor)) : undefined,
    action ? or(eq(auditTrail.action, action), like(auditTrail.action, underArea(action))) : undefined,
    subject ? eq(auditTrail.subject, subject) : undefined,
    subjectId === undefined ? undefined : eq(auditTrail.subjectId, subjectId),
    from ? gte(auditTrail.at, new Date(from)) : undefined,
    to ? lt(auditTrail.at, new Date(to)) : undefined,
  )

export const listAudit = (executor: Executor, query: AuditQuery): Promise<AuditRow[]> =>
  executor
    .select()
    .from(auditTrail)
    .where(matching(query))
    .orderBy(desc(auditTrail.at), desc(auditTrail.id))
    .limit(query.limit)
    .offset(query.offset)

export const countAudit = (executor: Executor, query: AuditQuery): Promise<number> =>
  executor.$count(auditTrail, matching(query))
