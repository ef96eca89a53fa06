import { createServer, request as httpRequest, type Server } from 'node:http'
import { once } from 'node:events'
import type { AddressInfo } from 'node:net'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Job } from '#shared/contracts/jobs.ts'
import { users } from '../../../server/db/schema/index.ts'
import { endSessionsOf } from '../../../server/middleware/session.repository.ts'
import { useApp } from '../../support/app.ts'
import { makeClock, seconds } from '../../support/clock.ts'

const clock = makeClock()
const tested = useApp({ now: clock.now })
let server: Server

beforeAll(async () => {
  server = createServer(tested.app).listen(0, '127.0.0.1')
  await once(server, 'listening')
  tested.deps.jobs.handle('demo-work', async (_payload, { report }) => report({ done: 2, total: 2, message: 'rows' }))
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

/** Opens the stream and hears whether the server ends it; `opened` once its first line has come. */
function openStream(cookie: string) {
  const { port } = server.address() as AddressInfo
  const req = httpRequest({ port, path: '/api/progress', headers: { cookie } })
  const opened = new Promise<void>((resolve) =>
    req.on('response', (res) => void res.on('data', (chunk: Buffer) => void (chunk.length > 0 && resolve()))),
  )
  const ended = new Promise<void>((resolve, reject) => {
    req.on('response', (res) => res.on('end', resolve))
    req.on('error', reject)
  })
  req.end()
  return { opened, ended, close: () => req.destroy() }
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
    await deps.jobs.enqueue(deps.connection.db, 'demo-work', { createdBy: other.id })
    const id = await deps.jobs.enqueue(deps.connection.db, 'demo-work', { createdBy: mine.id })
    const cookie = await cookieOf(mine.email, 'a long enough password')
    setTimeout(() => void deps.jobs.drain(), 300)
    const seen = await follow(cookie, ({ state }) => state === 'done')
    expect(new Set(seen.map((job) => job.id))).toEqual(new Set([id]))
    expect(seen.at(-1)).toMatchObject({ state: 'done', done: 2, total: 2, message: 'rows' })
  })

  it.each([
    ['signs out', (person: { id: number }) => endSessionsOf(tested.deps.connection.db, person.id)],
    [
      'is deactivated',
      (person: { id: number }) =>
        tested.deps.connection.db.update(users).set({ active: false }).where(eq(users.id, person.id)),
    ],
  ])('ends at the next heartbeat after the person %s', async (_, loseRight) => {
    const person = await tested.makePerson({ role: 'analyst' })
    const stream = openStream(await cookieOf(person.email, 'a long enough password'))
    await stream.opened
    await loseRight(person)
    clock.forward(20 * seconds)
    await stream.ended
  })

  it('goes on through heartbeats while the session lasts, and follows a right that was gained', async () => {
    const { deps } = tested
    const person = await tested.makePerson({ role: 'analyst' })
    const other = await tested.makePerson({ role: 'analyst' })
    const cookie = await cookieOf(person.email, 'a long enough password')
    const id = await deps.jobs.enqueue(deps.connection.db, 'demo-work', { createdBy: other.id })
    const seen = follow(cookie, (job) => job.id === id)
    await deps.connection.db.update(users).set({ role: 'steward' }).where(eq(users.id, person.id))
    const forward = setInterval(() => clock.forward(20 * seconds), 100)
    expect((await seen).at(-1)?.id).toBe(id)
    clearInterval(forward)
    await deps.jobs.drain()
  })

  it('is closed to visitors', async () => {
    const { port } = server.address() as AddressInfo
    expect((await fetch(`http://127.0.0.1:${port}/api/progress`)).status).toBe(401)
  })
})
