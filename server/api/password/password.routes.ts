import { nothing } from '#shared/contracts/common.ts'
import {
  forgottenPassword,
  linkAnswer,
  linkQuestion,
  passwordSetting,
  passwordWasSet,
} from '#shared/contracts/password.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function passwordRoutes({ password }: Services): Route[] {
  const action = 'password/reset'
  return [
    route(
      {
        method: 'post',
        path: '/api/password/forgotten',
        action,
        summary: 'Ask for a link that sets a new password',
        body: forgottenPassword,
        response: nothing,
        status: 202,
        limit: 'mail',
      },
      ({ body }) => password.forgotten(body),
    ),
    route(
      {
        method: 'post',
        path: '/api/password/link',
        action,
        summary: 'Ask what a link is for',
        body: linkQuestion,
        response: linkAnswer,
        limit: 'sign-in',
      },
      ({ body }) => password.lookAt(body.token),
    ),
    route(
      {
        method: 'post',
        path: '/api/password/setting',
        action,
        summary: 'Set a password with a link',
        body: passwordSetting,
        response: passwordWasSet,
        limit: 'sign-in',
      },
      ({ body }) => password.set(body),
    ),
  ]
}
