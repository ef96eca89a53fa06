import { sql, type SQL } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'

/** The driver answers with the rows first. */
const rowsOf = <Row>(result: unknown): Row[] => (result as [Row[]])[0]

/** When the newest migration of the database was made, ms; null before the first. */
export async function newestMigration(executor: Executor): Promise<number | null> {
  const found = await executor.execute(sql`select max(created_at) as newest from __drizzle_migrations`)
  const newest = rowsOf<{ newest: number | string | null }>(found)[0]?.newest
  return newest == null ? null : Number(newest)
}

async function shown(executor: Executor, query: SQL): Promise<string | null> {
  const found = await executor.execute(query)
  return rowsOf<{ Value: string }>(found)[0]?.Value ?? null
}

/** Whether this node of a cluster takes writes; null outside a cluster, where the server says OFF to both. */
export async function clusterReady(executor: Executor): Promise<boolean | null> {
  const clustered = await shown(executor, sql`show global variables like 'wsrep_on'`)
  if (clustered !== 'ON') return null
  return (await shown(executor, sql`show global status like 'wsrep_ready'`)) === 'ON'
}
