import type { Deps } from '../deps.ts'
import { createAccountService } from './account/account.service.ts'
import { createAuditTrailService } from './audit-trail/audit-trail.service.ts'
import { createHealthService } from './health/health.service.ts'
import { createJobsService } from './jobs/jobs.service.ts'
import { createOutboxService } from './outbox/outbox.service.ts'
import { createPasswordService } from './password/password.service.ts'
import { createPeopleService } from './people/people.service.ts'
import { createRegionService } from './region/region.service.ts'
import { createSessionService } from './session/session.service.ts'

/** All services, made once; a service that needs another resource is given its service here. */
export function createServices(deps: Deps) {
  const region = createRegionService(deps)
  return {
    account: createAccountService(deps, region),
    auditTrail: createAuditTrailService(deps),
    health: createHealthService(deps),
    jobs: createJobsService(deps),
    outbox: createOutboxService(deps),
    password: createPasswordService(deps),
    people: createPeopleService(deps, region),
    region,
    session: createSessionService(deps, region),
  }
}

export type Services = ReturnType<typeof createServices>
