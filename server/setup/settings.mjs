import { mkdirSync, statfsSync } from 'node:fs'
import { resolve } from 'node:path'
import { SetupProblem } from './problem.mjs'

/**
 * What is needed before the packages are there that check the configuration properly.
 * @typedef {object} Settings
 * @property {string} dataDir
 * @property {string | null} databaseUrl null: a database of our own
 * @property {boolean} demo Unless told, the demo region belongs to a database of our own only.
 */

/**
 * @param {NodeJS.ProcessEnv} env
 * @returns {Settings}
 */
export function readSettings(env) {
  const databaseUrl = env.DATABASE_URL?.trim() || null
  const demo = env.DEMO?.trim()
  return {
    dataDir: resolve(env.DATA_DIR?.trim() || '.data'),
    databaseUrl: databaseUrl?.replace(/^mariadb:/, 'mysql:') ?? null,
    demo: demo ? !/^(0|false|no|off)$/i.test(demo) : !databaseUrl,
  }
}

/**
 * The environment of every program that the parent starts.
 * @param {NodeJS.ProcessEnv} env
 * @param {Settings} settings
 * @param {string} url of the database
 * @returns {NodeJS.ProcessEnv}
 */
export const childEnvironment = (env, settings, url) => ({
  ...env,
  DATA_DIR: settings.dataDir,
  DATABASE_URL: url,
  DEMO: settings.demo ? '1' : '0',
})

/**
 * Checks the whole configuration with the application's own rules, before anything slow begins.
 * @param {NodeJS.ProcessEnv} env
 * @param {Settings} settings
 * @returns {Promise<import('../config/config.ts').Config>}
 */
export async function checkedConfig(env, settings) {
  const { tsImport } = await import('tsx/esm/api')
  /** @type {typeof import('../config/config.ts')} */
  const { ConfigError, parseConfig } = await tsImport('../config/config.ts', import.meta.url)
  try {
    return parseConfig(childEnvironment(env, settings, settings.databaseUrl ?? 'mysql://basinbook@127.0.0.1/basinbook'))
  } catch (error) {
    throw error instanceof ConfigError ? new SetupProblem(error.message) : error
  }
}

/**
 * Makes the data folder, which must be writable and have room.
 * @param {string} dataDir
 * @param {number} leastFree bytes
 */
export function prepareDataFolder(dataDir, leastFree = 500e6) {
  mkdirSync(dataDir, { recursive: true, mode: 0o700 })
  const { bavail, bsize } = statfsSync(dataDir)
  const free = bavail * bsize
  if (free >= leastFree) return
  throw new SetupProblem(
    `The disk with the data folder ${dataDir} has ${Math.floor(free / 1e6)} MB left, and at least ${leastFree / 1e6} MB are needed. Free some space, or choose a folder on another disk: DATA_DIR=/some/folder npm start`,
  )
}
