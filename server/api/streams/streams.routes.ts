import { z } from 'zod'
import { idInPath } from '#shared/contracts/common.ts'
import { streamDetail, streamList } from '#shared/contracts/map.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function streamsRoutes({ streams }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/streams',
        action: 'streams/read',
        summary: 'Streams with their lines',
        response: streamList,
      },
      () => streams.list(),
    ),
    route(
      {
        method: 'get',
        path: '/api/streams/:id',
        action: 'streams/read',
        summary: 'A stream',
        params: z.object({ id: idInPath }),
        response: streamDetail,
      },
      ({ params }) => streams.get(params.id),
    ),
  ]
}
