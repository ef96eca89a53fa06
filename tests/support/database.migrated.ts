import type { Mariadb } from '../../server/setup/mariadb.mjs'
import { inRoot, root } from '../../server/setup/places.mjs'
import { run } from '../../server/setup/processes.mjs'
import type { Template } from './database.template.ts'

/** Brings a database up to date by the program's own command. */
export async function migrate(url: string): Promise<void> {
  await run(process.execPath, ['--import', 'tsx', inRoot('server/db/migrate.ts')], {
    cwd: root,
    env: { ...process.env, DATABASE_URL: url },
  })
}

/** A server whose database is migrated and empty. */
export const migrated: Template = {
  name: 'migrated',
  sources: ['drizzle', 'server/db/migrate.ts', 'server/db/client.ts'],
  fill: (server) => migrate(server.url()),
}

/** The SQL that makes a database like the server's own. */
export const schemaDump = (server: Mariadb): Promise<string> =>
  run('mariadb-dump', [...server.reach.args, '--skip-comments', '--skip-add-drop-table', server.reach.database])
