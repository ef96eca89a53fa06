import { join } from 'node:path'
import { installPackages, missingPackages } from './debian.mjs'
import { openDatabase } from './databases.mjs'
import { checkedPort } from './free-port.mjs'
import { takeLock } from './locks.mjs'
import { query } from './mariadb-client.mjs'
import { installNodePackages, nodePackagesMatch } from './node-packages.mjs'
import { inRoot, root } from './places.mjs'
import { SetupProblem } from './problem.mjs'
import { endGroup, endProcess, ended, processesWith, startChild } from './processes.mjs'
import { bringUpToDate } from './schema.mjs'
import { checkedConfig, childEnvironment, prepareDataFolder, readSettings } from './settings.mjs'

/**
 * @typedef {import('./settings.mjs').Settings} Settings
 * @typedef {import('./steps.mjs').Steps} Steps
 * @typedef {import('./lifecycle.mjs').Life} Life
 */

/** @param {string} dataDir */
export const lockFile = (dataDir) => join(dataDir, 'in-use')

/**
 * Takes the data folder for this process.
 * @param {Settings} settings
 * @param {'run' | 'restore' | 'backup'} purpose
 * @param {Life} life
 */
export function takeDataFolder({ dataDir }, purpose, life) {
  prepareDataFolder(dataDir)
  const refusal = (/** @type {import('./locks.mjs').Holder} */ { pid }) =>
    `The data folder ${dataDir} is in use by process ${pid}. Stop that one first (kill ${pid}), or choose another folder: DATA_DIR=/some/folder npm start`
  life.onClose(takeLock(lockFile(dataDir), purpose, refusal))
}

/**
 * Installs what is missing of Debian's and of npm's packages.
 * @param {string[]} debian
 * @param {Steps} steps
 * @param {AbortSignal} [stopping]
 */
export async function installMissing(debian, { step }, stopping) {
  const missing = missingPackages(debian)
  if (missing.length > 0) await step(`Installing ${missing.join(', ')}`, () => installPackages(missing))
  if (!nodePackagesMatch()) await step('Installing the npm packages', () => installNodePackages(stopping))
}

/** @param {Settings} settings */
export const debianPackages = ({ databaseUrl }) => [...(databaseUrl ? [] : ['mariadb-server-core']), 'mariadb-client']

/** Names a data folder among the arguments of the application, so that one left behind can be found. */
export const marker = (/** @type {string} */ dataDir) => `--data-folder=${dataDir}`

/**
 * Everything up to a migrated, seeded database: what `npm start` and `npm run dev` share.
 * @param {Steps} steps
 * @param {Life} life
 */
export async function prepare(steps, life) {
  const settings = readSettings(process.env)
  takeDataFolder(settings, 'run', life)
  await installMissing(debianPackages(settings), steps, life.stopping)
  const config = await checkedConfig(process.env, settings)
  for (const pid of processesWith(marker(settings.dataDir))) await endProcess(pid, 15_000)
  await checkedPort(config.port, config.host) // better known now than after minutes of seeding
  const database = await startDatabase(settings, steps, life)
  const env = childEnvironment(process.env, settings, database.url)
  if (settings.demo && !(await isSeeded(database.reach))) {
    await steps.step('Filling in the demo region', () => seed(env, steps, life.stopping))
  }
  return { settings, config, database, env }
}

/**
 * @param {Settings} settings
 * @param {Steps} steps
 * @param {Life} life
 */
async function startDatabase(settings, { step, say }, { stopping, onClose }) {
  const title = settings.databaseUrl ? 'Reaching the database' : 'Starting the database'
  const database = await step(title, () => openDatabase(settings))
  onClose(database.stop)
  stopping.throwIfAborted()
  const { dataDir } = settings
  await step('Bringing the database up to date', () =>
    bringUpToDate(database.reach, database.url, { dataDir, say, signal: stopping }),
  )
  return database
}

/**
 * Whether the seed's own record says that it is done: asked here, that takes a hundredth of the seed's start.
 * @param {import('./mariadb-client.mjs').Reach} reach
 */
async function isSeeded(reach) {
  return (await query(reach, "SELECT 1 FROM jobs WHERE kind = 'seed-demo' AND state = 'done' LIMIT 1")).length > 0
}

/**
 * The seed knows by itself what it has done already; it goes on where it was interrupted.
 * @param {NodeJS.ProcessEnv} env
 * @param {Steps} steps
 * @param {AbortSignal} stopping
 */
async function seed(env, { say }, stopping) {
  const child = startChild(process.execPath, ['--import', 'tsx', inRoot('server/db/seed/index.ts')], {
    cwd: root,
    env,
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  child.stdout?.setEncoding('utf8').on('data', (text) => say(`  ${text.trimEnd().replaceAll('\n', '\n  ')}`))
  const stop = () => void endGroup(child, 10_000)
  stopping.addEventListener('abort', stop)
  const status = await ended(child)
  stopping.removeEventListener('abort', stop)
  if (status !== 0)
    throw new SetupProblem(
      `Filling in the demo region failed (${status}); its messages are above. The next start goes on from there; DEMO=0 npm start leaves it out.`,
    )
}
