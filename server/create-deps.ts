import type { Config } from './config/config.ts'
import { connect } from './db/client.ts'
import type { Deps } from './deps.ts'
import { createWorkers } from './jobs/piscina-workers.ts'
import { createQueue } from './jobs/queue.ts'
import { createLog } from './log.ts'
import { createMail } from './mail/index.ts'
import { createStorage } from './storage/index.ts'

/** The real outside world of the application, from its configuration. */
export async function createDeps(config: Config): Promise<Deps & { close(): Promise<void> }> {
  const now = () => new Date()
  const log = createLog(config.logLevel)
  const connection = connect(config.databaseUrl, config.databaseConnections)
  const mail = createMail(config, now)
  const workers = createWorkers(config.workerThreads)
  const jobs = createQueue({ db: connection.db, log, now })
  const stopping = new AbortController()
  const close = async () => {
    await jobs.stop()
    await Promise.all([workers.close(), mail.close()])
    await connection.close()
  }
  return { config, log, now, connection, mail, workers, jobs, stopping, storage: await createStorage(config), close }
}
