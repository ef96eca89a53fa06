import { eq } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import { auditTrail, users } from '../../../server/db/schema/index.ts'
import { useApp, type SignedIn } from '../../support/app.ts'

const test = useApp()
let administrator: SignedIn
beforeAll(async () => {
  administrator = await test.signIn('administrator', { name: 'Keeper of the book' })
})

const hostile = [
  '<img src=x onerror="alert(1)">',
  "'; DROP TABLE users; --",
  '=HYPERLINK("http://elsewhere.example")',
  'Zo\u00eb \u{1F4A7} O\u2019Neill',
]
const invite = (email: string, more: object = {}) =>
  administrator.post('/api/people').send({ email, name: 'Somebody', role: 'reader', ...more })
const edit = (id: number, body: object) => administrator.patch(`/api/people/${id}`).send(body)
const auditOf = (id: number) =>
  test.deps.connection.db.select().from(auditTrail).where(eq(auditTrail.subjectId, id)).orderBy(auditTrail.id)

describe('the list of people', () => {
  it('comes by name, in pages, and is searched by parts of name and address', async () => {
    for (const number of [1, 2, 3, 4, 5])
      await test.makePerson({ name: `Paged ${number}`, email: `p${number}@paged.example` })
    const first = await administrator.get('/api/people?search=paged&limit=2').expect(200)
    expect(first.body).toMatchObject({ total: 5, next: 2, items: [{ name: 'Paged 1' }, { name: 'Paged 2' }] })
    const last = await administrator.get('/api/people?search=PAGED.example&limit=2&offset=4')
    expect(last.body).toMatchObject({ total: 5, next: null, items: [{ name: 'Paged 5' }] })
    const beyond = await administrator.get('/api/people?search=paged&limit=2&offset=40')
    expect(beyond.body).toEqual({ total: 5, next: null, items: [] })
  })

  it('takes the wild cards of SQL for what they are', async () => {
    await test.makePerson({ name: '100% sure_fire' })
    const found = async (search: string) =>
      (await administrator.get('/api/people').query({ search })).body.items.map(({ name }: { name: string }) => name)
    expect(await found('%')).toEqual(['100% sure_fire'])
    expect(await found('e_f')).toEqual(['100% sure_fire'])
    expect(await found("' or 1=1 --")).toEqual([])
  })

  it('filters by role and state', async () => {
    const { id } = await test.makePerson({ role: 'steward', active: false, name: 'Former steward' })
    const invited = await invite('state@veldray.example')
    const idsOf = async (query: object) =>
      (await administrator.get('/api/people').query(query)).body.items.map((item: { id: number }) => item.id)
    expect(await idsOf({ state: 'deactivated', role: 'steward' })).toEqual([id])
    expect(await idsOf({ state: 'invited' })).toContain(invited.body.id)
    expect(await idsOf({ state: 'active' })).not.toContain(invited.body.id)
  })

  it('never tells password hashes', async () => {
    const answer = await administrator.get('/api/people?limit=500')
    expect(JSON.stringify(answer.body)).not.toMatch(/argon2|passwordHash/)
  })
})

describe('inviting', () => {
  it.each(hostile)('keeps the name %s as it was typed and harms nothing', async (name) => {
    const email = `hostile-${hostile.indexOf(name)}@veldray.example`
    const { body } = await invite(email, { name }).expect(201)
    expect((await administrator.get(`/api/people/${body.id}`)).body.name).toBe(name)
    await test.deps.jobs.drain()
    expect(test.mails.find(({ to }) => to === email)!.text).toContain(`Hello ${name},`)
  })

  it('refuses an address that is on the list, in any case', async () => {
    await invite('taken@veldray.example').expect(201)
    const answer = await invite('TAKEN@veldray.example')
    expect(answer.body).toMatchObject({ status: 400, fields: [{ path: 'email', code: 'people/address-taken' }] })
  })

  it('refuses what is no address, with line breaks meant for mail headers among them', async () => {
    for (const email of ['', 'nobody', 'a@b', 'a@veldray.example\nBcc: b@veldray.example', 'ünicode@veldray.example'])
      expect((await invite(email)).body).toMatchObject({ status: 400, fields: [{ path: 'email' }] })
  })

  it('keeps a mail’s subject and greeting on one line, whatever people are called', async () => {
    const email = 'lines@veldray.example'
    await invite(email, { name: 'Two\r\nBcc: somebody@veldray.example' }).expect(201)
    await test.deps.jobs.drain()
    const mail = test.mails.find(({ to }) => to === email)!
    expect(mail.text).toContain('Hello Two Bcc: somebody@veldray.example,')
    expect(mail.subject).not.toMatch(/[\r\n]/)
  })

  it('gives no review right to a reader', async () => {
    const answer = await invite('eager@veldray.example', { mayReview: true })
    const refused = { status: 400, fields: [{ path: 'mayReview', code: 'people/review-needs-analyst' }] }
    expect(answer.body).toMatchObject(refused)
    const { id } = await test.makePerson({ role: 'analyst', mayReview: true })
    expect((await edit(id, { rowVersion: 1, role: 'reader' })).body).toMatchObject(refused)
    await edit(id, { rowVersion: 1, role: 'reader', mayReview: false }).expect(200)
  })

  it('leaves person, mail and audit record, or none of them', async () => {
    const email = 'all-or-none@veldray.example'
    const { body } = await invite(email).expect(201)
    expect(await auditOf(body.id)).toMatchObject([
      { action: 'people/invite', actorId: administrator.id, actorName: 'Keeper of the book', details: { email } },
    ])
    const before = await administrator.get('/api/outbox')
    await invite(email).expect(400)
    expect((await administrator.get('/api/outbox')).body.total).toBe(before.body.total)
    expect(await test.deps.connection.db.$count(users, eq(users.email, email))).toBe(1)
  })
})

describe('editing', () => {
  it('changes rights and records what was and what is', async () => {
    const { id } = await test.makePerson({ role: 'reader', name: 'Before' })
    const answer = await edit(id, { rowVersion: 1, role: 'analyst', mayReview: true, name: 'After' }).expect(200)
    expect(answer.body).toMatchObject({ role: 'analyst', mayReview: true, name: 'After', rowVersion: 2 })
    expect((await auditOf(id))[0]!.details).toEqual({
      name: ['Before', 'After'],
      role: ['reader', 'analyst'],
      mayReview: [false, true],
    })
  })

  it('tells the second of two who edit one person that the first was faster', async () => {
    const { id } = await test.makePerson({ role: 'reader' })
    const answers = await Promise.all([
      edit(id, { rowVersion: 1, role: 'analyst' }),
      edit(id, { rowVersion: 1, role: 'steward' }),
    ])
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409])
    expect(answers.find(({ status }) => status === 409)!.body.code).toBe('edit/conflict')
    expect(await auditOf(id)).toHaveLength(1)
  })

  it('answers 404 for nobody, and 400 for what is not written as an id', async () => {
    await edit(987_654, { rowVersion: 1, name: 'Nobody' }).expect(404)
    for (const id of ['0x1', '1e0', '01', '-1', '1.0', '1%20or%201=1', '9'.repeat(30)])
      await administrator.get(`/api/people/${id}`).expect(400)
  })
})

describe('the last administrator', () => {
  const others = async (active: boolean) => {
    await test.deps.connection.db.update(users).set({ active }).where(eq(users.role, 'administrator'))
    await test.deps.connection.db.update(users).set({ active: true }).where(eq(users.id, administrator.id))
  }
  const versionOf = async (id: number) => (await administrator.get(`/api/people/${id}`)).body.rowVersion as number

  it('can neither be demoted nor deactivated, but renamed', async () => {
    await others(false)
    const rowVersion = await versionOf(administrator.id)
    for (const change of [{ role: 'steward' }, { active: false }]) {
      const answer = await edit(administrator.id, { rowVersion, ...change })
      expect(answer.body).toMatchObject({ status: 409, code: 'people/last-administrator' })
    }
    await edit(administrator.id, { rowVersion, name: 'Still keeper' }).expect(200)
  })

  it('is not replaced by one who was invited and never came', async () => {
    await invite('absent@veldray.example', { role: 'administrator' }).expect(201)
    const rowVersion = await versionOf(administrator.id)
    const answer = await edit(administrator.id, { rowVersion, role: 'steward' })
    expect(answer.body.code).toBe('people/last-administrator')
  })

  it('remains when two administrators demote each other at the same moment', async () => {
    const second = await test.signIn('administrator')
    const answers = await Promise.all([
      edit(second.id, { rowVersion: await versionOf(second.id), role: 'steward' }),
      second
        .patch(`/api/people/${administrator.id}`)
        .send({ rowVersion: await versionOf(administrator.id), role: 'steward' }),
    ])
    const left = await test.deps.connection.db.select().from(users).where(eq(users.role, 'administrator'))
    expect(left.filter(({ active, passwordHash }) => active && passwordHash !== null)).toHaveLength(1)
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1)
  })
})
