import { join } from 'node:path'
import type { Config } from '../config/config.ts'
import { folderMail } from './folder-mail.ts'
import type { Mail } from './mail.ts'
import { smtpMail } from './smtp-mail.ts'

export const createMail = (config: Config, now: () => Date): Mail =>
  config.smtpUrl
    ? smtpMail(config.smtpUrl, config.mailFrom)
    : folderMail(join(config.dataDir, 'outbox'), config.mailFrom, now)
