import { Router, json, type RequestHandler } from 'express'
import type { Deps } from '../deps.ts'
import { csrfGuard } from '../middleware/csrf.ts'
import { createRateLimiters } from '../middleware/rate-limit.ts'
import { databaseRateStore } from '../middleware/rate-limit-store.ts'
import { sessions } from '../middleware/sessions.ts'
import { viewerOf, withViewer } from '../middleware/viewer.ts'
import { accountRoutes } from './account/account.routes.ts'
import { withDescription } from './api-description/api-description.routes.ts'
import { auditTrailRoutes } from './audit-trail/audit-trail.routes.ts'
import { healthRoutes } from './health/health.routes.ts'
import { jobsRoutes } from './jobs/jobs.routes.ts'
import { adoptedValuesRoutes } from './adopted-values/adopted-values.routes.ts'
import { analysesRoutes } from './analyses/analyses.routes.ts'
import { analysisReportsRoutes } from './analysis-reports/analysis-reports.routes.ts'
import { estimatesRoutes } from './estimates/estimates.routes.ts'
import { pumpingTestsRoutes } from './pumping-tests/pumping-tests.routes.ts'
import { readingSeriesRoutes } from './reading-series/reading-series.routes.ts'
import { reviewsRoutes } from './reviews/reviews.routes.ts'
import { aquiferUnitsRoutes } from './aquifer-units/aquifer-units.routes.ts'
import { boundariesRoutes } from './boundaries/boundaries.routes.ts'
import { correctionsRoutes } from './corrections/corrections.routes.ts'
import { otherWellsRoutes } from './other-wells/other-wells.routes.ts'
import { outsideSeriesRoutes } from './outside-series/outside-series.routes.ts'
import { mapRoutes } from './map/map.routes.ts'
import { searchRoutes } from './search/search.routes.ts'
import { streamsRoutes } from './streams/streams.routes.ts'
import { unitStatisticsRoutes } from './unit-statistics/unit-statistics.routes.ts'
import { wellsRoutes } from './wells/wells.routes.ts'
import { mountRoutes } from './mount.ts'
import { outboxRoutes } from './outbox/outbox.routes.ts'
import { passwordRoutes } from './password/password.routes.ts'
import { peopleRoutes } from './people/people.routes.ts'
import { regionRoutes } from './region/region.routes.ts'
import type { Route } from './registry.ts'
import { visibilityRoutes } from './visibility/visibility.routes.ts'
import { createServices, type Services } from './services.ts'
import { sessionRoutes } from './session/session.routes.ts'

/** Every route of the program. To add a resource: its routes file, and a line here. */
export function allRoutes(services: Services, deps: Deps): Route[] {
  const routes = [
    ...healthRoutes(services),
    ...sessionRoutes(services, deps),
    ...accountRoutes(services),
    ...passwordRoutes(services),
    ...peopleRoutes(services, deps),
    ...regionRoutes(services),
    ...auditTrailRoutes(services),
    ...outboxRoutes(services),
    ...jobsRoutes(services, deps),
    ...mapRoutes(services),
    ...searchRoutes(services),
    ...wellsRoutes(services, deps),
    ...streamsRoutes(services),
    ...aquiferUnitsRoutes(services),
    ...boundariesRoutes(services),
    ...pumpingTestsRoutes(services, deps),
    ...readingSeriesRoutes(services, deps),
    ...outsideSeriesRoutes(services, deps),
    ...correctionsRoutes(services, deps),
    ...otherWellsRoutes(services, deps),
    ...analysesRoutes(services, deps),
    ...analysisReportsRoutes(services),
    ...reviewsRoutes(services),
    ...adoptedValuesRoutes(services),
    ...estimatesRoutes(services),
    ...unitStatisticsRoutes(services),
    ...visibilityRoutes(services),
  ]
  return withDescription(routes, deps)
}

/** Answers are for one person: nothing between keeps them, and the browser asks again before it shows one. */
const privately: RequestHandler = (_req, res, next) => {
  res.set('Cache-Control', 'private, no-cache')
  next()
}

export function apiRouter(deps: Deps): Router {
  const services = createServices(deps)
  const router = Router()
  router.use('/api', privately, sessions(deps), withViewer(deps), csrfGuard(deps.config), json({ limit: '1mb' }))
  router.use(
    mountRoutes(allRoutes(services, deps), {
      limiters: createRateLimiters((name) => databaseRateStore(deps, name)),
      viewerOf,
      regionAccess: services.region.access,
    }),
  )
  return router
}
