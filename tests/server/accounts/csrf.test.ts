import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { makeApp, testPassword, useApp, type SignedIn, type TestApp } from '../../support/app.ts'
import { createDatabase } from '../../support/database.ts'

const test = useApp()
const preferences = { version: 1, unitSystem: null, theme: 'dark', drawdownDirection: 'up' }
const path = '/api/account/preferences'

let person: SignedIn
beforeAll(async () => {
  person = await test.signIn('reader')
})

const write = (origin?: string, token = person.csrfToken, host = '127.0.0.1:8080') => {
  const call = person.agent.put(path).set('Host', host).set('X-CSRF-Token', token).send(preferences)
  return origin === undefined ? call : call.set('Origin', origin)
}

describe('a write with a session', () => {
  it('is refused without a token, with a wrong one and with another person’s', async () => {
    const other = await test.signIn('reader')
    const answers = [
      await person.agent.put(path).send(preferences),
      await write(undefined, 'x'.repeat(43)),
      await write(undefined, other.csrfToken),
    ]
    for (const { body } of answers) expect(body).toMatchObject({ status: 403, code: 'request/csrf' })
  })

  it('passes with its token and no Origin, as from a script of the person’s own', async () => {
    expect((await write()).body).toEqual(preferences)
  })

  it('passes from the public address and from a local name of this computer', async () => {
    await write('http://127.0.0.1:8080').expect(200)
    await write('http://localhost:5173', person.csrfToken, 'localhost:5173').expect(200)
  })

  it.each([
    ['another site', 'https://elsewhere.example', '127.0.0.1:8080'],
    ['a page without an origin', 'null', '127.0.0.1:8080'],
    ['another local port', 'http://127.0.0.1:9999', '127.0.0.1:8080'],
    ['a foreign name that was pointed at this computer', 'http://rebound.example:8080', 'rebound.example:8080'],
  ])('is refused from %s, token or not', async (_what, origin, host) => {
    expect((await write(origin, person.csrfToken, host)).body).toMatchObject({ status: 403, code: 'request/origin' })
  })

  it('changes nothing when refused', async () => {
    await write('https://elsewhere.example')
    await write().expect(200)
    await person.agent
      .put(path)
      .send({ ...preferences, theme: 'light' })
      .expect(403)
    expect((await person.get('/api/session')).body.preferences.theme).toBe('dark')
  })
})

describe('signing in', () => {
  it('is refused when another site made the browser do it', async () => {
    const { email } = await test.makePerson()
    const call = request(test.app).post('/api/session').set('Origin', 'https://elsewhere.example')
    expect((await call.send({ email, password: testPassword })).body.code).toBe('request/origin')
  })

  it('cannot be done by the form of another site, which can send no JSON', async () => {
    const { email } = await test.makePerson()
    const form = request(test.app).post('/api/session').type('form').send({ email, password: testPassword })
    expect((await form).status).toBe(400)
  })
})

describe('behind an https address', () => {
  let https: TestApp
  let drop: () => Promise<void>
  beforeAll(async () => {
    const made = await createDatabase()
    drop = made.drop
    const config = { publicUrl: 'https://veldray.example', host: '0.0.0.0', trustProxy: 1 }
    https = makeApp({ url: made.url, config })
  })
  afterAll(async () => {
    await https.close()
    await drop()
  })

  const signIn = (email: string) =>
    request(https.app)
      .post('/api/session')
      .set({ 'X-Forwarded-Proto': 'https', Origin: 'https://veldray.example' })
      .send({ email, password: testPassword })

  it('gives a Secure cookie that is bound to the host, and HSTS', async () => {
    const { email } = await https.makePerson()
    const answer = await signIn(email).expect(200)
    expect(answer.headers['set-cookie']?.[0]).toMatch(
      /^__Host-basinbook=.+; Path=\/; .*HttpOnly; Secure; SameSite=Lax$/,
    )
    expect(answer.headers['strict-transport-security']).toBe('max-age=31536000')
  })

  it('no longer takes a local address for its own', async () => {
    const { email } = await https.makePerson()
    const answer = await signIn(email).set({ Origin: 'http://127.0.0.1:8080', Host: '127.0.0.1:8080' })
    expect(answer.body.code).toBe('request/origin')
  })

  it('lets no demo account in, whose password everybody can read', async () => {
    const { email } = await https.makePerson({ demo: true })
    expect((await signIn(email)).body).toMatchObject({ status: 403, code: 'session/demo-refused' })
    const wrong = request(https.app).post('/api/session').send({ email, password: 'not the password' })
    expect((await wrong).body.code).toBe('session/wrong')
  })
})

it('sends no HSTS and no Secure cookie over plain http', async () => {
  const answer = await request(test.app).get('/api/session')
  expect(answer.headers['strict-transport-security']).toBeUndefined()
})
