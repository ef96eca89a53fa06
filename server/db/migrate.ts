import { fileURLToPath } from 'node:url'
import { migrate } from 'drizzle-orm/mysql2/migrator'
import { connect } from './client.ts'

export const migrationsFolder = fileURLToPath(new URL('../../drizzle', import.meta.url))

/** Brings the schema of the database at `url` up to date. */
export async function migrateDatabase(url: string): Promise<void> {
  const { db, close } = connect(url, 1)
  try {
    await migrate(db, { migrationsFolder })
  } finally {
    await close()
  }
}

if (process.argv[1] === fileURLToPath(import.meta.url)) await migrateDatabase(process.env.DATABASE_URL ?? '')
