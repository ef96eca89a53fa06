import { z } from 'zod'
import { idInPath } from '#shared/contracts/common.ts'
import { aquiferUnitDetail, aquiferUnitList } from '#shared/contracts/map.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function aquiferUnitsRoutes({ aquiferUnits }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/aquifer-units',
        action: 'aquifer-units/read',
        summary: 'Aquifer units, shallow first',
        response: aquiferUnitList,
      },
      ({ viewer }) => aquiferUnits.list(viewer),
    ),
    route(
      {
        method: 'get',
        path: '/api/aquifer-units/:id',
        action: 'aquifer-units/read',
        summary: 'An aquifer unit',
        params: z.object({ id: idInPath }),
        response: aquiferUnitDetail,
      },
      ({ viewer, params }) => aquiferUnits.get(viewer, params.id),
    ),
  ]
}
