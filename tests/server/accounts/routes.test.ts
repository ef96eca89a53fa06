import type { AddressInfo } from 'node:net'
import { createServer, type Server } from 'node:http'
import type { Express, Router } from 'express'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { actions, can, visitor, type Role, type Viewer } from '#shared/contracts/permissions.ts'
import { allRoutes } from '../../../server/api/index.ts'
import type { Route } from '../../../server/api/registry.ts'
import { createServices } from '../../../server/api/services.ts'
import { useApp, type SignedIn } from '../../support/app.ts'

const test = useApp()
let server: Server
let routes: Route[]

beforeAll(async () => {
  routes = allRoutes(createServices(test.deps), test.deps)
  server = createServer(test.app).listen(0, '127.0.0.1')
  await new Promise((resolve) => server.once('listening', resolve))
})
afterAll(() => void server.close())

const named = ({ method, path }: Pick<Route, 'method' | 'path'>) => `${method} ${path}`

/** `rawPath` is where a layer is mounted, as it was written. */
type Layer = Router['stack'][number] & { rawPath: string }

/** Every route that Express would answer, under the path where its router is mounted. */
function routesOf(router: Router, mounted = ''): string[] {
  return (router.stack as Layer[]).flatMap((layer) => {
    if (layer.route) {
      const { path, stack } = layer.route
      return stack.flatMap(({ method }) => (method ? [`${method} ${mounted}${path}`] : []))
    }
    const inner = layer.handle as unknown as Partial<Router>
    if (!inner.stack) return []
    return routesOf(inner as Router, mounted + layer.rawPath.replace(/\/$/, ''))
  })
}

/** Pictures without any record in them, served to everybody before a session is looked up. */
const publicPictures = /^get \/tiles\//

describe('the registry', () => {
  it('knows every route that Express answers, and Express every route that it knows', () => {
    const answered = routesOf((test.app as Express).router as unknown as Router)
    const outside = answered.filter((name) => !publicPictures.test(name))
    expect([...new Set(outside)].sort()).toEqual(routes.map(named).sort())
    expect(outside.length).toBeGreaterThan(20)
  })

  it('holds no address twice, and no action that `can` does not know', () => {
    expect(new Set(routes.map(named)).size).toBe(routes.length)
    expect(routes.filter(({ action }) => !(action in actions)).map(named)).toEqual([])
  })

  it('reads the tiles without a session, and everything under /api with one', () => {
    expect(routes.filter(({ path }) => !path.startsWith('/api/')).map(named)).toEqual(['get /healthz', 'get /readyz'])
  })
})

interface Asker {
  label: string
  role: Role | null
  mayReview: boolean
}

const askers: Asker[] = [
  { label: 'visitor', role: null, mayReview: false },
  { label: 'reader', role: 'reader', mayReview: false },
  { label: 'analyst', role: 'analyst', mayReview: false },
  { label: 'reviewing analyst', role: 'analyst', mayReview: true },
  { label: 'steward', role: 'steward', mayReview: false },
  { label: 'reviewing steward', role: 'steward', mayReview: true },
  { label: 'administrator', role: 'administrator', mayReview: false },
]

const filled = (path: string) => path.replace(/:\w+/g, '4000000000')

async function statusOf({ method, path }: Route, person: SignedIn | null): Promise<number> {
  const cookies = person ? await cookieOf(person) : ''
  const headers = { cookie: cookies, 'x-csrf-token': person?.csrfToken ?? '', 'content-type': 'application/json' }
  const write = method === 'get' ? {} : { body: '{}' }
  const address = `http://127.0.0.1:${(server.address() as AddressInfo).port}${filled(path)}`
  const answer = await fetch(address, { method: method.toUpperCase(), headers, ...write })
  // A progress stream would never end by itself.
  await answer.body?.cancel()
  return answer.status
}

async function cookieOf({ agent }: SignedIn): Promise<string> {
  const jar = (agent as unknown as { jar: { getCookies(access: object): { toValueString(): string }[] } }).jar
  const { CookieAccessInfo } = await import('cookiejar')
  return jar
    .getCookies(CookieAccessInfo.All)
    .map((cookie) => cookie.toValueString())
    .join('; ')
}

describe.each(askers)('a $label', ({ role, mayReview }) => {
  let person: SignedIn | null = null
  let viewer: Viewer = visitor
  beforeAll(async () => {
    if (role === null) return
    person = await test.signIn(role, { mayReview })
    viewer = { id: person.id, name: '', role, mayReview }
  })

  it('is let in exactly where the permissions say', async () => {
    const ending = (route: Route) => Number(route.action === 'session/sign-out')
    const wrong: string[] = []
    for (const route of [...routes].sort((a, b) => ending(a) - ending(b))) {
      const status = await statusOf(route, person)
      const refused = viewer.id === null ? 401 : 403
      const fits = can(viewer, route.action) ? ![401, 403, 429].includes(status) && status < 500 : status === refused
      if (!fits) wrong.push(`${named(route)}: ${status}`)
    }
    expect(wrong).toEqual([])
  })
})
