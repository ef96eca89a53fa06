import { passwordChange, preferences } from '#shared/contracts/account.ts'
import { session } from '#shared/contracts/session.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function accountRoutes({ account, session: sessions }: Services): Route[] {
  const action = 'account/edit'
  return [
    route(
      {
        method: 'put',
        path: '/api/account/preferences',
        action,
        summary: 'Keep own preferences',
        body: preferences,
        response: preferences,
      },
      ({ viewer, body }) => account.savePreferences(viewer, body),
    ),
    route(
      {
        method: 'put',
        path: '/api/account/password',
        action,
        summary: 'Change own password',
        body: passwordChange,
        response: session,
        limit: 'sign-in',
      },
      async ({ req, viewer, body }) => {
        await account.changePassword(viewer, body)
        return sessions.begin(req, viewer.id!)
      },
    ),
  ]
}
