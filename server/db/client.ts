import { drizzle, type MySql2Database } from 'drizzle-orm/mysql2'
import mysql, { type Pool } from 'mysql2/promise'
import * as schema from './schema/index.ts'

export type Database = MySql2Database<typeof schema>
/** A database or an open transaction: repositories take either. */
export type Executor = Database | Parameters<Parameters<Database['transaction']>[0]>[0]

export interface Connection {
  pool: Pool
  db: Database
  close(): Promise<void>
}

/** Opens a pool whose instants are UTC. The first query fails when the database does not answer; opening does not. */
export function connect(url: string, connections = 10): Connection {
  const pool = mysql.createPool({
    uri: url,
    timezone: 'Z',
    charset: 'utf8mb4_general_ci',
    connectionLimit: connections,
    connectTimeout: 5_000,
    supportBigNumbers: true,
    enableKeepAlive: true,
  })
  const db = drizzle(pool.pool, { schema, mode: 'planetscale', casing: 'snake_case' }) as unknown as Database
  return { pool, db, close: () => pool.end() }
}
