import { mapWellQuery, mapWells } from '#shared/contracts/map.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function mapRoutes({ map }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/map/wells',
        action: 'map/read',
        summary: 'Wells in view, single or grouped',
        query: mapWellQuery,
        response: mapWells,
      },
      ({ viewer, query }) => map.wells(viewer, query),
    ),
  ]
}
