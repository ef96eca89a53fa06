import { searchHits, searchQuery } from '#shared/contracts/map.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function searchRoutes({ search }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/search',
        action: 'search/read',
        summary: 'Wells, units, streams and tests by name',
        query: searchQuery,
        response: searchHits,
      },
      ({ viewer, query }) => search.find(viewer, query.text),
    ),
  ]
}
