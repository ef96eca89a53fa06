import { eq } from 'drizzle-orm'
import request from 'supertest'
import { describe, expect, it } from 'vitest'
import { sessions } from '../../../server/db/schema/index.ts'
import { testPassword, useApp } from '../../support/app.ts'
import { days, hours, makeClock, minutes } from '../../support/clock.ts'

const clock = makeClock()
const test = useApp({ now: clock.now })

const cookieOf = (answer: request.Response) => String(answer.headers['set-cookie']?.[0] ?? '')
const idOf = (answer: request.Response) => /basinbook=([^;]+)/.exec(cookieOf(answer))?.[1] ?? null
const signInWith = (email: string, password: string, cookie = '') =>
  request(test.app).post('/api/session').set('Cookie', cookie).send({ email, password })
const rowsOf = (userId: number) => test.deps.connection.db.select().from(sessions).where(eq(sessions.userId, userId))

describe('signing in', () => {
  it('answers with the person and a token, over a cookie that scripts cannot read', async () => {
    const { email } = await test.makePerson({ role: 'analyst', name: 'Field hydrogeologist', mayReview: true })
    const answer = await signInWith(email, testPassword).expect(200)
    expect(answer.body.viewer).toMatchObject({ name: 'Field hydrogeologist', email, role: 'analyst', mayReview: true })
    expect(answer.body.csrfToken).toMatch(/^[\w-]{43}$/)
    expect(cookieOf(answer)).toMatch(/^basinbook=.+; Path=\/; Expires=.+; HttpOnly; SameSite=Lax$/)
    expect(answer.headers['cache-control']).toBe('private, no-cache')
  })

  it('takes the address in any case and with blanks around it', async () => {
    const { email } = await test.makePerson()
    await signInWith(`  ${email.toUpperCase()} `, testPassword).expect(200)
  })

  it('takes a password whose accents were typed as separate marks', async () => {
    const { email } = await test.makePerson()
    const { hashPassword } = await import('../../../server/api/session/passwords.ts')
    const { users } = await import('../../../server/db/schema/index.ts')
    const passwordHash = await hashPassword('caf\u00e9 au bord de la Tarrow')
    await test.deps.connection.db.update(users).set({ passwordHash }).where(eq(users.email, email))
    await signInWith(email, 'cafe\u0301 au bord de la Tarrow').expect(200)
  })

  it('gives one answer for a wrong password, an unknown address, a deactivated and an invited person', async () => {
    const known = await test.makePerson()
    const deactivated = await test.makePerson({ active: false })
    const invited = await test.makePerson({ passwordHash: null })
    const answers = await Promise.all([
      signInWith(known.email, 'not the password'),
      signInWith('nobody@veldray.example', testPassword),
      signInWith(deactivated.email, testPassword),
      signInWith(invited.email, testPassword),
    ])
    const said = answers.map(({ status, body }) => ({ status, body: { ...body, requestId: '' } }))
    expect(said[0]).toMatchObject({ status: 401, body: { code: 'session/wrong' } })
    for (const other of said.slice(1)) expect(other).toEqual(said[0])
    expect(answers.map(cookieOf)).toEqual(['', '', '', ''])
  })

  it('begins a new session id, so that an id planted beforehand opens nothing', async () => {
    const { email } = await test.makePerson()
    const planted = 'basinbook=s%3Aplanted-by-somebody-else.AAAA'
    const answer = await signInWith(email, testPassword, planted).expect(200)
    expect(idOf(answer)).not.toContain('planted')
    const visitor = await request(test.app).get('/api/session').set('Cookie', planted)
    expect(visitor.body.viewer.id).toBeNull()
  })

  it('ends the session that the browser had when somebody signs in over it', async () => {
    const [first, second] = [await test.makePerson(), await test.makePerson()]
    const before = await signInWith(first.email, testPassword).expect(200)
    const cookie = cookieOf(before).split(';')[0]!
    const after = await signInWith(second.email, testPassword, cookie).set('X-CSRF-Token', before.body.csrfToken)
    expect(after.body.viewer.id).toBe(second.id)
    expect(idOf(after)).not.toBe(idOf(before))
    expect(await rowsOf(first.id)).toEqual([])
  })

  it('keeps no session id in the database that a browser could send', async () => {
    const { id, email } = await test.makePerson()
    const answer = await signInWith(email, testPassword).expect(200)
    const sid = decodeURIComponent(idOf(answer)!).slice(2).split('.')[0]!
    const [row] = await rowsOf(id)
    expect(sid).toHaveLength(43)
    expect(JSON.stringify(row)).not.toContain(sid)
  })

  it('refuses fields that it does not know, naming them', async () => {
    const answer = await request(test.app)
      .post('/api/session')
      .send({ email: 'a@b.example', password: 'x', role: 'admin' })
    expect(answer.body).toMatchObject({ status: 400, fields: [{ code: 'field/unknown', params: { keys: 'role' } }] })
  })
})

describe('a session', () => {
  it('ends when the person signs out, on the server too', async () => {
    const person = await test.signIn('reader')
    const answer = await person.delete('/api/session').expect(200)
    expect(answer.body.viewer).toEqual({ id: null, name: 'Visitor', email: null, role: null, mayReview: false })
    expect(answer.body.csrfToken).toBeNull()
    expect(cookieOf(answer)).toMatch(/^basinbook=; Path=\/; Expires=Thu, 01 Jan 1970/)
    expect(await rowsOf(person.id)).toEqual([])
  })

  it('ends after twelve idle hours', async () => {
    const person = await test.signIn('reader')
    clock.forward(12 * hours - minutes)
    expect((await person.get('/api/session')).body.viewer.id).toBe(person.id)
    clock.forward(12 * hours + minutes)
    const answer = await person.get('/api/session').expect(200)
    expect(answer.body.viewer.id).toBeNull()
  })

  it('ends after seven days, however much it is used', async () => {
    const person = await test.signIn('analyst')
    const signedInAt = async () => (await person.get('/api/session')).body.viewer.id === person.id
    for (let hour = 10; hour < 7 * 24; hour += 10) {
      clock.forward(10 * hours)
      expect(await signedInAt()).toBe(true)
    }
    clock.forward(7 * days - 160 * hours + minutes)
    expect(await signedInAt()).toBe(false)
  })

  it('asks to sign in, and does not speak of an old page, when it ran out under an edit', async () => {
    const person = await test.signIn('administrator')
    clock.forward(13 * hours)
    const answer = await person.patch('/api/region').send({ rowVersion: 1, name: 'Too late' })
    expect(answer.body).toMatchObject({ status: 401, code: 'session/required' })
  })

  it('is neither made nor looked up for a visitor, for files and for the health of the process', async () => {
    const before = await test.deps.connection.db.$count(sessions)
    for (const path of ['/api/session', '/', '/assets/none.js', '/healthz', '/readyz', '/tiles/light/0/0/0.webp']) {
      const answer = await request(test.app).get(path).set('Cookie', 'basinbook=s%3Aanything.AAAA')
      expect(answer.headers['set-cookie']).toBeUndefined()
    }
    expect(await test.deps.connection.db.$count(sessions)).toBe(before)
  })

  it('ends everywhere at once when role, review right or activation change', async () => {
    const administrator = await test.signIn('administrator')
    for (const edit of [{ role: 'steward' }, { mayReview: true }, { active: false }]) {
      const person = await test.signIn('analyst')
      const elsewhere = await test.signInAs(person.email)
      await administrator
        .patch(`/api/people/${person.id}`)
        .send({ rowVersion: 1, ...edit })
        .expect(200)
      for (const signedIn of [person, elsewhere]) expect((await signedIn.get('/api/session')).body.viewer.id).toBeNull()
    }
  })

  it('goes on when only the name changes', async () => {
    const administrator = await test.signIn('administrator')
    const person = await test.signIn('analyst')
    await administrator.patch(`/api/people/${person.id}`).send({ rowVersion: 1, name: 'New name' }).expect(200)
    expect((await person.get('/api/session')).body.viewer).toMatchObject({ id: person.id, name: 'New name' })
  })
})
