import { describe, expect, it } from 'vitest'
import { createMemoryHistory, createRouter } from 'vue-router'
import { actions, can, role, visitor, type Viewer } from '#shared/contracts/permissions.ts'
import { guard } from '../../../src/router/guards.ts'
import * as links from '../../../src/router/links.ts'
import { entriesFor, navigation, settingsPages } from '../../../src/router/navigation.ts'
import { routes } from '../../../src/router/routes.ts'
import { safeReturn } from '../../../src/router/safe-return.ts'
import { useSession } from '../../../src/stores/session.ts'
import { fakeServer } from '../support/fake-server.ts'
import { runWith } from '../support/mount.ts'
import { makeSession, makeVisitor } from '../support/session.ts'

const router = createRouter({ history: createMemoryHistory(), routes })
const makeViewer = (overrides: Partial<Viewer>): Viewer => ({ ...visitor, id: 1, ...overrides })
const everyPage = [...navigation, ...settingsPages]

/** What a link builder is called with; ids unless it stands here. */
const place = { lat: -38.4, lon: -21.2 }
const argumentsOf: Record<string, unknown[]> = {
  toNewWell: [place],
  toPlace: [place, 3],
  toSignInAs: ['ada@veldray.example'],
}

describe('the rail', () => {
  it.each(role.options)('shows a %s no entry whose page that role may not open', (given) => {
    const viewer = makeViewer({ role: given })
    for (const { to } of entriesFor(everyPage, (action) => can(viewer, action))) {
      const { meta } = router.resolve(to)
      expect(meta.action === undefined || can(viewer, meta.action)).toBe(true)
    }
  })

  it('has a page behind each entry', () => {
    for (const { to } of everyPage) expect(router.resolve(to).name).not.toBe('not-found')
  })

  it('keeps Settings last and away from readers', () => {
    expect(navigation.at(-1)?.title).toBe('Settings')
    const reader = makeViewer({ role: 'reader' })
    const seen = entriesFor(navigation, (action) => can(reader, action)).map(({ title }) => title)
    expect(seen).not.toContain('Settings')
  })

  it('shows a steward the jobs but not the people', () => {
    const steward = makeViewer({ role: 'steward' })
    const titles = entriesFor(settingsPages, (action) => can(steward, action)).map(({ title }) => title)
    expect(titles).toContain('Jobs')
    expect(titles).not.toContain('People')
  })

  it('gives no two entries the same key', () => {
    const keys = navigation.flatMap(({ key }) => key ?? [])
    expect(new Set(keys).size).toBe(keys.length)
  })
})

describe('a route', () => {
  it('names an action that exists, and has a title', () => {
    for (const { meta } of router.getRoutes()) {
      expect(meta.title).toBeTruthy()
      if (meta.action) expect(actions).toHaveProperty(meta.action)
    }
  })

  it('is reached by every link builder', () => {
    for (const [name, build] of Object.entries(links)) {
      const given = argumentsOf[name] ?? [1, 2, 3].slice(0, build.length)
      const link = (build as (...args: unknown[]) => links.Link)(...given)
      expect(router.resolve(link).name, name).not.toBe('not-found')
    }
  })
})

describe('the guard', () => {
  const goes = (path: string, session = makeVisitor()) => {
    fakeServer({ 'GET /api/session': () => ({ body: session }) })
    return runWith(() => guard(router.resolve(path)), session)
  }

  it('sends a visitor to sign in and remembers where they wanted to go', async () => {
    expect(await goes('/settings/people?page=2')).toEqual(links.toSignIn('/settings/people?page=2'))
  })

  it('lets a visitor open the pages for signing in', async () => {
    for (const path of ['/sign-in', '/forgotten-password', '/set-password']) expect(await goes(path)).toBe(true)
  })

  it('leads somebody who is signed in past the sign-in page', async () => {
    expect(await goes('/sign-in', makeSession())).toEqual(links.toHome())
  })

  it('leads from Settings to the first page that the role may open', async () => {
    expect(await goes('/settings', makeSession({ role: 'steward' }))).toEqual(links.toJobs())
    expect(await goes('/settings', makeSession({ role: 'administrator' }))).toEqual(links.toPeople())
  })

  it('leads from the root to the first entry of the rail', async () => {
    const session = makeSession({ role: 'administrator' })
    const first = runWith(() => entriesFor(navigation, useSession().can)[0]?.to, session)
    expect(await goes('/', session)).toEqual(first)
  })
})

describe('the way back after signing in', () => {
  it.each([
    ['/settings/people', '/settings/people'],
    ['//elsewhere.example/', '/'],
    ['/\\elsewhere.example/', '/'],
    ['https://elsewhere.example/', '/'],
    ['javascript:alert(1)', '/'],
    [undefined, '/'],
    [['/a', '/b'], '/'],
  ])('for %j is %s', (then, expected) => {
    expect(safeReturn(then)).toBe(expected)
  })
})
