import { existsSync } from 'node:fs'
import { delimiter, join } from 'node:path'
import { run } from './processes.mjs'
import { CommandFailed, SetupProblem } from './problem.mjs'

/**
 * The Debian packages that the program may need and a file by which each is known to be there, whoever installed it.
 * None of them starts a system service.
 * @type {Record<string, string>}
 */
const signs = {
  'mariadb-server-core': 'mariadbd',
  'mariadb-client': 'mariadb-dump',
  chromium: 'chromium',
  'python3-scipy': '/usr/lib/python3/dist-packages/scipy/__init__.py',
  'r-cran-gstat': '/usr/lib/R/site-library/gstat/DESCRIPTION',
  'gdal-bin': 'gdalinfo',
}

const programFolders = [...(process.env.PATH ?? '').split(delimiter), '/usr/sbin', '/usr/local/sbin'].filter(Boolean)

/** @param {string} name a program, or the path of a file */
const isThere = (name) =>
  name.startsWith('/') ? existsSync(name) : programFolders.some((folder) => existsSync(join(folder, name)))

/**
 * @param {string[]} names
 * @returns {string[]} those that are not installed
 */
export const missingPackages = (names) => names.filter((name) => !isThere(signs[name] ?? name))

/**
 * Installs Debian packages.
 * @param {string[]} names
 * @throws {SetupProblem} with the command to run when this user may not, or when it failed
 */
export async function installPackages(names) {
  const byHand = `sudo apt-get update && sudo apt-get install --no-install-recommends ${names.join(' ')}`
  if (!isThere('apt-get')) {
    throw new SetupProblem(
      `These packages are needed and this is not Debian, so install them by hand: ${names.join(', ')}.`,
    )
  }
  const prefix = await rights(byHand)
  try {
    await install(prefix, names)
  } catch (error) {
    if (!(error instanceof CommandFailed)) throw error
    throw new SetupProblem(`Installing ${names.join(', ')} failed. Try it by hand: ${byHand}\n${error.message}`)
  }
}

/**
 * @param {string} byHand
 * @returns {Promise<string[]>} what to put before a command that needs to be root
 */
async function rights(byHand) {
  if (process.getuid?.() === 0) return []
  const maySudo = await run('sudo', ['-n', 'true']).then(
    () => true,
    () => false,
  )
  if (maySudo) return ['sudo', '-n']
  throw new SetupProblem(
    `This user may not install packages without a password. Run this once, then try again: ${byHand}`,
  )
}

/**
 * The lists of packages are fetched only when they are missing or too old to install from.
 * @param {string[]} prefix
 * @param {string[]} names
 */
async function install(prefix, names) {
  const aptGet = (/** @type {string[]} */ ...args) => {
    const command = [
      ...prefix,
      'env',
      'DEBIAN_FRONTEND=noninteractive',
      'apt-get',
      '-o',
      'DPkg::Lock::Timeout=300',
      ...args,
    ]
    return run(/** @type {string} */ (command[0]), command.slice(1))
  }
  const add = ['install', '-y', '--no-install-recommends', ...names]
  try {
    await aptGet(...add)
  } catch {
    await aptGet('update')
    await aptGet(...add)
  }
}
