import { eq } from 'drizzle-orm'
import request from 'supertest'
import { describe, expect, it } from 'vitest'
import { auditTrail, passwordTokens } from '../../../server/db/schema/index.ts'
import { testPassword, useApp } from '../../support/app.ts'
import { countStatements } from '../../support/count-statements.ts'
import { days, hours, makeClock, minutes, seconds } from '../../support/clock.ts'

const clock = makeClock()
const test = useApp({ now: clock.now })
const newPassword = 'an entirely new password'

const post = (path: string, body: object) => request(test.app).post(`/api/password/${path}`).send(body)
const signInStatus = async (email: string, password: string) =>
  (await request(test.app).post('/api/session').send({ email, password })).status

const tokenIn = (text: string) => /\/set-password#([\w-]{43})\n/.exec(text)?.[1] ?? ''

async function tokenMailedTo(email: string): Promise<string> {
  await test.deps.jobs.drain()
  return tokenIn(test.mails.filter(({ to }) => to === email).at(-1)?.text ?? '')
}

async function askFor(email: string): Promise<string> {
  await post('forgotten', { email }).expect(202)
  return tokenMailedTo(email)
}

describe('a forgotten password', () => {
  it('is set anew by a link that is mailed, works once and signs the person out everywhere', async () => {
    const person = await test.signIn('analyst', { name: 'Field hydrogeologist' })
    const token = await askFor(person.email)
    const mail = test.mails.at(-1)!
    expect(mail).toMatchObject({ to: person.email, subject: 'A new password for New region' })
    expect(mail.text).toContain(`http://127.0.0.1:8080/set-password#${token}`)
    expect((await post('link', { token })).body).toEqual({
      purpose: 'reset',
      email: person.email,
      name: 'Field hydrogeologist',
    })
    await post('setting', { token, password: newPassword }).expect(200, { email: person.email })
    expect((await person.get('/api/session')).body.viewer.id).toBeNull()
    expect(await signInStatus(person.email, testPassword)).toBe(401)
    expect(await signInStatus(person.email, newPassword)).toBe(200)
    const again = await post('setting', { token, password: 'yet another password' })
    expect(again.body).toMatchObject({ status: 410, code: 'password/link-ended' })
  })

  it('gets the same answer for known, unknown, deactivated and demo accounts, and mails the known one only', async () => {
    const known = await test.makePerson()
    const silent = [await test.makePerson({ active: false }), await test.makePerson({ demo: true })]
    const addresses = [known.email, 'nobody@veldray.example', ...silent.map(({ email }) => email)]
    const answers = await Promise.all(addresses.map((email) => post('forgotten', { email })))
    for (const answer of answers) {
      expect(answer.status).toBe(202)
      expect(answer.body).toEqual({})
    }
    const before = test.mails.length
    await test.deps.jobs.drain()
    expect(test.mails.slice(before).map(({ to }) => to)).toEqual([known.email])
  })

  it('does the same work in the database while the request waits, so that time tells nothing', async () => {
    const { email } = await test.makePerson()
    const count = countStatements(test.deps.connection.pool)
    const statements = async (address: string) => {
      const before = count()
      await post('forgotten', { email: address }).expect(202)
      return count() - before
    }
    await statements(email)
    expect(await statements(email)).toBe(await statements('unknown@veldray.example'))
  })

  it('cannot be set with a link older than an hour', async () => {
    const { email } = await test.makePerson()
    const token = await askFor(email)
    clock.forward(hours - seconds)
    await post('link', { token }).expect(200)
    clock.forward(2 * seconds)
    await post('link', { token }).expect(410)
    await post('setting', { token, password: newPassword }).expect(410)
    expect(await signInStatus(email, testPassword)).toBe(200)
  })

  it('makes the other links of the person useless once one was used', async () => {
    const { email } = await test.makePerson()
    const [first, second] = [await askFor(email), await askFor(email)]
    await post('setting', { token: second, password: newPassword }).expect(200)
    await post('setting', { token: first, password: 'a third long password' }).expect(410)
  })

  it('is set once when one link is sent twice at the same time', async () => {
    const { email } = await test.makePerson()
    const token = await askFor(email)
    const sent = ['the first of two passwords', 'the second of two passwords'].map((password) =>
      post('setting', { token, password }),
    )
    expect((await Promise.all(sent)).map(({ status }) => status).sort()).toEqual([200, 410])
  })

  it('leaves no token in the database that could be used', async () => {
    const { id, email } = await test.makePerson()
    const token = await askFor(email)
    const rows = await test.deps.connection.db.select().from(passwordTokens).where(eq(passwordTokens.userId, id))
    expect(rows).toHaveLength(1)
    expect(JSON.stringify(rows)).not.toContain(token)
  })

  it('says nothing about a made-up link', async () => {
    const answer = await post('link', { token: 'x'.repeat(43) })
    expect(answer.body).toMatchObject({ status: 410, code: 'password/link-ended' })
  })
})

describe('a new password', () => {
  it.each([
    ['eleven characters', 'elevenchars', 'field/too-short'],
    ['201 characters', 'x'.repeat(201), 'field/too-long'],
  ])('is refused with %s', async (_what, password, code) => {
    const { email } = await test.makePerson()
    const answer = await post('setting', { token: await askFor(email), password })
    expect(answer.body).toMatchObject({ status: 400, fields: [{ path: 'password', code }] })
  })

  it('is refused when it is the address, and the link stays good', async () => {
    const { email } = await test.makePerson()
    const token = await askFor(email)
    const answer = await post('setting', { token, password: email.toUpperCase() })
    expect(answer.body).toMatchObject({ status: 400, fields: [{ path: 'password', code: 'password/like-email' }] })
    await post('setting', { token, password: newPassword }).expect(200)
  })
})

describe('an invitation', () => {
  it('lets the person choose name and password within seven days', async () => {
    const administrator = await test.signIn('administrator', { name: 'Head of the book' })
    const invitation = { email: 'new.hand@veldray.example', name: 'New hand', role: 'analyst' }
    const invited = await administrator.post('/api/people').send(invitation).expect(201)
    expect(invited.body).toMatchObject({ ...invitation, mayReview: false, state: 'invited' })
    const token = await tokenMailedTo(invitation.email)
    expect(test.mails.at(-1)!.text).toContain('Head of the book has made an account for you')
    clock.forward(7 * days - minutes)
    await post('setting', { token, password: newPassword, name: 'Right hand' }).expect(200)
    const answer = await request(test.app).post('/api/session').send({ email: invitation.email, password: newPassword })
    expect(answer.body.viewer).toMatchObject({ name: 'Right hand', role: 'analyst' })
  })

  it('can be sent again, which ends the earlier one, until the person joined', async () => {
    const administrator = await test.signIn('administrator')
    const email = 'late.hand@veldray.example'
    const { body } = await administrator.post('/api/people').send({ email, name: 'Late hand', role: 'reader' })
    const first = await tokenMailedTo(email)
    await administrator.post(`/api/people/${body.id}/invitation`).expect(200)
    const second = await tokenMailedTo(email)
    await post('link', { token: first }).expect(410)
    await post('setting', { token: second, password: newPassword }).expect(200)
    const refused = await administrator.post(`/api/people/${body.id}/invitation`)
    expect(refused.body).toMatchObject({ status: 409, code: 'people/already-joined' })
  })

  it('ends when the person is deactivated first', async () => {
    const administrator = await test.signIn('administrator')
    const email = 'unwanted.hand@veldray.example'
    const { body } = await administrator.post('/api/people').send({ email, name: 'Unwanted hand', role: 'reader' })
    const token = await tokenMailedTo(email)
    await administrator.patch(`/api/people/${body.id}`).send({ rowVersion: 1, active: false }).expect(200)
    await post('setting', { token, password: newPassword }).expect(410)
    const refused = await administrator.post(`/api/people/${body.id}/invitation`)
    expect(refused.body.code).toBe('people/deactivated')
  })
})

describe('one’s own password', () => {
  it('changes with the present one; this browser stays signed in under a new id, others do not', async () => {
    const person = await test.signIn('steward')
    const elsewhere = await test.signInAs(person.email)
    const change = { currentPassword: testPassword, newPassword }
    const answer = await person.put('/api/account/password').send(change).expect(200)
    expect(answer.body.csrfToken).not.toBe(person.csrfToken)
    expect((await person.get('/api/session')).body.viewer.id).toBe(person.id)
    expect((await elsewhere.get('/api/session')).body.viewer.id).toBeNull()
    expect(await signInStatus(person.email, newPassword)).toBe(200)
    await test.deps.jobs.drain()
    expect(test.mails.at(-1)).toMatchObject({ to: person.email, subject: 'Your password for New region was changed' })
    const [entry] = await test.deps.connection.db.select().from(auditTrail).where(eq(auditTrail.actorId, person.id))
    expect(entry).toMatchObject({ action: 'password/change', subject: 'person', subjectId: person.id, details: {} })
  })

  it('stays without the present one', async () => {
    const person = await test.signIn('reader')
    const change = { currentPassword: 'not the present one', newPassword }
    const answer = await person.put('/api/account/password').send(change)
    expect(answer.body).toMatchObject({ status: 400, fields: [{ path: 'currentPassword', code: 'password/wrong' }] })
    expect(await signInStatus(person.email, testPassword)).toBe(200)
  })
})
