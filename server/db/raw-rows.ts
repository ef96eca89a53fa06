import type { SQL } from 'drizzle-orm'
import type { Executor } from './client.ts'

/** Rows of a statement that the query builder cannot say; its types know nothing of them, so that the caller names them. */
export async function rawRows<Row>(executor: Executor, statement: SQL): Promise<Row[]> {
  const [rows] = (await executor.execute(statement)) as unknown as [Row[]]
  return rows
}
