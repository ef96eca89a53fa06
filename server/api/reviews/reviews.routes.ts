import { z } from 'zod'
import { analysis, reviewInput } from '#shared/contracts/analyses.ts'
import { idInPath, paging } from '#shared/contracts/common.ts'
import { decidedReviews, reviewQueue } from '#shared/contracts/reviews.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function reviewsRoutes({ reviews }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/reviews',
        action: 'reviews/read',
        summary: 'Analyses that wait for review',
        query: paging,
        response: reviewQueue,
      },
      ({ viewer, query }) => reviews.queue(viewer, query),
    ),
    route(
      {
        method: 'get',
        path: '/api/reviews/decided',
        action: 'reviews/read',
        summary: 'Latest decisions',
        response: decidedReviews,
      },
      ({ viewer }) => reviews.decided(viewer),
    ),
    route(
      {
        method: 'post',
        path: '/api/analyses/:id/review',
        action: 'reviews/decide',
        summary: 'Accept or return a submitted analysis',
        params: z.object({ id: idInPath }),
        body: reviewInput,
        response: analysis,
        limit: 'heavy',
      },
      ({ viewer, params: { id }, body }) => reviews.decide(viewer, id, body),
    ),
  ]
}
