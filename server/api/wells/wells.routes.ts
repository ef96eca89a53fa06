import { z } from 'zod'
import { idInPath } from '#shared/contracts/common.ts'
import { created } from '#shared/contracts/pumping-tests.ts'
import { well, wellInput, wellList, wellQuery, wellUpdate } from '#shared/contracts/wells.ts'
import type { Deps } from '../../deps.ts'
import { onceOf } from '../idempotency/once.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

const params = z.object({ id: idInPath })
const one = '/api/wells/:id'

export function wellsRoutes({ wells }: Services, deps: Deps): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/wells',
        action: 'wells/read',
        summary: 'Wells by code',
        query: wellQuery,
        response: wellList,
      },
      ({ viewer, query }) => wells.list(viewer, query),
    ),
    route(
      {
        method: 'post',
        path: '/api/wells',
        action: 'wells/create',
        summary: 'Enter a well',
        body: wellInput,
        response: created,
        status: 201,
      },
      (call) => wells.create(call.viewer, call.body, onceOf(deps, call)),
    ),
    route(
      {
        method: 'get',
        path: one,
        action: 'wells/read',
        summary: 'A well with its construction, tests and values',
        params,
        response: well,
      },
      ({ viewer, params: { id } }) => wells.get(viewer, id),
    ),
    route(
      {
        method: 'put',
        path: one,
        action: 'wells/edit',
        summary: 'Change a well',
        params,
        body: wellUpdate,
        response: created,
      },
      ({ viewer, params: { id }, body }) => wells.update(viewer, id, body),
    ),
  ]
}
