import { existsSync, mkdirSync, renameSync, rmSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { withArchive } from './archive.mjs'
import { openDatabase } from './databases.mjs'
import { runCommand } from './lifecycle.mjs'
import { loadDump, query } from './mariadb-client.mjs'
import { debianPackages, installMissing, takeDataFolder } from './prepare.mjs'
import { SetupProblem } from './problem.mjs'
import { dumpBefore, pendingMigrations } from './schema.mjs'
import { readSettings } from './settings.mjs'
import { makeSteps } from './steps.mjs'

/**
 * @typedef {import('./mariadb-client.mjs').Reach} Reach
 * @typedef {import('./steps.mjs').Steps} Steps
 */

/** `npm run restore -- FILE [--replace]`: into an empty data folder, or in place of what is there. */
await runCommand(async (life) => {
  const args = process.argv.slice(2)
  const file = args.find((arg) => !arg.startsWith('--'))
  if (!file) throw new SetupProblem('Name the file to restore: npm run restore -- basinbook.tar.gz')
  const settings = readSettings(process.env)
  const steps = makeSteps()
  takeDataFolder(settings, 'restore', life)
  await installMissing(debianPackages(settings), steps, life.stopping)
  await withArchive(file, settings.dataDir, async ({ manifest, dump, storage }) => {
    pendingMigrations(manifest.schema)
    const database = await steps.step('Opening the database', () => openDatabase(settings))
    life.onClose(database.stop)
    await clear(database.reach, settings, args.includes('--replace'), steps)
    await steps.step(`Restoring the state of ${manifest.madeAt}`, () => loadDump(database.reach, dump))
    if (manifest.storage === 'folder') replaceStorage(settings.dataDir, storage)
    else steps.say('Its files are in S3 and were not part of the backup.')
  })
  steps.say('Restored. npm start brings the database up to date if the backup is older than the program.')
})

/**
 * Makes room, after a dump of what is there.
 * @param {Reach} reach
 * @param {{ dataDir: string }} settings
 * @param {boolean} replace
 * @param {Steps} steps
 */
async function clear(reach, { dataDir }, replace, { say, step }) {
  await refuseWhileInUse(reach)
  const tables = (await query(reach, 'SHOW TABLES')).map(([name]) => name)
  if (tables.length === 0 && !existsSync(join(dataDir, 'storage'))) return
  if (!replace) {
    throw new SetupProblem(
      'There are data already. To replace them (what is there now is kept in the folder backups), add --replace: npm run restore -- FILE --replace',
    )
  }
  if (tables.length === 0) return
  const kept = await step('Keeping the present database', () => dumpBefore(reach, dataDir, 'restore'))
  say(`  in ${kept}`)
  await query(reach, `SET FOREIGN_KEY_CHECKS = 0; DROP TABLE ${tables.map((name) => `\`${name}\``).join(', ')}`)
}

/**
 * A server elsewhere may be in use by processes that the lock of this data folder says nothing about.
 * @param {Reach} reach
 */
async function refuseWhileInUse(reach) {
  const others = 'SELECT COUNT(*) FROM information_schema.PROCESSLIST WHERE DB = DATABASE() AND ID <> CONNECTION_ID()'
  const [[count] = []] = await query(reach, others)
  if (Number(count) > 0)
    throw new SetupProblem(`The database is in use by ${count} connections. Stop the program that uses it first.`)
}

/**
 * The files that were there are kept once, as the database is.
 * @param {string} dataDir
 * @param {string | null} restored null: the backup has no files
 */
function replaceStorage(dataDir, restored) {
  const storage = join(dataDir, 'storage')
  const kept = join(dataDir, 'backups', 'storage-before-restore')
  if (existsSync(storage)) {
    mkdirSync(dirname(kept), { recursive: true, mode: 0o700 })
    rmSync(kept, { recursive: true, force: true })
    renameSync(storage, kept)
  }
  if (restored) renameSync(restored, storage)
}
