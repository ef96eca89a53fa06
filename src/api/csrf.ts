import { z } from 'zod'
import { ApiProblem, parseJson } from './problem.ts'
import { transport } from './transport.ts'

const answer = z.object({
  csrfToken: z.string().nullable(),
  viewer: z.object({ id: z.number().nullable() }),
})

interface Holder {
  csrfToken: string | null
  viewer: { id: number | null }
}

/** Null for a visitor: there is nothing to protect. */
let token: string | null = null
/** Whose page this is; null for a visitor's. */
let owner: number | null = null

/** Takes over the token of the session that an answer describes, and whose session it is. */
export function holdCsrfToken({ csrfToken: given, viewer }: Holder) {
  token = given
  owner = viewer.id
}

export const csrfToken = () => token

/**
 * Asks for the token that belongs to the present session. The cookie is one for all windows of a browser: when somebody
 * else has signed in in another window, the token is not taken, because the page's entries are not theirs.
 * @returns whether the session is still that of the page's person, or nobody's
 */
export async function refreshCsrfToken(): Promise<boolean> {
  const { status, body } = await transport({ method: 'GET', path: '/api/session', headers: {}, body: null })
  const parsed = answer.safeParse(parseJson(body))
  if (!parsed.success) throw ApiProblem.fromBody(status, body)
  const { id } = parsed.data.viewer
  if (owner !== null && id !== null && id !== owner) return false
  token = parsed.data.csrfToken
  return true
}
