import { mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { isAlive } from '../../server/setup/processes.mjs'

const prefix = 'bb-test-'

/** A short path (a socket's path has few bytes to spend) that names its process, so that leftovers can be told. */
export const temporaryFolder = (): string => mkdtempSync(join(tmpdir(), `${prefix}${process.pid}-`))

/** Removes what test runs that were killed left behind. */
export function removeLeftovers(): void {
  for (const name of readdirSync(tmpdir()).filter((entry) => entry.startsWith(prefix))) {
    const pid = Number(name.slice(prefix.length).split('-')[0])
    if (!isAlive(pid)) rmSync(join(tmpdir(), name), { recursive: true, force: true })
  }
}
