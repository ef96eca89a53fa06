import { setTimeout as pause } from 'node:timers/promises'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { makeApp, testPassword, type SignedIn, type TestApp } from '../../support/app.ts'
import { startMariadb } from '../../support/database.ts'

let server: Awaited<ReturnType<typeof startMariadb>>
let test: TestApp
let person: SignedIn

beforeAll(async () => {
  server = await startMariadb()
  test = makeApp({ url: server.url() })
  person = await test.signIn('administrator')
}, 120_000)
afterAll(async () => {
  await test.close()
  await server.remove()
})

async function untilReady() {
  for (let tries = 0; tries < 100; tries += 1) {
    if ((await request(test.app).get('/readyz')).status === 200) return
    await pause(100)
  }
  throw new Error('the application did not recover')
}

/** How many transactions wait for a row that another one holds. */
const waiting = async () =>
  Number(
    (await server.query("SELECT count(*) FROM information_schema.innodb_trx WHERE trx_state = 'LOCK WAIT'"))[0]![0],
  )

describe('a request at work when the database is killed', () => {
  it('is answered with 503, and had no effect', async () => {
    const holder = await test.deps.connection.pool.getConnection()
    await holder.beginTransaction()
    await holder.query('SELECT * FROM region FOR UPDATE')
    const answer = person
      .patch('/api/region')
      .send({ rowVersion: 1, name: 'Lost' })
      .then(({ body }) => body)
    await expect.poll(waiting, { timeout: 10_000 }).toBe(1)
    await server.kill()
    expect(await answer).toMatchObject({ status: 503, code: 'server/unavailable' })
    holder.destroy()
  }, 60_000)
})

describe('while the database is away', () => {
  it('every request says so with 503, and nobody is told to sign in', async () => {
    const visitor = request(test.app)
    const { email } = person
    const answers = await Promise.all([
      person.get('/api/session'),
      person.get('/api/people'),
      person.patch('/api/region').send({ rowVersion: 1, name: 'Lost' }),
      visitor.get('/api/session'),
      visitor.post('/api/session').send({ email, password: testPassword }),
      visitor.post('/api/password/forgotten').send({ email }),
      visitor.get('/readyz'),
    ])
    for (const { status, body, headers } of answers) {
      expect(status).toBe(503)
      expect(body.code).toBe('server/unavailable')
      expect(headers['retry-after']).toBe('5')
      expect(headers['content-type']).toContain('application/problem+json')
      expect(headers['set-cookie']).toBeUndefined()
      expect(JSON.stringify(body)).not.toMatch(/ECONN|127\.0\.0\.1:|select |mysql/i)
    }
  })

  it('the process is alive and hands out the pages', async () => {
    await request(test.app).get('/healthz').expect(200, { alive: true })
    const page = await request(test.app).get('/').set('Accept', 'text/html')
    expect(page.headers['content-type']).toContain('text/html')
  })
})

describe('when the database is back', () => {
  it('requests work again by themselves, and whoever was signed in still is', async () => {
    await server.restart()
    await untilReady()
    expect((await person.get('/api/session').expect(200)).body.viewer.id).toBe(person.id)
    await person.patch('/api/region').send({ rowVersion: 1, name: 'Found again' }).expect(200)
  }, 60_000)
})
