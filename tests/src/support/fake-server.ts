import { vi } from 'vitest'
import type { Problem } from '#shared/contracts/problem.ts'
import { errorStatus, errorText, type ErrorCode } from '#shared/words/errors/index.ts'

export interface Asked {
  method: string
  path: string
  headers: Headers
  body: unknown
}

type Answer = { status?: number; body: unknown } | 'unreachable'
export type Rules = Record<string, (asked: Asked) => Answer>

export const makeProblem = (code: ErrorCode, overrides: Partial<Problem> = {}): Problem => ({
  type: 'about:blank',
  title: errorText(code),
  status: errorStatus(code),
  code,
  detail: errorText(code),
  params: {},
  fields: [],
  requestId: 'r-1',
  ...overrides,
})

export const refuse = (code: ErrorCode, overrides: Partial<Problem> = {}): Answer => ({
  status: errorStatus(code),
  body: makeProblem(code, overrides),
})

const asText = (body: unknown) => (typeof body === 'string' ? body : JSON.stringify(body))

/**
 * A server in place of `fetch`, with a rule per "METHOD /path". What it was asked is kept, so that a rule can judge
 * by its own state, as a real server does.
 */
export function fakeServer(rules: Rules): { asked: Asked[] } {
  const asked: Asked[] = []
  vi.stubGlobal('fetch', async (path: string, init: RequestInit = {}) => {
    init.signal?.throwIfAborted()
    const body = typeof init.body === 'string' ? JSON.parse(init.body) : null
    const request = { method: init.method ?? 'GET', path, headers: new Headers(init.headers), body }
    asked.push(request)
    const rule = rules[`${request.method} ${path.split('?')[0]}`]
    const answer = rule ? rule(request) : refuse('request/not-found')
    if (answer === 'unreachable') throw new TypeError('Failed to fetch')
    return new Response(asText(answer.body), { status: answer.status ?? 200 })
  })
  return { asked }
}
