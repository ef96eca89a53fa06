import { mkdir, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { createTransport } from 'nodemailer'
import type { Mail } from './mail.ts'

/** The local default: every message becomes an .eml file that any mail program opens. */
export function folderMail(folder: string, from: string, now: () => Date): Mail {
  const transport = createTransport({ streamTransport: true, buffer: true, newline: 'unix' })
  let sequence = 0
  return {
    async send({ to, subject, text }) {
      const { message } = await transport.sendMail({ from, to, subject, text, date: now() })
      await mkdir(folder, { recursive: true })
      sequence += 1
      const name = `${now().toISOString().replaceAll(':', '-')}-${process.pid}-${sequence}.eml`
      await writeFile(join(folder, name), message as Buffer, { mode: 0o600 })
    },
    close: async () => transport.close(),
  }
}
