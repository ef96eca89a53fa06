import { beforeAll, describe, expect, it } from 'vitest'
import type { AuditAction } from '#shared/contracts/audit-trail.ts'
import { recordAudit } from '../../../server/api/audit-trail/record-audit.ts'
import { makeApp, useApp, type SignedIn } from '../../support/app.ts'
import { hours, makeClock } from '../../support/clock.ts'

const clock = makeClock(Date.UTC(2026, 2, 1))
const test = useApp({ now: clock.now })
let administrator: SignedIn

const audit = async (query: object) => (await administrator.get('/api/audit-trail').query(query).expect(200)).body
const actionsIn = async (query: object) => (await audit(query)).items.map(({ action }: { action: string }) => action)

describe('the audit trail', () => {
  beforeAll(async () => {
    administrator = await test.signIn('administrator', { name: 'Keeper' })
    const keeper = { id: administrator.id, name: 'Keeper' }
    const record = (action: AuditAction, subject: string, subjectId: number, viewer: typeof keeper | null) =>
      recordAudit(test.deps.connection.db, { viewer, at: clock.now(), action, subject, subjectId })
    await record('wells/create', 'well', 1, keeper)
    clock.forward(hours)
    await record('wells/edit', 'well', 1, keeper)
    clock.forward(hours)
    // As another version of the program may have recorded it.
    await record('wells-of-old/lift' as AuditAction, 'well', 2, null)
  })

  it('lists the newest first, with the program’s own work under its name', async () => {
    const { items, total } = await audit({})
    expect(total).toBe(3)
    expect(items[0]).toMatchObject({ action: 'wells-of-old/lift', actorId: null, actorName: 'Basinbook', details: {} })
    expect(items[0].at).toBe('2026-03-01T02:00:00.000Z')
  })

  it('finds by a whole action and by its area, which is not the beginning of another area', async () => {
    expect(await actionsIn({ action: 'wells/edit' })).toEqual(['wells/edit'])
    expect(await actionsIn({ action: 'wells' })).toEqual(['wells/edit', 'wells/create'])
    expect(await actionsIn({ action: 'w%' })).toEqual([])
  })

  it('finds by actor, subject and time, the end not included', async () => {
    expect(await actionsIn({ actor: 'keep', subject: 'well', subjectId: 1 })).toEqual(['wells/edit', 'wells/create'])
    expect(await actionsIn({ actorId: administrator.id, from: '2026-03-01T01:00:00Z' })).toEqual(['wells/edit'])
    expect(await actionsIn({ to: '2026-03-01T01:00:00Z' })).toEqual(['wells/create'])
    expect((await audit({ limit: 1, offset: 1 })).next).toBe(2)
  })

  it('refuses a time that is none', async () => {
    const answer = await administrator.get('/api/audit-trail?from=yesterday')
    expect(answer.body).toMatchObject({ status: 400, fields: [{ path: 'query.from', code: 'field/format' }] })
  })
})

describe('the outbox', () => {
  it('shows what was written, whether it went out, and the text of one message', async () => {
    const email = 'mailed@veldray.example'
    await administrator.post('/api/people').send({ email, name: 'Mailed', role: 'reader' }).expect(201)
    const waiting = (await administrator.get('/api/outbox?state=waiting').expect(200)).body
    expect(waiting.items).toMatchObject([{ recipient: email, state: 'waiting', sentAt: null, error: null }])
    expect(waiting.items[0]).not.toHaveProperty('body')
    await test.deps.jobs.drain()
    const sent = (await administrator.get('/api/outbox?search=MAILED@')).body
    expect(sent.items).toMatchObject([{ state: 'sent', sentAt: clock.now().toISOString() }])
    const message = (await administrator.get(`/api/outbox/${sent.items[0].id}`).expect(200)).body
    expect(message.body).toBe(test.mails.at(-1)!.text)
    await administrator.get('/api/outbox/999999').expect(404)
  })

  it('keeps no one-time link of a message that a mail server took', async () => {
    const { databaseUrl } = test.deps.config
    const mailing = makeApp({ url: databaseUrl, now: clock.now, config: { smtpUrl: 'smtp://mail.veldray.example' } })
    await administrator.post('/api/people').send({ email: 'linked@veldray.example', name: 'L', role: 'reader' })
    const bodyOf = async () => {
      const { items } = (await administrator.get('/api/outbox?search=linked@')).body
      return (await administrator.get(`/api/outbox/${items[0].id}`)).body.body as string
    }
    expect(await bodyOf()).toMatch(/set-password#[\w-]{43}\n/)
    await mailing.deps.jobs.drain()
    expect(mailing.mails.at(-1)!.text).toMatch(/set-password#[\w-]{43}\n/)
    expect(await bodyOf()).toContain('set-password#(link removed once sent)\n')
    await mailing.close()
  })
})
