import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { contentHash } from './content-hash.mjs'
import { waitForLock } from './locks.mjs'
import { inRoot, root } from './places.mjs'
import { SetupProblem } from './problem.mjs'
import { run } from './processes.mjs'

const sources = ['src', 'shared', 'index.html', 'vite.config.ts', 'package-lock.json']

/** Not served: express ignores files whose name begins with a dot. */
const stampOf = (/** @type {string} */ folder) => join(folder, '.sources')

/**
 * Whether a folder holds the client of the sources as they are.
 * @param {string} folder
 */
export function clientIsBuilt(folder, hash = contentHash(root, sources)) {
  return existsSync(stampOf(folder)) && readFileSync(stampOf(folder), 'utf8') === hash
}

/**
 * The folder is somebody's choice: one that holds anything but earlier pages is not replaced.
 * @param {string} folder
 */
function refuseForeign(folder) {
  const names = existsSync(folder) ? readdirSync(folder) : []
  if (names.length === 0 || (names.includes('index.html') && names.includes('assets'))) return
  throw new SetupProblem(`CLIENT_DIR is ${folder}, which holds other things than built pages. Choose an empty folder.`)
}

/**
 * Builds the browser application where it is not yet built. The new folder replaces the old one when it is whole.
 * @param {string} folder
 * @param {AbortSignal} [signal]
 */
export async function buildClient(folder, signal) {
  const release = await waitForLock(inRoot('.cache/build.lock'))
  const made = inRoot(`.cache/client-${process.pid}`)
  try {
    const hash = contentHash(root, sources)
    if (clientIsBuilt(folder, hash)) return
    const vite = inRoot('node_modules/vite/bin/vite.js')
    const env = { ...process.env, NODE_ENV: 'production' }
    await run(process.execPath, [vite, 'build', '--outDir', made, '--emptyOutDir'], { cwd: root, env, signal })
    writeFileSync(stampOf(made), hash)
    mkdirSync(dirname(folder), { recursive: true })
    refuseForeign(folder)
    rmSync(folder, { recursive: true, force: true })
    renameSync(made, folder)
  } finally {
    rmSync(made, { recursive: true, force: true })
    release()
  }
}
