import { z } from 'zod'
import { ApiProblem, parseJson } from './problem.ts'
import { transport } from './transport.ts'

const answer = z.object({ csrfToken: z.string().nullable() })

/** Null for a visitor: there is nothing to protect. */
let token: string | null = null

export const setCsrfToken = (given: string | null) => {
  token = given
}

export const csrfToken = () => token

/** Asks for the token that belongs to the present session. */
export async function refreshCsrfToken(): Promise<void> {
  const { status, body } = await transport({ method: 'GET', path: '/api/session', headers: {}, body: null })
  const parsed = answer.safeParse(parseJson(body))
  if (!parsed.success) throw ApiProblem.fromBody(status, body)
  token = parsed.data.csrfToken
}
