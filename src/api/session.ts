import { session, type Session, type SignIn } from '#shared/contracts/session.ts'
import { api } from './client.ts'
import { holdCsrfToken } from './csrf.ts'

/** Keeps the token of the session that the answer describes. */
async function entered(answer: Promise<Session>): Promise<Session> {
  const given = await answer
  holdCsrfToken(given)
  return given
}

export const fetchSession = (): Promise<Session> => entered(api.get('/api/session', { response: session }))

export const signIn = (body: SignIn): Promise<Session> => entered(api.post('/api/session', { body, response: session }))

export const signOut = (): Promise<Session> => entered(api.delete('/api/session', { response: session }))
