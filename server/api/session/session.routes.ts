import { session, signIn } from '#shared/contracts/session.ts'
import type { Deps } from '../../deps.ts'
import { cookieName, cookieOptions } from '../../middleware/sessions.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function sessionRoutes({ session: sessions }: Services, { config }: Deps): Route[] {
  const path = '/api/session'
  return [
    route(
      {
        method: 'get',
        path,
        action: 'session/read',
        summary: 'Who is signed in, with token, region and preferences',
        response: session,
      },
      ({ req }) => sessions.describe(req),
    ),
    route(
      {
        method: 'post',
        path,
        action: 'session/sign-in',
        summary: 'Sign in',
        body: signIn,
        response: session,
        limit: 'sign-in',
      },
      ({ req, body }) => sessions.signIn(req, body),
    ),
    route(
      { method: 'delete', path, action: 'session/sign-out', summary: 'Sign out', response: session },
      async ({ req, res }) => {
        const answer = await sessions.signOut(req)
        res.clearCookie(cookieName(config), cookieOptions(config))
        return answer
      },
    ),
  ]
}
