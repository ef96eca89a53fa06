import type { Deps } from '../deps.ts'
import { createAccountService } from './account/account.service.ts'
import { createAdoptedValuesService } from './adopted-values/adopted-values.service.ts'
import { createAnalysesService, type AnalysesService } from './analyses/analyses.service.ts'
import { createAnalysisReportsService } from './analysis-reports/analysis-reports.service.ts'
import { createInputsService } from './analyses/inputs.service.ts'
import { createAquiferUnitsService } from './aquifer-units/aquifer-units.service.ts'
import { createAuditTrailService } from './audit-trail/audit-trail.service.ts'
import { createBoundariesService } from './boundaries/boundaries.service.ts'
import { createCorrectionsService, type CorrectionsService } from './corrections/corrections.service.ts'
import { createEstimatesService } from './estimates/estimates.service.ts'
import { createHealthService } from './health/health.service.ts'
import { createJobsService } from './jobs/jobs.service.ts'
import { createMapService } from './map/map.service.ts'
import { createOtherWellsService, type OtherWellsService } from './other-wells/other-wells.service.ts'
import { createOutboxService } from './outbox/outbox.service.ts'
import { createOutsideSeriesService } from './outside-series/outside-series.service.ts'
import { createPasswordService } from './password/password.service.ts'
import { createPeopleService } from './people/people.service.ts'
import { createPumpingTestsService } from './pumping-tests/pumping-tests.service.ts'
import { createReadingSeriesService } from './reading-series/reading-series.service.ts'
import { createRegionService } from './region/region.service.ts'
import { createReviewsService } from './reviews/reviews.service.ts'
import { createSearchService } from './search/search.service.ts'
import { createSessionService } from './session/session.service.ts'
import { createStreamsService } from './streams/streams.service.ts'
import { createUnitStatisticsService } from './unit-statistics/unit-statistics.service.ts'
import { createVisibilityService } from './visibility/visibility.service.ts'
import { createWellsService, type WellsService } from './wells/wells.service.ts'

/** All services, made once; a service that needs another resource is given its service here. */
export function createServices(deps: Deps) {
  const region = createRegionService(deps)
  const streams = createStreamsService(deps)
  const boundaries = createBoundariesService(deps)
  const adoptedValues = createAdoptedValuesService(deps, {
    withdrawAnalysis: (executor, id) => analyses.withdraw(executor, id),
  })
  const wells: WellsService = createWellsService(deps, {
    region,
    testsOf: (viewer, wellId) => pumpingTests.ofWell(viewer, wellId),
    valuesOf: (viewer, wellId) => adoptedValues.ofWell(viewer, wellId),
    async wellChanged(executor, wellId) {
      const tests = [
        ...(await analyses.testsOfWell(executor, wellId)),
        ...(await otherWells.testsListing(executor, wellId)),
      ]
      for (const testId of new Set(tests)) await analyses.markInputsChanged(executor, testId)
      await adoptedValues.changedAt(executor, 'well', wellId)
    },
  })
  const pumpingTests = createPumpingTestsService(deps, {
    wells,
    markInputsChanged: (executor, testId) => analyses.markInputsChanged(executor, testId),
    valuesChanged: (executor, testId) => adoptedValues.changedAt(executor, 'pumping-test', testId),
  })
  const otherWells: OtherWellsService = createOtherWellsService(deps, {
    pumpingTests,
    markInputsChanged: (executor, testId) => analyses.markInputsChanged(executor, testId),
  })
  const corrections: CorrectionsService = createCorrectionsService(deps, {
    pumpingTests,
    otherWells,
    markInputsChanged: (executor, testId) => analyses.markInputsChanged(executor, testId),
    appliedTo: (executor, testId) => analyses.appliedTo(executor, testId),
  })
  // A well shows its tests, and a change of a test concerns its analyses: services that know each other have named types.
  const analyses: AnalysesService = createAnalysesService(
    deps,
    createInputsService({ pumpingTests, streams, boundaries, wells, corrections, otherWells }),
    { removeReportedTest: pumpingTests.removeReported },
  )
  const { markInputsChanged, isInUse } = analyses
  const estimates = createEstimatesService(deps, { region, streams, adoptedValues })
  return {
    account: createAccountService(deps, region),
    adoptedValues,
    analyses,
    analysisReports: createAnalysisReportsService(deps, { analyses, pumpingTests, region }),
    aquiferUnits: createAquiferUnitsService(deps),
    auditTrail: createAuditTrailService(deps),
    boundaries,
    corrections,
    estimates,
    health: createHealthService(deps),
    jobs: createJobsService(deps),
    map: createMapService(deps, { adoptedValues }),
    otherWells,
    outbox: createOutboxService(deps),
    outsideSeries: createOutsideSeriesService(deps, { pumpingTests, corrections, isInUse }),
    password: createPasswordService(deps),
    people: createPeopleService(deps, region),
    pumpingTests,
    readingSeries: createReadingSeriesService(deps, { pumpingTests, markInputsChanged, isInUse }),
    region,
    reviews: createReviewsService(deps, { analyses, adoptedValues }),
    search: createSearchService(deps),
    session: createSessionService(deps, region),
    streams,
    unitStatistics: createUnitStatisticsService(deps, { estimates }),
    visibility: createVisibilityService(deps, { adoptedValues }),
    wells,
  }
}

export type Services = ReturnType<typeof createServices>
