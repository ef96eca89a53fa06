import { existsSync, statSync } from 'node:fs'
import { userInfo } from 'node:os'
import { databaseFolder, openDatabase } from './databases.mjs'
import { runCommand } from './lifecycle.mjs'
import { lockHolder } from './locks.mjs'
import { bySocket } from './mariadb-client.mjs'
import { readAccess } from './mariadb-files.mjs'
import { debianPackages, installMissing, lockFile, takeDataFolder } from './prepare.mjs'
import { SetupProblem } from './problem.mjs'
import { readSettings } from './settings.mjs'
import { makeSteps } from './steps.mjs'
import { writeArchive } from './archive.mjs'

/**
 * @typedef {import('./settings.mjs').Settings} Settings
 * @typedef {import('./lifecycle.mjs').Life} Life
 */

/** `npm run backup -- FILE`: database and files in one archive, while the program runs or not. */
await runCommand(async (life) => {
  const [file] = process.argv.slice(2)
  if (!file) throw new SetupProblem('Name the file to write: npm run backup -- basinbook.tar.gz')
  const settings = readSettings(process.env)
  const steps = makeSteps()
  await installMissing(debianPackages(settings), steps, life.stopping)
  const reach = await reachDatabase(settings, life)
  const storage = process.env.S3_BUCKET?.trim() ? 's3' : 'folder'
  await steps.step(`Writing ${file}`, () => writeArchive(file, { dataDir: settings.dataDir, reach, storage }))
  steps.say(`${file}: ${(statSync(file).size / 1e6).toFixed(1)} MB`)
  if (storage === 's3') steps.say('The files in S3 are not in it: back them up with the means of that service.')
})

/**
 * The running database, or the resting one started for the purpose.
 * @param {Settings} settings
 * @param {Life} life
 */
async function reachDatabase(settings, life) {
  const { dataDir, databaseUrl } = settings
  if (databaseUrl) return (await openDatabase(settings)).reach
  const folder = databaseFolder(dataDir)
  if (!existsSync(folder)) throw new SetupProblem(`There is nothing to back up in ${dataDir}.`)
  const holder = lockHolder(lockFile(dataDir))
  if (holder?.purpose === 'run') return runningDatabase(folder)
  takeDataFolder(settings, 'backup', life)
  const database = await openDatabase(settings)
  life.onClose(database.stop)
  return database.reach
}

/** @param {string} folder */
function runningDatabase(folder) {
  const access = readAccess(folder)
  if (!access?.socket)
    throw new SetupProblem('The database is just being made. Try again when npm start says that it is ready.')
  return bySocket(access.socket, access.database, userInfo().username)
}
