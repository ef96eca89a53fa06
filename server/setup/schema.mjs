import { mkdirSync, readFileSync, readdirSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { dumpDatabase, query } from './mariadb-client.mjs'
import { inRoot, root } from './places.mjs'
import { run } from './processes.mjs'
import { SetupProblem } from './problem.mjs'

/**
 * @typedef {import('./mariadb-client.mjs').Reach} Reach
 * @typedef {{ tag: string, when: number }} Migration
 */

const dumpsKept = 5

/** @returns {Migration[]} those of this program, in order */
export const knownMigrations = () => JSON.parse(readFileSync(inRoot('drizzle/meta/_journal.json'), 'utf8')).entries

/**
 * @param {Reach} reach
 * @returns {Promise<number[]>} the times that name the migrations which the database has had
 */
export async function appliedMigrations(reach) {
  const tables = await query(reach, "SHOW TABLES LIKE '\\_\\_drizzle\\_migrations'")
  if (tables.length === 0) return []
  const rows = await query(reach, 'SELECT created_at FROM __drizzle_migrations ORDER BY created_at')
  return rows.map(([when]) => Number(when))
}

/**
 * What is left to do for a database that has had these migrations.
 * @param {number[]} applied
 * @param {Migration[]} known
 * @returns {Migration[]}
 * @throws {SetupProblem} when it has had one that this program does not know: a newer program wrote it
 */
export function pendingMigrations(applied, known = knownMigrations()) {
  const strange = applied.filter((when) => !known.some((migration) => migration.when === when))
  if (strange.length > 0) {
    throw new SetupProblem(
      'The database was written by a newer version of Basinbook than this one. Start that version, or restore a backup made before the upgrade.',
    )
  }
  return known.filter(({ when }) => !applied.includes(when))
}

/**
 * Brings the database up to date. One that holds data is dumped first.
 * @param {Reach} reach
 * @param {string} url
 * @param {{ dataDir: string, say: (line: string) => void, signal?: AbortSignal }} options
 * @returns {Promise<number>} how many migrations it took
 */
export async function bringUpToDate(reach, url, { dataDir, say, signal }) {
  const applied = await appliedMigrations(reach)
  const pending = pendingMigrations(applied)
  if (pending.length === 0) return 0
  if (applied.length > 0) say(`  Kept the database as it was in ${await dumpBefore(reach, dataDir, 'migration')}`)
  const env = { ...process.env, DATABASE_URL: url }
  await run(process.execPath, ['--import', 'tsx', inRoot('server/db/migrate.ts')], { cwd: root, env, signal })
  return pending.length
}

/**
 * A dump in the data folder, of which the newest few are kept.
 * @param {Reach} reach
 * @param {string} dataDir
 * @param {string} event
 * @returns {Promise<string>} the file
 */
export async function dumpBefore(reach, dataDir, event) {
  const folder = join(dataDir, 'backups')
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  const prefix = `before-${event}-`
  const file = join(folder, `${prefix}${new Date().toISOString().replaceAll(':', '-')}.sql.gz`)
  await dumpDatabase(reach, file)
  const dumps = readdirSync(folder).filter((name) => name.startsWith(prefix) && name.endsWith('.sql.gz'))
  for (const name of dumps.sort().slice(0, -dumpsKept)) rmSync(join(folder, name))
  return file
}
