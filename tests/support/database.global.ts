import { rmSync } from 'node:fs'
import type { TestProject } from 'vitest/node'
import { startMariadb } from '../../server/setup/mariadb.mjs'
import { copyOfTemplate } from './database.template.ts'
import { migrated, schemaDump } from './database.migrated.ts'
import { removeLeftovers } from './temporary.ts'

declare module 'vitest' {
  interface ProvidedContext {
    /** Where the run's server is, and the SQL that makes a migrated database. */
    database: { port: number; user: string; password: string; schema: string }
  }
}

/** One server for the whole run; each test file makes its own database on it. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  removeLeftovers()
  const folder = await copyOfTemplate(migrated)
  const server = await startMariadb(folder, { throwaway: true })
  const { port, user, password } = server
  project.provide('database', { port, user, password, schema: await schemaDump(server) })
  return async () => {
    await server.stop()
    rmSync(folder, { recursive: true, force: true })
  }
}
