import { mkdtemp, readdir, readFile, rm, stat } from 'node:fs/promises'
import { once } from 'node:events'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { SMTPServer } from 'smtp-server'
import { afterEach, describe, expect, it } from 'vitest'
import { folderMail } from '../../../server/mail/folder-mail.ts'
import { smtpMail } from '../../../server/mail/smtp-mail.ts'

const message = { to: 'reader@veldray.example', subject: 'Grüße from Veldray', text: 'First line\nµ second line' }
const cleanUp: (() => Promise<unknown>)[] = []
afterEach(async () => {
  for (const step of cleanUp.splice(0)) await step()
})

async function makeServer() {
  const received: { from: string; to: string[]; text: string }[] = []
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onData(stream, session, done) {
      let text = ''
      stream.on('data', (chunk: Buffer) => (text += chunk.toString()))
      stream.on('end', () => {
        const { mailFrom, rcptTo } = session.envelope
        received.push({ from: mailFrom ? mailFrom.address : '', to: rcptTo.map(({ address }) => address), text })
        done()
      })
    },
  })
  server.listen(0, '127.0.0.1')
  await once(server.server, 'listening')
  cleanUp.push(() => new Promise<void>((resolve) => server.close(() => resolve())))
  return { received, port: (server.server.address() as AddressInfo).port }
}

describe('mail by SMTP', () => {
  it('delivers to the server of SMTP_URL, from the configured address', async () => {
    const { received, port } = await makeServer()
    const mail = smtpMail(`smtp://127.0.0.1:${port}`, 'Basinbook <office@veldray.example>')
    await mail.send(message)
    await mail.close()
    expect(received).toHaveLength(1)
    expect(received[0]).toMatchObject({ from: 'office@veldray.example', to: ['reader@veldray.example'] })
    expect(received[0]!.text).toContain('Subject: =?UTF-8?Q?Gr=C3=BC=C3=9Fe_from_Veldray?=')
  })

  it('fails when nobody answers, so that the job is tried again', async () => {
    const mail = smtpMail('smtp://127.0.0.1:1', 'office@veldray.example')
    await expect(mail.send(message)).rejects.toThrow('ECONNREFUSED')
    await mail.close()
  })
})

describe('mail into a folder', () => {
  it('becomes a private .eml file a message', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'bb-mail-'))
    cleanUp.push(() => rm(folder, { recursive: true }))
    const mail = folderMail(folder, 'office@veldray.example', () => new Date('2026-03-01T08:00:00Z'))
    await mail.send(message)
    await mail.send({ ...message, to: 'other@veldray.example' })
    const files = await readdir(folder)
    expect(files.every((name) => name.endsWith('.eml'))).toBe(true)
    expect(files).toHaveLength(2)
    const text = await readFile(join(folder, files.sort()[0]!), 'utf8')
    expect(text).toContain('To: reader@veldray.example')
    expect((await stat(join(folder, files[0]!))).mode & 0o777).toBe(0o600)
  })

  it('does not let an address add headers', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'bb-mail-'))
    cleanUp.push(() => rm(folder, { recursive: true }))
    const mail = folderMail(folder, 'office@veldray.example', () => new Date('2026-03-01T08:00:00Z'))
    await mail.send({ ...message, subject: 'Hello\r\nBcc: everyone@veldray.example' })
    const text = await readFile(join(folder, (await readdir(folder))[0]!), 'utf8')
    expect(text).not.toMatch(/^Bcc:/m)
  })
})
