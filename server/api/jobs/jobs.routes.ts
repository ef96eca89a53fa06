import { z } from 'zod'
import { idInPath, nothing, paging } from '#shared/contracts/common.ts'
import { jobList } from '#shared/contracts/jobs.ts'
import { can } from '#shared/contracts/permissions.ts'
import type { Deps } from '../../deps.ts'
import { viewerNow } from '../../middleware/viewer.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'
import { streamProgress } from './progress-stream.ts'

export function jobsRoutes({ jobs }: Services, deps: Deps): Route[] {
  const { now, stopping } = deps
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
      ({ viewer: opener, req, res }) => {
        let viewer = opener
        return streamProgress(res, {
          load: (since) => jobs.active(viewer, since),
          async mayGoOn() {
            const found = await viewerNow(deps, req)
            if (!found || !can(found, 'progress/follow')) return false
            viewer = found
            return true
          },
          now,
          stopping: stopping.signal,
        })
      },
    ),
  ]
}
