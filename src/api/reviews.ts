import type { Paging } from '#shared/contracts/common.ts'
import { decidedReviews, reviewQueue } from '#shared/contracts/reviews.ts'
import { api } from './client.ts'

/** Analyses that wait for review, the oldest submission first. */
export const fetchReviewQueue = (paging: Paging, signal?: AbortSignal) =>
  api.get('/api/reviews', { query: { ...paging }, response: reviewQueue, signal })

/** The latest decisions, the newest first. */
export const fetchDecidedReviews = (signal?: AbortSignal) =>
  api.get('/api/reviews/decided', { response: decidedReviews, signal })
