import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { migrationsFolder } from '../../db/migrate.ts'
import { databaseCode } from '../../db/retry.ts'
import type { Deps } from '../../deps.ts'
import { AppError } from '../../errors.ts'
import { clusterReady, newestMigration } from './health.repository.ts'

interface Journal {
  entries: { when: number }[]
}

/** The newest migration that this program was written for, ms. */
function wantedMigration(): number {
  const journal = JSON.parse(readFileSync(join(migrationsFolder, 'meta/_journal.json'), 'utf8')) as Journal
  return Math.max(...journal.entries.map(({ when }) => when))
}

const notReady = (reason: string) => new AppError('server/not-ready', { reason })

export function createHealthService({ connection: { db } }: Deps) {
  const wanted = wantedMigration()

  async function isMigrated(): Promise<boolean> {
    try {
      return (await newestMigration(db)) === wanted
    } catch (error) {
      if (databaseCode(error) === 'ER_NO_SUCH_TABLE') return false
      throw error
    }
  }

  return {
    /** @throws AppError saying what is missing; an unreachable database is an error of its own. */
    async ready() {
      if (!(await isMigrated())) throw notReady('the database is not at the version of this program')
      const cluster = await clusterReady(db)
      if (cluster === false) throw notReady('this node of the database cluster takes no writes')
      return { ready: true as const, cluster: cluster === null ? ('none' as const) : ('ready' as const) }
    },
  }
}
