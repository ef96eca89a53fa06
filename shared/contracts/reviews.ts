import { z } from 'zod'
import { analysisMethod } from './analyses.ts'
import { parameterEstimate, storageClass } from './analysis-result.ts'
import { instant, listOf, recordId } from './common.ts'

export const reviewQueueItem = z.object({
  id: recordId,
  pumpingTestId: recordId,
  wellCode: z.string(),
  /** Wall-clock time where the test was made; the day or the year alone where no more is known. */
  startLocal: z.string(),
  method: analysisMethod,
  label: z.string().nullable(),
  rationale: z.string().nullable(),
  T: parameterEstimate.nullable(),
  S: parameterEstimate.nullable(),
  /** Of a slug test, which measures it itself; it says more than the T that is derived from it. */
  K: parameterEstimate.nullable().optional(),
  storageClass: storageClass.nullable(),
  author: z.string(),
  submittedAt: instant,
  inputsChanged: z.boolean(),
  /** False for work in which the viewer took part. */
  mayReview: z.boolean(),
})
export type ReviewQueueItem = z.infer<typeof reviewQueueItem>

export const reviewQueue = listOf(reviewQueueItem)

export const decidedReview = z.object({
  /** Of the decision: an analysis that was returned may be decided about once more. */
  reviewId: recordId,
  /** Of the analysis. */
  id: recordId,
  pumpingTestId: recordId,
  wellCode: z.string(),
  method: analysisMethod,
  decision: z.enum(['accepted', 'returned']),
  comment: z.string().nullable(),
  reviewer: z.string(),
  createdAt: instant,
})
export type DecidedReview = z.infer<typeof decidedReview>

export const decidedReviews = z.object({ items: z.array(decidedReview) })
