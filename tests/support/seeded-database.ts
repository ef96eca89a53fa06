import { mkdirSync, readdirSync, renameSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { databaseFolder } from '../../server/setup/databases.mjs'
import { startMariadb, type Mariadb } from '../../server/setup/mariadb.mjs'
import { inRoot, root } from '../../server/setup/places.mjs'
import { run } from '../../server/setup/processes.mjs'
import { testEnvironment } from '../../server/setup/test-run.mjs'
import { migrate } from './database.migrated.ts'
import { copyOfTemplate, type Template } from './database.template.ts'
import { temporaryFolder } from './temporary.ts'

/** Where the seed, run for the template, puts what is no database. */
const filesFolder = 'files'

/** The demo region. Everything is written by the program's own services, so all of the server's code matters. */
const seeded: Template = {
  name: 'seeded',
  sources: ['server/api', 'server/db', 'server/jobs', 'server/storage', 'shared', 'drizzle', 'package-lock.json'],
  async fill(server, folder) {
    await migrate(server.url())
    const env = { DATABASE_URL: server.url(), DATA_DIR: join(folder, filesFolder), DEMO: '1', LOG_LEVEL: 'warn' }
    await run(process.execPath, ['--import', 'tsx', inRoot('server/db/seed/index.ts')], {
      cwd: root,
      env: { ...testEnvironment(process.env), ...env },
    })
  },
}

/** A data folder as `npm start` leaves it after seeding, in a temporary place; the caller removes it. */
export async function seededDataFolder(): Promise<string> {
  const copy = await copyOfTemplate(seeded)
  const dataDir = temporaryFolder()
  const files = join(copy, filesFolder)
  mkdirSync(files, { recursive: true })
  for (const name of readdirSync(files)) renameSync(join(files, name), join(dataDir, name))
  renameSync(copy, databaseFolder(dataDir))
  return dataDir
}

export interface SeededDatabase {
  url: string
  dataDir: string
  server: Mariadb
  remove(): Promise<void>
}

/** A server of one's own with the demo region. */
export async function startSeededDatabase(): Promise<SeededDatabase> {
  const dataDir = await seededDataFolder()
  const server = await startMariadb(databaseFolder(dataDir))
  const remove = async () => {
    await server.stop()
    rmSync(dataDir, { recursive: true, force: true })
  }
  return { url: server.url(), dataDir, server, remove }
}
