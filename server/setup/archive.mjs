import { chmodSync, existsSync, mkdirSync, mkdtempSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { inRoot } from './places.mjs'
import { dumpDatabase } from './mariadb-client.mjs'
import { run } from './processes.mjs'
import { CommandFailed, SetupProblem } from './problem.mjs'
import { appliedMigrations } from './schema.mjs'

/**
 * A backup is one tar.gz: manifest.json, database.sql.gz and the folder storage.
 * @typedef {object} Manifest
 * @property {'basinbook-backup'} format
 * @property {1} version
 * @property {string} madeAt
 * @property {string} program The version that made it.
 * @property {number[]} schema The migrations that its database has had.
 * @property {'folder' | 's3'} storage Files in S3 are the service's to back up; the archive has none.
 */

const dumpName = 'database.sql.gz'
const manifestName = 'manifest.json'

/**
 * Runs an action with a private folder beside the data, which is removed afterwards.
 * @template T
 * @param {string} dataDir
 * @param {(folder: string) => Promise<T>} action
 * @returns {Promise<T>}
 */
async function inStaging(dataDir, action) {
  mkdirSync(dataDir, { recursive: true, mode: 0o700 })
  const folder = mkdtempSync(join(dataDir, 'staging-'))
  try {
    return await action(folder)
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

/**
 * Writes a backup. The database comes first: a file that is attached meanwhile is then only an extra, whereas a record
 * without its file would be a loss.
 * @param {string} file
 * @param {{ dataDir: string, reach: import('./mariadb-client.mjs').Reach, storage: Manifest['storage'] }} from
 */
export function writeArchive(file, { dataDir, reach, storage }) {
  return inStaging(dataDir, async (folder) => {
    await dumpDatabase(reach, join(folder, dumpName))
    const manifest = { ...newManifest(storage), schema: await appliedMigrations(reach) }
    writeFileSync(join(folder, manifestName), `${JSON.stringify(manifest, null, 2)}\n`)
    const stored = storage === 'folder' && existsSync(join(dataDir, 'storage')) ? ['-C', dataDir, 'storage'] : []
    mkdirSync(dirname(resolve(file)), { recursive: true })
    const part = `${resolve(file)}.part`
    try {
      writeFileSync(part, '', { mode: 0o600 })
      chmodSync(part, 0o600) // it holds everybody's data, whatever an earlier file of that name allowed
      await tolerateChange(['-czf', part, '-C', folder, manifestName, dumpName, ...stored])
      renameSync(part, file)
    } finally {
      rmSync(part, { force: true })
    }
  })
}

/**
 * tar ends with 1 when a file went away while it read; the archive is whole without it.
 * @param {string[]} args
 */
const tolerateChange = (args) =>
  run('tar', args).catch((error) => {
    if (!(error instanceof CommandFailed) || error.status !== 1) throw error
  })

/**
 * @param {Manifest['storage']} storage
 * @returns {Manifest}
 */
const newManifest = (storage) => ({
  format: 'basinbook-backup',
  version: 1,
  madeAt: new Date().toISOString(),
  program: JSON.parse(readFileSync(inRoot('package.json'), 'utf8')).version,
  schema: [],
  storage,
})

/**
 * Unpacks a backup, checks it and gives it to an action.
 * @template T
 * @param {string} file
 * @param {string} dataDir
 * @param {(unpacked: { manifest: Manifest, dump: string, storage: string | null }) => Promise<T>} action
 * @returns {Promise<T>}
 */
export function withArchive(file, dataDir, action) {
  if (!existsSync(file)) throw new SetupProblem(`There is no file ${file}.`)
  return inStaging(dataDir, async (folder) => {
    await run('tar', ['-xzf', resolve(file), '--no-same-owner', '-C', folder]).catch((error) => {
      throw new SetupProblem(`${file} cannot be unpacked; it is damaged or no backup.\n${error.message}`)
    })
    const storage = join(folder, 'storage')
    return action({
      manifest: readManifest(file, folder),
      dump: join(folder, dumpName),
      storage: existsSync(storage) ? storage : null,
    })
  })
}

/**
 * @param {string} file
 * @param {string} folder
 * @returns {Manifest}
 */
function readManifest(file, folder) {
  const path = join(folder, manifestName)
  const manifest = existsSync(path) ? JSON.parse(readFileSync(path, 'utf8')) : {}
  if (manifest.format !== 'basinbook-backup' || !existsSync(join(folder, dumpName))) {
    throw new SetupProblem(`${file} is not a backup made by npm run backup.`)
  }
  if (manifest.version === 1) return manifest
  throw new SetupProblem(`${file} was made by a newer version of Basinbook (${manifest.program}).`)
}
