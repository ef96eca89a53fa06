import request from 'supertest'
import { describe, expect, it } from 'vitest'
import { ensureFirstAdministratorLink } from '../../../server/api/password/first-administrator.ts'
import { demoAccounts, seedAccounts } from '../../../server/db/seed/accounts.ts'
import { useApp } from '../../support/app.ts'

const tokenOf = (link: string | null) => link!.split('#')[1]!

describe('an installation without people', () => {
  const test = useApp()
  const set = (body: object) => request(test.app).post('/api/password/setting').send(body)
  const password = 'the very first password'

  it('offers one link at a time, which makes the first administrator', async () => {
    const earlier = await ensureFirstAdministratorLink(test.deps)
    const link = await ensureFirstAdministratorLink(test.deps)
    expect(link).toMatch(/^http:\/\/127\.0\.0\.1:8080\/set-password#[\w-]{43}$/)
    await set({ token: tokenOf(earlier), password, email: 'a@veldray.example', name: 'A' }).expect(410)

    const token = tokenOf(link)
    const question = await request(test.app).post('/api/password/link').send({ token })
    expect(question.body).toEqual({ purpose: 'first-administrator', email: null, name: null })
    const nameless = await set({ token, password, email: 'first@veldray.example' })
    expect(nameless.body.fields).toEqual([{ path: 'name', code: 'field/required', params: {} }])
    await set({ token, password, email: 'First@Veldray.example', name: 'Founder' }).expect(200, {
      email: 'first@veldray.example',
    })

    const founder = await test.signInAs('first@veldray.example', password)
    const people = await founder.get('/api/people').expect(200)
    expect(people.body.items).toMatchObject([{ name: 'Founder', role: 'administrator', state: 'active', demo: false }])
    expect(await ensureFirstAdministratorLink(test.deps)).toBeNull()
  })
})

describe('the demo accounts', () => {
  const test = useApp()

  it('sign in on this computer, one per role and one who reviews, and are not doubled', async () => {
    await seedAccounts(test.deps, test.deps.connection.db)
    await seedAccounts(test.deps, test.deps.connection.db)
    for (const { email, password, role, mayReview } of demoAccounts) {
      const answer = await request(test.app).post('/api/session').send({ email, password }).expect(200)
      expect(answer.body.viewer).toMatchObject({ role, mayReview })
      expect(password.length).toBeGreaterThanOrEqual(12)
    }
    expect(new Set(demoAccounts.map(({ role }) => role)).size).toBe(4)
    expect(demoAccounts.some(({ role, mayReview }) => role === 'analyst' && mayReview)).toBe(true)
    const administrator = await test.signInAs(demoAccounts.at(-1)!.email, demoAccounts.at(-1)!.password)
    expect((await administrator.get('/api/people')).body.total).toBe(demoAccounts.length)
  })

  it('count as administrators only where they are let in', async () => {
    expect(await ensureFirstAdministratorLink(test.deps)).toBeNull()
    const open = { ...test.deps, config: { ...test.deps.config, host: '0.0.0.0' } }
    expect(await ensureFirstAdministratorLink(open)).toContain('/set-password#')
  })
})
