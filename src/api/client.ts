import type { z } from 'zod'
import { address, newIdempotencyKey, type QueryValue } from './addresses.ts'
import { csrfToken, refreshCsrfToken } from './csrf.ts'
import { apiHooks } from './hooks.ts'
import { ApiProblem, parseJson } from './problem.ts'
import { transport, type Incoming } from './transport.ts'

export interface CallOptions<Answer extends z.ZodType> {
  /** The contract of the answer: every answer is parsed with it. */
  response: Answer
  query?: Record<string, QueryValue>
  signal?: AbortSignal | undefined
}

export interface WriteOptions<Answer extends z.ZodType> extends CallOptions<Answer> {
  /** Sent as JSON; a FormData is sent as it is. */
  body?: unknown
  /** Give the same key when the reader sends the same thing again (see useSubmit); made for each POST otherwise. */
  idempotencyKey?: string
  onProgress?: (share: number) => void
}

type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'

interface Call extends WriteOptions<z.ZodType> {
  method: Method
  path: string
}

/** How often one request may be repeated: after a fresh token, after signing in. */
const MAX_REPEATS = 2

function headersOf(call: Call): Record<string, string> {
  const headers: Record<string, string> = { Accept: 'application/json' }
  if (call.method === 'GET') return headers
  const token = csrfToken()
  if (token !== null) headers['X-CSRF-Token'] = token
  if (call.idempotencyKey) headers['Idempotency-Key'] = call.idempotencyKey
  if (!(call.body instanceof FormData)) headers['Content-Type'] = 'application/json'
  return headers
}

function bodyOf({ method, body }: Call): string | FormData | null {
  if (method === 'GET') return null
  return body instanceof FormData ? body : JSON.stringify(body ?? {})
}

const dispatch = (call: Call): Promise<Incoming> =>
  transport({
    method: call.method,
    path: address(call.path, call.query),
    headers: headersOf(call),
    body: bodyOf(call),
    signal: call.signal,
    onProgress: call.onProgress,
  })

/** Puts right what stood in the way; true when the request is worth repeating. */
async function recover(problem: ApiProblem, call: Call): Promise<boolean> {
  if (problem.status === 503) apiHooks().unavailable()
  if (problem.code === 'request/csrf') {
    if (await refreshCsrfToken()) return true
    apiHooks().anotherPerson()
    throw ApiProblem.of('client/another-person')
  }
  if (problem.code === 'session/required') return (await apiHooks().signInAgain()) && !call.signal?.aborted
  return false
}

async function attempt(call: Call): Promise<string | ApiProblem> {
  try {
    const { status, body } = await dispatch(call)
    return status < 400 ? body : ApiProblem.fromBody(status, body)
  } catch (error) {
    if (error instanceof ApiProblem) return error
    throw error
  }
}

async function send<Answer extends z.ZodType>(call: Call, response: Answer): Promise<z.output<Answer>> {
  for (let repeats = 0; ; repeats += 1) {
    const result = await attempt(call)
    if (typeof result === 'string') {
      const parsed = response.safeParse(parseJson(result || '{}'))
      if (parsed.success) return parsed.data
      throw ApiProblem.of('client/unreadable')
    }
    if (!(await recover(result, call)) || repeats >= MAX_REPEATS) throw result
  }
}

const writer =
  (method: Method) =>
  <Answer extends z.ZodType>(path: string, options: WriteOptions<Answer>): Promise<z.output<Answer>> =>
    send(
      { method, path, ...(method === 'POST' ? { idempotencyKey: newIdempotencyKey() } : {}), ...options },
      options.response,
    )

/**
 * The only way to the server.
 * @throws ApiProblem for every answer that is not a success, and when the server cannot be reached
 * @throws DOMException AbortError when the signal was aborted
 */
export const api = {
  get: <Answer extends z.ZodType>(path: string, options: CallOptions<Answer>): Promise<z.output<Answer>> =>
    send({ method: 'GET', path, ...options }, options.response),
  post: writer('POST'),
  put: writer('PUT'),
  patch: writer('PATCH'),
  delete: writer('DELETE'),
}
