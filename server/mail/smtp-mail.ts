import { createTransport } from 'nodemailer'
import type { Mail } from './mail.ts'

export function smtpMail(url: string, from: string): Mail {
  const transport = createTransport(url, { from })
  return {
    send: async ({ to, subject, text }) => void (await transport.sendMail({ to, subject, text })),
    close: async () => transport.close(),
  }
}
