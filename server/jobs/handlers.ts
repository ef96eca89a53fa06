import { createServices } from '../api/services.ts'
import type { Deps } from '../deps.ts'
import { mailResetLink } from '../api/password/forgotten.ts'
import { cleanUp } from './handlers/clean-up.ts'
import { deliverMail } from './handlers/deliver-mail.ts'
import { liftEmbargoes } from './handlers/lift-embargoes.ts'
import { refitModels } from './handlers/refit-models.ts'

/** Every kind of job this program knows. To add one: its handler, and a line here. */
export function registerHandlers(deps: Deps): void {
  const { jobs } = deps
  const services = createServices(deps)
  jobs.handle('mail', deliverMail(deps))
  jobs.handle('forgotten-password', mailResetLink(deps))
  jobs.handle('clean-up', cleanUp(deps))
  jobs.handle('lift-embargoes', liftEmbargoes(services))
  jobs.handle('refit-models', refitModels(services))
}
