import type { Logger } from 'pino'
import type { Config } from './config/config.ts'
import type { Connection } from './db/client.ts'
import type { Jobs } from './jobs/jobs.ts'
import type { Mail } from './mail/mail.ts'
import type { Storage } from './storage/storage.ts'
import type { Workers } from './jobs/workers.ts'

/** Everything a service may need from outside; tests hand in their own database, clock, mail and storage. */
export interface Deps {
  config: Config
  log: Logger
  connection: Connection
  now: () => Date
  mail: Mail
  storage: Storage
  jobs: Jobs
  workers: Workers
  /** Aborted when the process begins to shut down: open streams end then. */
  stopping: AbortController
}
