import { sql, type SQL } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { rawRows } from '../../db/raw-rows.ts'

/** When the newest migration of the database was made, ms; null before the first. */
export async function newestMigration(executor: Executor): Promise<number | null> {
  const statement = sql`select max(created_at) as newest from __drizzle_migrations`
  const [row] = await rawRows<{ newest: number | string | null }>(executor, statement)
  const newest = row?.newest
  return newest == null ? null : Number(newest)
}

async function shown(executor: Executor, query: SQL): Promise<string | null> {
  const [row] = await rawRows<{ Value: string }>(executor, query)
  return row?.Value ?? null
}

/** Whether this node of a cluster takes writes; null outside a cluster, where the server says OFF to both. */
export async function clusterReady(executor: Executor): Promise<boolean | null> {
  const clustered = await shown(executor, sql`show global variables like 'wsrep_on'`)
  if (clustered !== 'ON') return null
  return (await shown(executor, sql`show global status like 'wsrep_ready'`)) === 'ON'
}
