import { z } from 'zod'
import { idInPath } from '#shared/contracts/common.ts'
import {
  created,
  pumpingTest,
  pumpingTestInput,
  pumpingTestList,
  pumpingTestQuery,
  pumpingTestUpdate,
} from '#shared/contracts/pumping-tests.ts'
import type { Deps } from '../../deps.ts'
import { onceOf } from '../idempotency/once.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

const params = z.object({ id: idInPath })
const one = '/api/pumping-tests/:id'

export function pumpingTestsRoutes({ pumpingTests }: Services, deps: Deps): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/pumping-tests',
        action: 'pumping-tests/read',
        summary: 'Pumping tests, newest first',
        query: pumpingTestQuery,
        response: pumpingTestList,
      },
      ({ viewer, query }) => pumpingTests.list(viewer, query),
    ),
    route(
      {
        method: 'post',
        path: '/api/pumping-tests',
        action: 'pumping-tests/create',
        summary: 'Create a pumping test',
        body: pumpingTestInput,
        response: created,
        status: 201,
      },
      (call) => pumpingTests.create(call.viewer, call.body, onceOf(deps, call)),
    ),
    route(
      {
        method: 'get',
        path: one,
        action: 'pumping-tests/read',
        summary: 'A pumping test',
        params,
        response: pumpingTest,
      },
      ({ viewer, params: { id } }) => pumpingTests.get(viewer, id),
    ),
    route(
      {
        method: 'put',
        path: one,
        action: 'pumping-tests/edit',
        summary: 'Change a pumping test',
        params,
        body: pumpingTestUpdate,
        response: pumpingTest,
      },
      ({ viewer, params: { id }, body }) => pumpingTests.update(viewer, id, body),
    ),
  ]
}
