import { Router, json } from 'express'
import type { Deps } from '../deps.ts'
import { csrfGuard } from '../middleware/csrf.ts'
import { createRateLimiters } from '../middleware/rate-limit.ts'
import { databaseRateStore } from '../middleware/rate-limit-store.ts'
import { sessions } from '../middleware/sessions.ts'
import { viewerOf, withViewer } from '../middleware/viewer.ts'
import { mountRoutes } from './mount.ts'
import type { Route } from './registry.ts'
import { createServices, type Services } from './services.ts'

/** Every route of the program. To add a resource: its routes file, and a line here. */
export function allRoutes(_services: Services, _deps: Deps): Route[] {
  return []
}

export function apiRouter(deps: Deps): Router {
  const services = createServices(deps)
  const router = Router()
  router.use('/api', sessions(deps), withViewer(deps), csrfGuard(deps.config), json({ limit: '1mb' }))
  router.use(
    mountRoutes(allRoutes(services, deps), {
      limiters: createRateLimiters(() => databaseRateStore(deps)),
      viewerOf,
      regionAccess: services.region.access,
    }),
  )
  return router
}
