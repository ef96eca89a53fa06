import { region, regionEdit } from '#shared/contracts/region.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function regionRoutes({ region: regions }: Services): Route[] {
  const path = '/api/region'
  return [
    route(
      { method: 'get', path, action: 'settings/read', summary: 'The region and its settings', response: region },
      () => regions.get(),
    ),
    route(
      {
        method: 'patch',
        path,
        action: 'region/edit',
        summary: 'Change the settings of the region',
        body: regionEdit,
        response: region,
      },
      ({ viewer, body }) => regions.edit(viewer, body),
    ),
  ]
}
