import { auditList, auditQuery } from '#shared/contracts/audit-trail.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function auditTrailRoutes({ auditTrail }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/audit-trail',
        action: 'audit/read',
        summary: 'Who changed what, newest first',
        query: auditQuery,
        response: auditList,
      },
      ({ query }) => auditTrail.list(query),
    ),
  ]
}
