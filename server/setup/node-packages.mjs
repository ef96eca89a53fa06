import { existsSync, readFileSync } from 'node:fs'
import { waitForLock } from './locks.mjs'
import { inRoot, root } from './places.mjs'
import { run } from './processes.mjs'

/**
 * @typedef {{ version?: string, integrity?: string, optional?: boolean }} Locked
 * @param {string} path
 * @returns {Record<string, Locked>}
 */
const packagesIn = (path) => JSON.parse(readFileSync(path, 'utf8')).packages ?? {}

/**
 * Whether node_modules holds what the lock file names. npm keeps a list of what it installed, written last, so an
 * interrupted installation has none. Optional packages for other systems are never installed.
 */
export function nodePackagesMatch() {
  const installed = inRoot('node_modules/.package-lock.json')
  if (!existsSync(installed)) return false
  const have = packagesIn(installed)
  return Object.entries(packagesIn(inRoot('package-lock.json')))
    .filter(([path]) => path !== '')
    .every(([path, wanted]) => {
      const found = have[path]
      return found ? found.version === wanted.version && found.integrity === wanted.integrity : wanted.optional === true
    })
}

/**
 * Installs the packages of the lock file, the ones for building and testing too. Two commands that start at the same
 * time in a fresh clone take turns, and the second finds the work done.
 * @param {AbortSignal} [signal]
 */
export async function installNodePackages(signal) {
  const release = await waitForLock(inRoot('.cache/install.lock'))
  try {
    if (nodePackagesMatch()) return
    const npm = process.env.npm_execpath
    const [command, first] = npm ? [process.execPath, [npm]] : ['npm', []]
    await run(command, [...first, 'ci', '--include=dev', '--no-audit', '--no-fund'], { cwd: root, signal })
  } finally {
    release()
  }
}
