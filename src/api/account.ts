import { preferences, type PasswordChange, type Preferences } from '#shared/contracts/account.ts'
import { session, type Session } from '#shared/contracts/session.ts'
import { api } from './client.ts'
import { holdCsrfToken } from './csrf.ts'

export const savePreferences = (body: Preferences): Promise<Preferences> =>
  api.put('/api/account/preferences', { body, response: preferences })

/** Ends the person's other sessions; this one goes on with a new token. */
export async function changePassword(body: PasswordChange): Promise<Session> {
  const answer = await api.put('/api/account/password', { body, response: session })
  holdCsrfToken(answer)
  return answer
}
