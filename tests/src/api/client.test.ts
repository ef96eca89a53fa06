import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { z } from 'zod'
import { api } from '../../../src/api/client.ts'
import { holdCsrfToken } from '../../../src/api/csrf.ts'
import { setApiHooks } from '../../../src/api/hooks.ts'
import { ApiProblem, fieldText } from '../../../src/api/problem.ts'
import { fakeServer, refuse, type Asked } from '../support/fake-server.ts'

const well = z.object({ code: z.string() })
const problemOf = (work: Promise<unknown>) =>
  work.then(
    () => null,
    (error: ApiProblem) => error,
  )

beforeEach(() => holdCsrfToken({ csrfToken: 'token-1', viewer: { id: 7 } }))
afterEach(() => {
  setApiHooks({ signInAgain: async () => false, unavailable: () => undefined, anotherPerson: () => undefined })
  vi.unstubAllGlobals()
})

describe('an answer', () => {
  it('is parsed with its contract', async () => {
    fakeServer({ 'GET /api/wells/1': () => ({ body: { code: 'V-1', extra: true } }) })
    expect(await api.get('/api/wells/1', { response: well })).toEqual({ code: 'V-1' })
  })

  it('that does not keep its contract is a problem of its own', async () => {
    fakeServer({ 'GET /api/wells/1': () => ({ body: { code: 12 } }) })
    expect((await problemOf(api.get('/api/wells/1', { response: well })))?.code).toBe('client/unreadable')
  })

  it('with an error carries its sentence and the sentences of its fields', async () => {
    const fields = [{ path: 'code', code: 'field/too-long', params: { maximum: 20 } }]
    fakeServer({ 'POST /api/wells': () => refuse('request/invalid', { fields }) })
    const problem = await problemOf(api.post('/api/wells', { body: {}, response: well }))
    expect(problem?.message).toBe('Some fields cannot be used as they are. Correct the marked ones and send again.')
    expect(problem?.fields.map(fieldText)).toEqual(['At most 20 characters fit here.'])
  })

  it('of a proxy that stands in front of a silent server counts as no answer', async () => {
    fakeServer({ 'GET /api/wells/1': () => ({ status: 502, body: '<html>Bad gateway</html>' }) })
    expect((await problemOf(api.get('/api/wells/1', { response: well })))?.code).toBe('client/offline')
  })
})

describe('the query string', () => {
  it('leaves out what is empty and joins lists', async () => {
    const echo = (asked: Asked) => ({ body: { code: asked.path } })
    fakeServer({ 'GET /api/wells': echo })
    const query = { unit: 3, text: '', kind: null, ids: [1, 2], open: false }
    expect((await api.get('/api/wells', { query, response: well })).code).toBe('/api/wells?unit=3&ids=1%2C2&open=false')
  })
})

describe('a stale token', () => {
  it('is refreshed once and the request goes through with the new one', async () => {
    fakeServer({
      'GET /api/session': () => ({ body: { csrfToken: 'token-2', viewer: { id: 7 } } }),
      'PATCH /api/wells/1': ({ headers }) =>
        headers.get('X-CSRF-Token') === 'token-2' ? { body: { code: 'V-2' } } : refuse('request/csrf'),
    })
    expect(await api.patch('/api/wells/1', { body: {}, response: well })).toEqual({ code: 'V-2' })
  })

  it('that stays refused ends as a problem and not in a circle', async () => {
    const { asked } = fakeServer({
      'GET /api/session': () => ({ body: { csrfToken: 'token-2', viewer: { id: 7 } } }),
      'PATCH /api/wells/1': () => refuse('request/csrf'),
    })
    const problem = await problemOf(api.patch('/api/wells/1', { body: {}, response: well }))
    expect(problem?.code).toBe('request/csrf')
    expect(asked.length).toBeLessThan(8)
  })
})

describe('a token of somebody else, who signed in in another window', () => {
  it('is not taken: nothing is saved under their name, and the application is told', async () => {
    let told = 0
    setApiHooks({ anotherPerson: () => void (told += 1) })
    const { asked } = fakeServer({
      'GET /api/session': () => ({ body: { csrfToken: 'token-of-8', viewer: { id: 8 } } }),
      'PATCH /api/wells/1': ({ headers }) =>
        headers.get('X-CSRF-Token') === 'token-of-8' ? { body: { code: 'V-2' } } : refuse('request/csrf'),
    })
    const problem = await problemOf(api.patch('/api/wells/1', { body: {}, response: well }))
    expect([problem?.code, told]).toEqual(['client/another-person', 1])
    expect(asked.filter(({ method }) => method === 'PATCH')).toHaveLength(1)
  })
})

describe('an expired session', () => {
  const expiring = () => {
    let open = false
    const kept: Asked[] = []
    setApiHooks({ signInAgain: async () => (open = true), unavailable: () => undefined })
    fakeServer({
      'POST /api/wells': (asked) => {
        kept.push(asked)
        return open ? { body: { code: (asked.body as { code: string }).code } } : refuse('session/required')
      },
    })
    return kept
  }

  it('keeps the request, which goes through after signing in again', async () => {
    expiring()
    expect(await api.post('/api/wells', { body: { code: 'V-9' }, response: well })).toEqual({ code: 'V-9' })
  })

  it('repeats a POST under the same key, so that it cannot be done twice', async () => {
    const kept = expiring()
    await api.post('/api/wells', { body: { code: 'V-9' }, response: well })
    const keys = kept.map(({ headers }) => headers.get('Idempotency-Key'))
    expect(keys).toHaveLength(2)
    expect(new Set(keys).size).toBe(1)
    expect(keys[0]).toMatch(/^[0-9a-f]{32}$/)
  })

  it('is a problem when the reader does not sign in', async () => {
    fakeServer({ 'GET /api/wells/1': () => refuse('session/required') })
    expect((await problemOf(api.get('/api/wells/1', { response: well })))?.code).toBe('session/required')
  })
})

describe('a server that does not answer', () => {
  it.each([
    ['cannot be reached', 'unreachable' as const, 'client/offline'],
    ['has no database', refuse('server/unavailable'), 'server/unavailable'],
  ])('because it %s is told to the application and to the caller', async (_why, answer, code) => {
    let told = 0
    setApiHooks({ signInAgain: async () => false, unavailable: () => void (told += 1) })
    fakeServer({ 'GET /api/wells/1': () => answer })
    expect((await problemOf(api.get('/api/wells/1', { response: well })))?.code).toBe(code)
    expect(told).toBe(1)
  })
})

it('A request that was given up ends as AbortError, not as a problem', async () => {
  fakeServer({})
  const given = new AbortController()
  given.abort()
  const failure = await problemOf(api.get('/api/wells/1', { response: well, signal: given.signal }))
  expect(failure?.name).toBe('AbortError')
})
