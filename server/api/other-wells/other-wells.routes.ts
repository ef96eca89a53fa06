import { z } from 'zod'
import { idInPath, nothing } from '#shared/contracts/common.ts'
import { otherWell, otherWellInput, otherWellRemoval, otherWellUpdate } from '#shared/contracts/other-wells.ts'
import type { Deps } from '../../deps.ts'
import { onceOf } from '../idempotency/once.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

const params = z.object({ id: idInPath })
const one = '/api/other-wells/:id'

export function otherWellsRoutes({ otherWells }: Services, deps: Deps): Route[] {
  return [
    route(
      {
        method: 'post',
        path: '/api/pumping-tests/:id/other-wells',
        action: 'pumping-tests/edit',
        summary: 'List another well that pumped before or during a test, with its rates',
        params,
        body: otherWellInput,
        response: otherWell,
        status: 201,
      },
      (call) => otherWells.create(call.viewer, call.params.id, call.body, onceOf(deps, call)),
    ),
    route(
      {
        method: 'put',
        path: one,
        action: 'pumping-tests/edit',
        summary: 'Change another well that pumped, or switch it on or off',
        params,
        body: otherWellUpdate,
        response: otherWell,
      },
      ({ viewer, params: { id }, body }) => otherWells.update(viewer, id, body),
    ),
    route(
      {
        method: 'delete',
        path: one,
        action: 'pumping-tests/edit',
        summary: 'Remove another well that pumped',
        params,
        query: otherWellRemoval,
        response: nothing,
      },
      ({ viewer, params: { id }, query: { rowVersion } }) => otherWells.remove(viewer, id, rowVersion),
    ),
  ]
}
