import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { makeApp, testPassword, type TestApp } from '../../support/app.ts'
import { makeClock, minutes } from '../../support/clock.ts'
import { useDatabase } from '../../support/database.ts'

const clock = makeClock()
const database = useDatabase()
let first: TestApp
let second: TestApp

beforeAll(() => {
  first = makeApp({ url: database.url, now: clock.now })
  second = makeApp({ url: database.url, now: clock.now })
})
afterAll(async () => {
  await first.close()
  await second.close()
})

const attempt = ({ app }: TestApp, email: string, password = 'wrong password') =>
  request(app).post('/api/session').send({ email, password })

async function fail(test: TestApp, email: string, times: number) {
  for (let count = 0; count < times; count += 1) await attempt(test, email).expect(401)
}

describe('wrong passwords', () => {
  it('rest an account after ten, in every process, even for the right password', async () => {
    const { email } = await first.makePerson()
    await fail(first, email, 5)
    await fail(second, email, 5)
    for (const test of [first, second]) {
      const answer = await attempt(test, email, testPassword)
      expect(answer.body).toMatchObject({ status: 429, code: 'session/too-many-attempts', params: { seconds: 900 } })
      expect(answer.body.detail).toContain('Try again in 15 min')
    }
  })

  it('are counted for unknown addresses alike', async () => {
    await fail(first, 'unknown@veldray.example', 10)
    expect((await attempt(second, 'unknown@veldray.example')).body.code).toBe('session/too-many-attempts')
  })

  it('are still counted after a restart, and forgiven after fifteen minutes', async () => {
    const { email } = await first.makePerson()
    await fail(first, email, 10)
    const restarted = makeApp({ url: database.url, now: clock.now })
    expect((await attempt(restarted, email, testPassword)).status).toBe(429)
    clock.forward(15 * minutes)
    expect((await attempt(restarted, email, testPassword)).status).toBe(200)
    await restarted.close()
  })

  it('are forgotten once the right one came', async () => {
    const { email } = await first.makePerson()
    for (let round = 0; round < 3; round += 1) {
      await fail(first, email, 6)
      await attempt(second, email, testPassword).expect(200)
    }
  })

  it('are forgotten once a new password was set by link', async () => {
    const { email } = await first.makePerson()
    await fail(first, email, 10)
    await request(first.app).post('/api/password/forgotten').send({ email }).expect(202)
    await first.deps.jobs.drain()
    const token = /#([\w-]+)/.exec(first.mails.at(-1)!.text)![1]
    const password = 'chosen after the lock'
    await request(first.app).post('/api/password/setting').send({ token, password }).expect(200)
    await attempt(second, email, password).expect(200)
  })

  it('cannot slip past the limit by coming all at once', async () => {
    clock.forward(20 * minutes)
    const { email } = await first.makePerson()
    const sent = Array.from({ length: 16 }, (_, index) => attempt(index % 2 ? first : second, email))
    const statuses = (await Promise.all(sent)).map(({ status }) => status)
    expect(statuses.filter((status) => status === 401)).toHaveLength(10)
    expect(statuses.filter((status) => status === 429)).toHaveLength(6)
  })
})

it('rests an address after sixty failures for any accounts, while successes cost nothing', async () => {
  clock.forward(20 * minutes)
  const { email } = await first.makePerson()
  for (let count = 0; count < 5; count += 1) await attempt(first, email, testPassword).expect(200)
  const guesses = Array.from({ length: 60 }, (_, index) => `guess-${index}@veldray.example`)
  for (const guess of guesses) await attempt(first, guess).expect(401)
  expect((await attempt(second, email, testPassword)).body).toMatchObject({ status: 429, code: 'request/too-many' })
  clock.forward(15 * minutes)
  await attempt(second, email, testPassword).expect(200)
})

it('mails nobody more than five reset links an hour, and answers the same all the time', async () => {
  const { email } = await first.makePerson()
  for (let count = 0; count < 8; count += 1)
    await request(first.app).post('/api/password/forgotten').send({ email }).expect(202, {})
  await first.deps.jobs.drain()
  expect(first.mails.filter(({ to }) => to === email)).toHaveLength(5)
})
