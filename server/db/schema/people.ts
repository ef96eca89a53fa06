import { boolean, index, int, json, mysqlEnum, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { id, instant, reference, rowVersion } from './columns.ts'

export const users = mysqlTable(
  'users',
  {
    id: id(),
    email: varchar({ length: 254 }).notNull(),
    name: varchar({ length: 120 }).notNull(),
    role: mysqlEnum(['reader', 'analyst', 'steward', 'administrator']).notNull(),
    mayReview: boolean().notNull().default(false),
    active: boolean().notNull().default(true),
    /** Demo accounts have known passwords: they are refused unless the server listens on loopback. */
    demo: boolean().notNull().default(false),
    passwordHash: varchar({ length: 255 }),
    preferences: json().$type<Record<string, unknown>>(),
    createdAt: instant().notNull(),
    lastSeenAt: instant(),
    rowVersion: rowVersion(),
  },
  (table) => [uniqueIndex('users_email').on(table.email)],
)

export const sessions = mysqlTable(
  'sessions',
  {
    id: varchar({ length: 128 }).primaryKey(),
    userId: reference(),
    data: json().$type<Record<string, unknown>>().notNull(),
    createdAt: instant().notNull(),
    expiresAt: instant().notNull(),
  },
  (table) => [index('sessions_user').on(table.userId), index('sessions_expiry').on(table.expiresAt)],
)

/** Invitations and password resets: single use, only the hash is kept. */
export const passwordTokens = mysqlTable(
  'password_tokens',
  {
    id: id(),
    userId: reference().notNull(),
    purpose: mysqlEnum(['invitation', 'reset', 'first-administrator']).notNull(),
    tokenHash: varchar({ length: 64 }).notNull(),
    expiresAt: instant().notNull(),
    usedAt: instant(),
    createdAt: instant().notNull(),
  },
  (table) => [uniqueIndex('password_tokens_hash').on(table.tokenHash), index('password_tokens_user').on(table.userId)],
)

export const rateLimits = mysqlTable(
  'rate_limits',
  {
    id: varchar({ length: 190 }).primaryKey(),
    hits: int().notNull(),
    resetAt: instant().notNull(),
  },
  (table) => [index('rate_limits_reset').on(table.resetAt)],
)
