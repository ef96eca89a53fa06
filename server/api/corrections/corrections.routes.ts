import { z } from 'zod'
import { idInPath, nothing } from '#shared/contracts/common.ts'
import {
  correction,
  correctionInput,
  correctionRemoval,
  correctionUpdate,
  testCorrections,
} from '#shared/contracts/corrections.ts'
import type { Deps } from '../../deps.ts'
import { onceOf } from '../idempotency/once.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

const params = z.object({ id: idInPath })
const ofTest = '/api/pumping-tests/:id/corrections'
const one = '/api/corrections/:id'

export function correctionsRoutes({ corrections }: Services, deps: Deps): Route[] {
  return [
    route(
      {
        method: 'get',
        path: ofTest,
        action: 'pumping-tests/read',
        summary: 'Corrections of the readings of a test, the series that they follow, and other wells that pumped',
        params,
        response: testCorrections,
      },
      ({ viewer, params: { id } }) => corrections.list(viewer, id),
    ),
    route(
      {
        method: 'post',
        path: ofTest,
        action: 'pumping-tests/edit',
        summary: 'Correct readings of a test; the readings themselves stay as they are',
        params,
        body: correctionInput,
        response: correction,
        status: 201,
      },
      (call) => corrections.create(call.viewer, call.params.id, call.body, onceOf(deps, call)),
    ),
    route(
      {
        method: 'put',
        path: one,
        action: 'pumping-tests/edit',
        summary: 'Change a correction, or switch it on or off',
        params,
        body: correctionUpdate,
        response: correction,
      },
      ({ viewer, params: { id }, body }) => corrections.update(viewer, id, body),
    ),
    route(
      {
        method: 'delete',
        path: one,
        action: 'pumping-tests/edit',
        summary: 'Remove a correction',
        params,
        query: correctionRemoval,
        response: nothing,
      },
      ({ viewer, params: { id }, query: { rowVersion } }) => corrections.remove(viewer, id, rowVersion),
    ),
  ]
}
