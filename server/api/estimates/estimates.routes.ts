import { estimate, estimateQuery, nearbyQuery, nearbyTests } from '#shared/contracts/estimates.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function estimatesRoutes({ estimates }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/estimates',
        action: 'estimates/read',
        summary: 'What to expect at a place, with intervals, notes and support',
        query: estimateQuery,
        response: estimate,
        limit: 'heavy',
      },
      ({ viewer, query }) => estimates.estimate(viewer, query),
    ),
    route(
      {
        method: 'get',
        path: '/api/nearby-tests',
        action: 'estimates/read',
        summary: 'Tests within a radius, nearest first',
        query: nearbyQuery,
        response: nearbyTests,
      },
      ({ viewer, query }) => estimates.nearby(viewer, query),
    ),
  ]
}
