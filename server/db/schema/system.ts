import { boolean, index, int, json, mysqlEnum, mysqlTable, text, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { id, instant, reference } from './columns.ts'

export const jobs = mysqlTable(
  'jobs',
  {
    id: id(),
    kind: varchar({ length: 40 }).notNull(),
    payload: json().$type<unknown>().notNull(),
    state: mysqlEnum(['waiting', 'running', 'done', 'failed', 'cancelled']).notNull(),
    /** Two jobs with one key never wait at the same time. */
    uniqueKey: varchar({ length: 120 }),
    done: int().notNull().default(0),
    total: int(),
    message: varchar({ length: 300 }),
    result: json().$type<unknown>(),
    errorCode: varchar({ length: 80 }),
    errorDetail: text(),
    attempts: int().notNull().default(0),
    maxAttempts: int().notNull().default(3),
    cancelRequested: boolean().notNull().default(false),
    claimedBy: varchar({ length: 80 }),
    heartbeatAt: instant(),
    runAt: instant().notNull(),
    createdBy: reference(),
    createdAt: instant().notNull(),
    finishedAt: instant(),
  },
  (table) => [index('jobs_ready').on(table.state, table.runAt), uniqueIndex('jobs_unique').on(table.uniqueKey)],
)

/** A name held by one process until a time: migrations, daily work. */
export const leases = mysqlTable('leases', {
  name: varchar({ length: 80 }).primaryKey(),
  holder: varchar({ length: 80 }).notNull(),
  expiresAt: instant().notNull(),
})

export const idempotencyKeys = mysqlTable(
  'idempotency_keys',
  {
    id: varchar({ length: 190 }).primaryKey(),
    requestSha256: varchar({ length: 64 }).notNull(),
    status: int(),
    response: json().$type<unknown>(),
    createdAt: instant().notNull(),
  },
  (table) => [index('idempotency_keys_age').on(table.createdAt)],
)

export const mailOutbox = mysqlTable(
  'mail_outbox',
  {
    id: id(),
    recipient: varchar({ length: 254 }).notNull(),
    subject: varchar({ length: 200 }).notNull(),
    body: text().notNull(),
    state: mysqlEnum(['waiting', 'sent', 'failed']).notNull(),
    error: text(),
    createdAt: instant().notNull(),
    sentAt: instant(),
  },
  (table) => [index('mail_outbox_created').on(table.createdAt)],
)

export const auditTrail = mysqlTable(
  'audit_trail',
  {
    id: id(),
    at: instant().notNull(),
    /** Empty for the program itself. */
    actorId: reference(),
    actorName: varchar({ length: 120 }).notNull(),
    action: varchar({ length: 60 }).notNull(),
    subject: varchar({ length: 40 }).notNull(),
    subjectId: reference(),
    details: json().$type<Record<string, unknown>>().notNull(),
  },
  (table) => [
    index('audit_trail_at').on(table.at),
    index('audit_trail_subject').on(table.subject, table.subjectId),
    index('audit_trail_actor').on(table.actorId),
  ],
)
