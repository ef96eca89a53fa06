import { cpSync, existsSync, readdirSync, renameSync, rmSync, statSync, utimesSync } from 'node:fs'
import { join } from 'node:path'
import { contentHash } from '../../server/setup/content-hash.mjs'
import { waitForLock } from '../../server/setup/locks.mjs'
import { startMariadb, type Mariadb } from '../../server/setup/mariadb.mjs'
import { inRoot, root } from '../../server/setup/places.mjs'
import { run } from '../../server/setup/processes.mjs'
import { temporaryFolder } from './temporary.ts'

/** How a kind of prepared database folder is made, and what it depends on. */
export interface Template {
  name: string
  /** Files and folders whose change makes a kept copy useless. */
  sources: string[]
  /** Fills the server of a new folder; what else it writes into the folder is kept too. */
  fill(server: Mariadb, folder: string): Promise<void>
}

const templatesKept = 2

/**
 * A copy of a prepared database folder in a temporary place, for the caller to start a server in and to remove.
 * The prepared folder is made once and kept in .cache until its sources change.
 */
export async function copyOfTemplate(template: Template): Promise<string> {
  const kept = inRoot(`.cache/databases/${template.name}-${await keyOf(template)}`)
  if (!existsSync(kept)) await makeOnce(template, kept)
  utimesSync(kept, new Date(), new Date())
  const folder = temporaryFolder()
  cpSync(kept, folder, { recursive: true })
  return folder
}

async function keyOf({ sources }: Template): Promise<string> {
  const version = await run('/usr/sbin/mariadbd', ['--version'])
  return contentHash(root, [...sources, 'server/setup/mariadb.mjs'], [version]).slice(0, 16)
}

/** Several test runs may want the same one at the same time: one makes it and the others wait. */
async function makeOnce(template: Template, kept: string): Promise<void> {
  const release = await waitForLock(inRoot(`.cache/databases/${template.name}.lock`))
  try {
    if (!existsSync(kept)) await makeTemplate(template, kept)
  } finally {
    release()
  }
}

/** Made elsewhere and renamed, so that what is kept is always whole. */
async function makeTemplate(template: Template, kept: string): Promise<void> {
  const folder = temporaryFolder()
  try {
    const server = await startMariadb(folder, { throwaway: true })
    await template.fill(server, folder).finally(server.stop)
    const beside = `${kept}.part`
    rmSync(beside, { recursive: true, force: true })
    cpSync(folder, beside, { recursive: true })
    renameSync(beside, kept)
    removeOlder(template.name)
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

const age = (path: string) => -statSync(path).mtimeMs

function removeOlder(name: string): void {
  const parent = inRoot('.cache/databases')
  const entries = readdirSync(parent, { withFileTypes: true }).filter((entry) => entry.name.startsWith(`${name}-`))
  const byAge = entries.map((entry) => join(parent, entry.name)).sort((a, b) => age(a) - age(b))
  for (const path of byAge.slice(templatesKept)) rmSync(path, { recursive: true, force: true })
}
