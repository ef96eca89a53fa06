import { sql } from 'drizzle-orm'
import type { Executor } from './client.ts'
import { rawRows } from './raw-rows.ts'

/** What an ordinary MariaDB takes: a thousand readings with the longest lines, or a part of a snapshot, need half. */
const leastBytes = 16 * 1024 * 1024
const megabytes = (bytes: number) => Math.floor((bytes / 1024 / 1024) * 10) / 10

/** What to change where the database takes statements that are too short for long logs; null where it does not. */
export async function packetProblem(executor: Executor): Promise<string | null> {
  const [row] = await rawRows<{ bytes: number }>(executor, sql`select @@max_allowed_packet as bytes`)
  const bytes = Number(row?.bytes)
  if (bytes >= leastBytes) return null
  return `The database takes statements of ${megabytes(bytes)} MB at most, and long logs need 16 MB: set max_allowed_packet=16M in the [mariadbd] section of its configuration and start it again`
}
