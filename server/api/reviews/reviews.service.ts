import type { ReviewInput } from '#shared/contracts/analyses.ts'
import { analysisResult } from '#shared/contracts/analysis-result.ts'
import type { Paging } from '#shared/contracts/common.ts'
import { can, type Viewer } from '#shared/contracts/permissions.ts'
import type { ReviewQueueItem } from '#shared/contracts/reviews.ts'
import { kindOfMethod } from '#shared/hydraulics/any-kind.ts'
import type { Executor } from '../../db/client.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import type { createAdoptedValuesService } from '../adopted-values/adopted-values.service.ts'
import type { createAnalysesService } from '../analyses/analyses.service.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import { pageOf } from '../page-of.ts'
import { localStart } from '../pumping-tests/start-time.ts'
import * as repository from './reviews.repository.ts'

export interface ReviewsNeeds {
  analyses: Pick<ReturnType<typeof createAnalysesService>, 'repeat' | 'lockForReview' | 'settle' | 'get' | 'valuesOf'>
  adoptedValues: Pick<ReturnType<typeof createAdoptedValuesService>, 'adopt'>
}

export function createReviewsService(deps: Deps, { analyses, adoptedValues }: ReviewsNeeds) {
  const { db } = deps.connection
  const { now } = deps

  return {
    async queue(viewer: Viewer, paging: Paging) {
      const rows = await repository.listQueue(db, viewer, paging.limit, paging.offset)
      const total = await repository.countQueue(db, viewer)
      return pageOf(
        rows.map((row) => queueItem(viewer, row)),
        total,
        paging,
      )
    },

    async decided(viewer: Viewer) {
      const rows = await repository.listDecided(db, viewer, 50)
      return { items: rows.map(decidedItem) }
    },

    /**
     * Accepts or returns a submitted analysis. Accepting repeats it from its own snapshot and writes the values it
     * stands for into the regional table, in the same transaction as the audit record.
     */
    async decide(viewer: Viewer, id: number, { decision, comment, rowVersion }: ReviewInput) {
      if (decision === 'accepted') await analyses.repeat(viewer, id, rowVersion)
      return inTransaction(deps, async (tx) => {
        const row = await analyses.lockForReview(tx, viewer, id)
        await analyses.settle(tx, id, rowVersion, decision)
        const reviewId = await repository.insertReview(tx, {
          analysisId: id,
          decision,
          comment,
          reviewerId: viewer.id,
          createdAt: now(),
        })
        const valueIds = decision === 'accepted' ? await adopt(tx, viewer, id, reviewId) : []
        const details = { comment, pumpingTestId: row.pumpingTestId, valueIds }
        const action = decision === 'accepted' ? 'reviews/accept' : 'reviews/return'
        await recordAudit(tx, { viewer, at: now(), action, subject: 'analysis', subjectId: id, details })
        return analyses.get(viewer, id, tx)
      })
    },
  }

  async function adopt(executor: Executor, viewer: Viewer, analysisId: number, reviewId: number) {
    const { pumpingTestId, values } = await analyses.valuesOf(executor, analysisId)
    const rows = values.map((value) => ({ ...value, reviewId, adoptedBy: viewer.id }))
    return adoptedValues.adopt(executor, pumpingTestId, rows)
  }
}

const decidedItem = ({
  method,
  reviewer,
  createdAt,
  ...row
}: Awaited<ReturnType<typeof repository.listDecided>>[number]) => ({
  ...row,
  method: method as ReviewQueueItem['method'],
  reviewer: reviewer ?? '',
  createdAt: createdAt.toISOString(),
})

type QueueRow = Awaited<ReturnType<typeof repository.listQueue>>[number]

function queueItem(
  viewer: Viewer,
  { result, tookPart, author, startAt, zone, startPrecision, submittedAt, ...row }: QueueRow,
): ReviewQueueItem {
  const { T, S, K, storageClass } = analysisResult.parse(result)
  return {
    ...row,
    T,
    S,
    K: kindOfMethod(row.method) === 'slug' ? K : null,
    storageClass,
    method: row.method as ReviewQueueItem['method'],
    author: author ?? '',
    startLocal: localStart(startAt, zone, startPrecision),
    submittedAt: (submittedAt ?? startAt).toISOString(),
    mayReview: can(viewer, 'reviews/decide') && !tookPart,
  }
}
