import { z } from 'zod'
import { idInPath, nothing, paging } from '#shared/contracts/common.ts'
import { jobList } from '#shared/contracts/jobs.ts'
import type { Deps } from '../../deps.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'
import { streamProgress } from './progress-stream.ts'

export function jobsRoutes({ jobs }: Services, { now, stopping }: Deps): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/jobs',
        action: 'jobs/read',
        summary: 'Running and finished work',
        query: paging,
        response: jobList,
      },
      ({ query }) => jobs.list(query),
    ),
    route(
      {
        method: 'post',
        path: '/api/jobs/:id/cancellation',
        action: 'jobs/cancel',
        summary: 'Cancel waiting or running work',
        params: z.object({ id: idInPath }),
        response: nothing,
      },
      ({ viewer, params }) => jobs.cancel(viewer, params.id),
    ),
    route(
      {
        method: 'get',
        path: '/api/progress',
        action: 'progress/follow',
        summary: 'Progress of work as server-sent events',
        response: 'sent',
      },
      ({ viewer, res }) =>
        streamProgress(res, { load: (since) => jobs.active(viewer, since), now, stopping: stopping.signal }),
    ),
  ]
}
