import type { Deps } from '../deps.ts'
import { createAccountService } from './account/account.service.ts'
import { createAuditTrailService } from './audit-trail/audit-trail.service.ts'
import { createJobsService } from './jobs/jobs.service.ts'
import { createOutboxService } from './outbox/outbox.service.ts'
import { createRegionService } from './region/region.service.ts'
import { createSessionService } from './session/session.service.ts'

/** All services, made once; a service that needs another resource is given its service here. */
export function createServices(deps: Deps) {
  const region = createRegionService(deps)
  return {
    account: createAccountService(deps, region),
    auditTrail: createAuditTrailService(deps),
    jobs: createJobsService(deps),
    outbox: createOutboxService(deps),
    region,
    session: createSessionService(deps, region),
  }
}

export type Services = ReturnType<typeof createServices>
