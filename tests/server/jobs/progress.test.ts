import { createServer, request as httpRequest, type Server } from 'node:http'
import { once } from 'node:events'
import type { AddressInfo } from 'node:net'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Job } from '#shared/contracts/jobs.ts'
import { useApp } from '../../support/app.ts'

const tested = useApp()
let server: Server

beforeAll(async () => {
  server = createServer(tested.app).listen(0, '127.0.0.1')
  await once(server, 'listening')
})
afterAll(() => void server.close())

/** Reads the stream until a job has ended or the time is up. */
async function follow(cookie: string, ended: (job: Job) => boolean): Promise<Job[]> {
  const { port } = server.address() as AddressInfo
  const seen: Job[] = []
  return new Promise((resolve, reject) => {
    const req = httpRequest({ port, path: '/api/progress', headers: { cookie } }, (res) => {
      expect(res.headers['content-type']).toContain('text/event-stream')
      let text = ''
      res.setEncoding('utf8').on('data', (chunk: string) => {
        text += chunk
        const events = text.split('\n\n')
        text = events.pop() ?? ''
        for (const event of events) {
          const data = /^data: (.*)$/m.exec(event)?.[1]
          if (data) seen.push(JSON.parse(data) as Job)
        }
        if (seen.some(ended)) {
          req.destroy()
          resolve(seen)
        }
      })
    })
    req.on('error', (error) => (seen.some(ended) ? resolve(seen) : reject(error)))
    req.end()
  })
}

async function cookieOf(email: string, password: string) {
  const { port } = server.address() as AddressInfo
  const answer = await fetch(`http://127.0.0.1:${port}/api/session`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify({ email, password }),
  })
  return answer.headers
    .getSetCookie()
    .map((cookie) => cookie.split(';')[0])
    .join('; ')
}

describe('the progress stream', () => {
  it('tells a person how far their own work has come, and nothing of other people', async () => {
    const { deps } = tested
    const mine = await tested.makePerson({ role: 'analyst' })
    const other = await tested.makePerson({ role: 'analyst' })
    deps.jobs.handle('demo-work', async (_payload, { report }) => report({ done: 2, total: 2, message: 'rows' }))
    await deps.jobs.enqueue(deps.connection.db, 'demo-work', { createdBy: other.id })
    const id = await deps.jobs.enqueue(deps.connection.db, 'demo-work', { createdBy: mine.id })
    const cookie = await cookieOf(mine.email, 'a long enough password')
    setTimeout(() => void deps.jobs.drain(), 300)
    const seen = await follow(cookie, ({ state }) => state === 'done')
    expect(new Set(seen.map((job) => job.id))).toEqual(new Set([id]))
    expect(seen.at(-1)).toMatchObject({ state: 'done', done: 2, total: 2, message: 'rows' })
  })

  it('is closed to visitors', async () => {
    const { port } = server.address() as AddressInfo
    expect((await fetch(`http://127.0.0.1:${port}/api/progress`)).status).toBe(401)
  })
})
