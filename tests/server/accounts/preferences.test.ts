import { eq } from 'drizzle-orm'
import { describe, expect, it } from 'vitest'
import { defaultPreferences, readPreferences } from '#shared/contracts/account.ts'
import { users } from '../../../server/db/schema/index.ts'
import { useApp } from '../../support/app.ts'

const test = useApp()
const makePreferences = (overrides: object = {}) => ({
  ...defaultPreferences,
  theme: 'dark',
  unitSystem: 'us',
  ...overrides,
})

describe('preferences', () => {
  it('are kept with the person, through signing in again', async () => {
    const person = await test.signIn('reader')
    expect((await person.get('/api/session')).body.preferences).toEqual(defaultPreferences)
    await person.put('/api/account/preferences').send(makePreferences()).expect(200, makePreferences())
    const again = await test.signInAs(person.email)
    expect((await again.get('/api/session')).body.preferences).toEqual(makePreferences())
  })

  it.each([
    [{ theme: 'sepia' }, 'theme'],
    [{ unitSystem: 'furlongs' }, 'unitSystem'],
    [{ version: 2 }, 'version'],
    [{ drawdownDirection: null }, 'drawdownDirection'],
  ])('are refused with %j', async (change, path) => {
    const person = await test.signIn('reader')
    const answer = await person.put('/api/account/preferences').send(makePreferences(change))
    expect(answer.body).toMatchObject({ status: 400, fields: [{ path, code: 'field/choice' }] })
  })

  it('fall back to the defaults when what was kept is no longer understood', async () => {
    const person = await test.signIn('reader')
    const unknown = { version: 0, colours: 'loud' }
    await test.deps.connection.db.update(users).set({ preferences: unknown }).where(eq(users.id, person.id))
    expect((await person.get('/api/session').expect(200)).body.preferences).toEqual(defaultPreferences)
    expect(readPreferences(null)).toEqual(defaultPreferences)
  })

  it('leave a person’s row version alone, so that an administrator’s edit does not meet a conflict', async () => {
    const administrator = await test.signIn('administrator')
    const person = await test.signIn('reader')
    await person.put('/api/account/preferences').send(makePreferences()).expect(200)
    await administrator.patch(`/api/people/${person.id}`).send({ rowVersion: 1, name: 'Renamed' }).expect(200)
  })
})
