import { idParams } from '#shared/contracts/common.ts'
import { outboxList, outboxMessage, outboxQuery } from '#shared/contracts/outbox.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function outboxRoutes({ outbox }: Services): Route[] {
  const action = 'outbox/read'
  return [
    route(
      {
        method: 'get',
        path: '/api/outbox',
        action,
        summary: 'Messages written by the program, newest first',
        query: outboxQuery,
        response: outboxList,
      },
      ({ query }) => outbox.list(query),
    ),
    route(
      {
        method: 'get',
        path: '/api/outbox/:id',
        action,
        summary: 'One message with its text',
        params: idParams,
        response: outboxMessage,
      },
      ({ params }) => outbox.message(params.id),
    ),
  ]
}
