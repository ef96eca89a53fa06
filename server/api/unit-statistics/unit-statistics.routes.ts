import { idParams } from '#shared/contracts/common.ts'
import { unitStatistics as answer, unitStatisticsQuery } from '#shared/contracts/unit-statistics.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function unitStatisticsRoutes({ unitStatistics }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/aquifer-units/:id/statistics',
        action: 'estimates/read',
        summary: 'Statistics of the adopted values of an aquifer unit, log10 of SI values',
        params: idParams,
        query: unitStatisticsQuery,
        response: answer,
        limit: 'heavy',
      },
      ({ viewer, params: { id }, query }) => unitStatistics.get(viewer, id, query),
    ),
  ]
}
