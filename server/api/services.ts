import type { Deps } from '../deps.ts'
import { createAccountService } from './account/account.service.ts'
import { createAdoptedValuesService } from './adopted-values/adopted-values.service.ts'
import { createAnalysesService, type AnalysesService } from './analyses/analyses.service.ts'
import { createInputsService } from './analyses/inputs.service.ts'
import { createAuditTrailService } from './audit-trail/audit-trail.service.ts'
import { createEstimatesService } from './estimates/estimates.service.ts'
import { createHealthService } from './health/health.service.ts'
import { createJobsService } from './jobs/jobs.service.ts'
import { createOutboxService } from './outbox/outbox.service.ts'
import { createPasswordService } from './password/password.service.ts'
import { createPeopleService } from './people/people.service.ts'
import { createPumpingTestsService } from './pumping-tests/pumping-tests.service.ts'
import { createReadingSeriesService } from './reading-series/reading-series.service.ts'
import { createRegionService } from './region/region.service.ts'
import { createReviewsService } from './reviews/reviews.service.ts'
import { createSessionService } from './session/session.service.ts'
import { createStreamsService } from './streams/streams.service.ts'
import { createVisibilityService } from './visibility/visibility.service.ts'
import { createWellsService } from './wells/wells.service.ts'

/** All services, made once; a service that needs another resource is given its service here. */
export function createServices(deps: Deps) {
  const region = createRegionService(deps)
  const streams = createStreamsService(deps)
  const wells = createWellsService(deps)
  const adoptedValues = createAdoptedValuesService(deps)
  const pumpingTests = createPumpingTestsService(deps, {
    wells,
    markInputsChanged: (executor, testId) => analyses.markInputsChanged(executor, testId),
  })
  // A change of a test concerns its analyses, which are made from the test: the one circle among the services.
  const analyses: AnalysesService = createAnalysesService(deps, createInputsService({ pumpingTests, streams }))
  const { markInputsChanged, hasSubmitted } = analyses
  return {
    account: createAccountService(deps, region),
    adoptedValues,
    analyses,
    auditTrail: createAuditTrailService(deps),
    estimates: createEstimatesService(deps, { region, streams, adoptedValues }),
    health: createHealthService(deps),
    jobs: createJobsService(deps),
    outbox: createOutboxService(deps),
    password: createPasswordService(deps),
    people: createPeopleService(deps, region),
    pumpingTests,
    readingSeries: createReadingSeriesService(deps, { pumpingTests, markInputsChanged, hasSubmitted }),
    region,
    reviews: createReviewsService(deps, { analyses, adoptedValues }),
    session: createSessionService(deps, region),
    streams,
    visibility: createVisibilityService(deps, { adoptedValues }),
    wells,
  }
}

export type Services = ReturnType<typeof createServices>
