import { setTimeout as pause } from 'node:timers/promises'
import { eq } from 'drizzle-orm'
import { pino } from 'pino'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { connect, type Connection } from '../../../server/db/client.ts'
import { jobs } from '../../../server/db/schema/index.ts'
import { cancelJob } from '../../../server/jobs/jobs.repository.ts'
import { createQueue, type QueueOptions } from '../../../server/jobs/queue.ts'
import { useDatabase } from '../../support/database.ts'

const database = useDatabase()
let connection: Connection
const log = pino({ level: 'silent' })

beforeAll(() => {
  connection = connect(database.url, 8)
})
afterAll(() => connection.close())
beforeEach(() => connection.db.delete(jobs).then(() => undefined))

const makeQueue = (overrides: Partial<QueueOptions> = {}) =>
  createQueue({ db: connection.db, log, now: () => new Date(), pollMs: 20, beatMs: 20, ...overrides })

async function rowOf(id: number | null) {
  const [row] = await connection.db.select().from(jobs).where(eq(jobs.id, id!))
  return row!
}

async function until(check: () => Promise<boolean>) {
  for (let i = 0; i < 500; i += 1) {
    if (await check()) return
    await pause(20)
  }
  throw new Error('it did not happen within 10 s')
}

describe('the job queue', () => {
  it('runs each job once, though several processes claim', async () => {
    const runs: number[] = []
    const queues = [makeQueue(), makeQueue(), makeQueue()]
    for (const queue of queues) queue.handle('count', async (payload) => void runs.push((payload as { n: number }).n))
    for (let n = 0; n < 60; n += 1) await queues[0]!.enqueue(connection.db, 'count', { payload: { n } })
    for (const queue of queues) queue.start()
    await until(async () => (await connection.db.$count(jobs, eq(jobs.state, 'done'))) === 60)
    await Promise.all(queues.map((queue) => queue.stop()))
    expect(runs.sort((a, b) => a - b)).toEqual(Array.from({ length: 60 }, (_, n) => n))
  })

  it('adds no second job with the key of one that waits, and again one when that runs', async () => {
    const queue = makeQueue()
    const added: (number | null)[] = []
    queue.handle(
      'refit',
      async () => void added.push(await queue.enqueue(connection.db, 'refit', { uniqueKey: 'unit 1' })),
    )
    expect(await queue.enqueue(connection.db, 'refit', { uniqueKey: 'unit 1' })).not.toBeNull()
    expect(await queue.enqueue(connection.db, 'refit', { uniqueKey: 'unit 1' })).toBeNull()
    const once = makeQueue()
    once.handle('refit', async () => undefined)
    await once.drain()
    expect(await queue.enqueue(connection.db, 'refit', { uniqueKey: 'unit 1' })).not.toBeNull()
  })

  it('is part of the transaction that adds a job', async () => {
    const queue = makeQueue()
    const rolledBack = connection.db.transaction(async (tx) => {
      await queue.enqueue(tx, 'never')
      throw new Error('rolled back')
    })
    await expect(rolledBack).rejects.toThrow('rolled back')
    expect(await connection.db.$count(jobs)).toBe(0)
  })

  it('tries a failing job again later, and gives up after its attempts', async () => {
    let now = new Date('2026-01-01T00:00:00Z')
    const queue = makeQueue({ now: () => now })
    queue.handle('breaks', async () => {
      throw new Error('no paper')
    })
    const id = await queue.enqueue(connection.db, 'breaks')
    await queue.drain()
    expect(await rowOf(id)).toMatchObject({ state: 'waiting', attempts: 1, errorDetail: 'no paper' })
    for (let i = 0; i < 2; i += 1) {
      now = new Date(now.getTime() + 60_000)
      await queue.drain()
    }
    expect(await rowOf(id)).toMatchObject({
      state: 'failed',
      attempts: 3,
      errorCode: 'job/failed',
      errorDetail: 'no paper',
    })
  })

  it('keeps progress and result', async () => {
    const queue = makeQueue()
    queue.handle('count', async (_payload, { report }) => {
      await report({ done: 3, total: 4, message: 'wells' })
      return { wells: 4 }
    })
    const id = await queue.enqueue(connection.db, 'count')
    await queue.drain()
    expect(await rowOf(id)).toMatchObject({ state: 'done', done: 3, total: 4, message: 'wells', result: { wells: 4 } })
  })

  it('takes over a job whose process went silent', async () => {
    const queue = makeQueue()
    queue.handle('import', async () => 'finished by another')
    const id = await queue.enqueue(connection.db, 'import')
    const died = {
      state: 'running',
      claimedBy: 'a process that is gone',
      attempts: 1,
      heartbeatAt: new Date(Date.now() - 60_000),
    } as const
    await connection.db.update(jobs).set(died).where(eq(jobs.id, id!))
    queue.start()
    await until(async () => (await rowOf(id)).state === 'done')
    await queue.stop()
    expect(await rowOf(id)).toMatchObject({ attempts: 2, result: 'finished by another' })
  })

  it('gives a job up when its processes keep dying', async () => {
    const queue = makeQueue()
    const id = await queue.enqueue(connection.db, 'import')
    const died = {
      state: 'running',
      claimedBy: 'gone',
      attempts: 3,
      heartbeatAt: new Date(Date.now() - 60_000),
    } as const
    await connection.db.update(jobs).set(died).where(eq(jobs.id, id!))
    queue.start()
    await until(async () => (await rowOf(id)).state === 'failed')
    await queue.stop()
    expect(await rowOf(id)).toMatchObject({ errorCode: 'job/process-died' })
  })

  it('cancels a waiting job at once and a running one when it asks', async () => {
    const queue = makeQueue()
    let begun = false
    queue.handle('long', async (_payload, { checkCancelled }) => {
      begun = true
      for (;;) {
        await checkCancelled()
        await pause(10)
      }
    })
    const waiting = await queue.enqueue(connection.db, 'other')
    expect(await cancelJob(connection.db, waiting!, new Date())).toBe(true)
    expect((await rowOf(waiting)).state).toBe('cancelled')

    const running = await queue.enqueue(connection.db, 'long')
    queue.start()
    await until(async () => begun)
    expect(await cancelJob(connection.db, running!, new Date())).toBe(true)
    await until(async () => (await rowOf(running)).state === 'cancelled')
    await queue.stop()
    expect(await cancelJob(connection.db, running!, new Date())).toBe(false)
  })

  it('hands a running job back when the process stops', async () => {
    const queue = makeQueue()
    let begun = false
    queue.handle('long', async (_payload, { checkCancelled }) => {
      begun = true
      for (;;) {
        await checkCancelled()
        await pause(10)
      }
    })
    const id = await queue.enqueue(connection.db, 'long')
    queue.start()
    await until(async () => begun)
    await queue.stop()
    expect(await rowOf(id)).toMatchObject({ state: 'waiting', claimedBy: null })
  })
})
