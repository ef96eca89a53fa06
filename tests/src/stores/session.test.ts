import { useQuery } from '@pinia/colada'
import { describe, expect, it } from 'vitest'
import { defaultPreferences } from '#shared/contracts/account.ts'
import { usePreferences } from '../../../src/stores/preferences.ts'
import { useSession } from '../../../src/stores/session.ts'
import { fakeServer, refuse } from '../support/fake-server.ts'
import { runWith, settle } from '../support/mount.ts'
import { makeRegion, makeSession, makeVisitor } from '../support/session.ts'

describe('the session', () => {
  it('lets a role do what the permissions say', () => {
    const analyst = runWith(useSession, makeSession({ role: 'analyst' }))
    expect([analyst.can('wells/create'), analyst.can('people/manage')]).toEqual([true, false])
  })

  it('opens the map to visitors only where the region is open', () => {
    const open = makeVisitor({ region: makeRegion({ openToVisitors: true }) })
    expect(runWith(useSession, makeVisitor()).can('map/read')).toBe(false)
    expect(runWith(useSession, open).can('map/read')).toBe(true)
  })

  it('becomes that of the person who signs in, with their preferences', async () => {
    const preferences = { ...defaultPreferences, theme: 'dark' as const, unitSystem: 'us' as const }
    fakeServer({
      'POST /api/session': ({ body }) =>
        (body as { password: string }).password === 'right'
          ? { body: makeSession({ name: 'Bo' }, { preferences }) }
          : refuse('session/wrong'),
    })
    const { session, chosen } = runWith(() => ({ session: useSession(), chosen: usePreferences() }), makeVisitor())
    await expect(session.signInWith({ email: 'bo@veldray.example', password: 'wrong' })).rejects.toThrow(
      'The e-mail address or the password is not right.',
    )
    expect(session.signedIn).toBe(false)
    await session.signInWith({ email: 'bo@veldray.example', password: 'right' })
    expect([session.viewer.name, chosen.theme, chosen.unitSystem.id]).toEqual(['Bo', 'dark', 'us'])
  })

  const reading = (answers: string[]) => () => {
    const session = useSession()
    const { data } = useQuery({ key: ['wells', 1], query: async () => answers.shift() ?? 'nothing more' })
    return { session, data }
  }

  it('of another person shows nothing that was fetched for the one before', async () => {
    const { session, data } = runWith(reading(['internal']), makeSession({ role: 'steward' }))
    await settle()
    expect(data.value).toBe('internal')
    session.enter(makeSession({ id: 8, role: 'reader' }))
    expect(data.value).toBeUndefined()
  })

  it('of the same person with another role keeps the page and fetches it anew', async () => {
    const { session, data } = runWith(reading(['as a steward', 'as a reader']), makeSession({ role: 'steward' }))
    await settle()
    session.enter(makeSession({ role: 'reader' }))
    expect(data.value).toBe('as a steward')
    await settle()
    expect(data.value).toBe('as a reader')
  })
})
