import { nothing } from '#shared/contracts/common.ts'
import {
  linkAnswer,
  passwordWasSet,
  type ForgottenPassword,
  type LinkAnswer,
  type PasswordSetting,
} from '#shared/contracts/password.ts'
import { api } from './client.ts'

/** Answers the same whether or not somebody has this address. */
export const askForPasswordLink = (body: ForgottenPassword) =>
  api.post('/api/password/forgotten', { body, response: nothing })

/** Whom a mailed link is for. @throws ApiProblem password/link-ended */
export const readPasswordLink = (token: string): Promise<LinkAnswer> =>
  api.post('/api/password/link', { body: { token }, response: linkAnswer })

export const setPassword = (body: PasswordSetting): Promise<{ email: string }> =>
  api.post('/api/password/setting', { body, response: passwordWasSet })
