import { join } from 'node:path'
import { aborted } from './lifecycle.mjs'
import { byAddress, query } from './mariadb-client.mjs'
import { startMariadb } from './mariadb.mjs'
import { CommandFailed, SetupProblem } from './problem.mjs'
import { keepRunning } from './supervise.mjs'

/**
 * The database of an installation: our own, or the one at DATABASE_URL.
 * @typedef {object} InstallationDatabase
 * @property {string} url
 * @property {import('./mariadb-client.mjs').Reach} reach
 * @property {(options: { stopping: AbortSignal, say: (line: string) => void }) => Promise<void>} keepRunning
 *   Starts it again when it crashes, until told to stop.
 * @property {() => Promise<void>} stop
 */

/** @param {string} dataDir */
export const databaseFolder = (dataDir) => join(dataDir, 'database')

/**
 * @param {import('./settings.mjs').Settings} settings
 * @returns {Promise<InstallationDatabase>}
 */
export const openDatabase = ({ databaseUrl, dataDir }) =>
  databaseUrl ? reachDatabase(databaseUrl) : ownDatabase(databaseFolder(dataDir))

/**
 * @param {string} folder
 * @returns {Promise<InstallationDatabase>}
 */
async function ownDatabase(folder) {
  let server = await startMariadb(folder)
  const { port } = server
  async function again() {
    server = await startMariadb(folder)
    if (server.port === port) return server
    throw new SetupProblem(`The database's port ${port} was taken by another program. Run npm start again.`)
  }
  let first = true
  const start = () => {
    if (!first) return again()
    first = false
    return server
  }
  return {
    url: server.url(),
    reach: server.reach,
    keepRunning: (options) => keepRunning('The database', start, options),
    stop: () => server.stop(),
  }
}

const oldestVersion = [10, 6]

/**
 * @param {string} url
 * @returns {Promise<InstallationDatabase>}
 */
async function reachDatabase(url) {
  const reach = byAddress(url)
  const version = await versionOf(reach, url)
  const [major = 0, minor = 0] = version.split('.').map((part) => parseInt(part, 10))
  const [leastMajor = 0, leastMinor = 0] = oldestVersion
  if (!/mariadb/i.test(version) || major < leastMajor || (major === leastMajor && minor < leastMinor)) {
    throw new SetupProblem(
      `The server at DATABASE_URL is ${version}. MariaDB ${oldestVersion.join('.')} or newer is needed.`,
    )
  }
  return { url, reach, keepRunning: ({ stopping }) => aborted(stopping), stop: async () => {} }
}

/**
 * @param {import('./mariadb-client.mjs').Reach} reach
 * @param {string} url
 */
async function versionOf(reach, url) {
  try {
    const [[version = ''] = []] = await query(reach, 'SELECT VERSION()')
    return version
  } catch (error) {
    if (!(error instanceof CommandFailed)) throw error
    throw new SetupProblem(
      `The database at ${new URL(url).host} does not answer: ${error.output.trim()}. Check DATABASE_URL, that the server runs, and that it may be reached from here.`,
    )
  }
}
