import { boundaryList } from '#shared/contracts/map.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function boundariesRoutes({ boundaries }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/boundaries',
        action: 'boundaries/read',
        summary: 'Mapped boundaries and the units they affect',
        response: boundaryList,
      },
      () => boundaries.list(),
    ),
  ]
}
