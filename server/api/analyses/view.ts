import type { Analysis } from '#shared/contracts/analyses.ts'
import { analysisOptions, analysisResult } from '#shared/contracts/analysis-result.ts'
import { atLeast, can, type Viewer } from '#shared/contracts/permissions.ts'
import { limitFindings } from '#shared/hydraulics/limits.ts'
import { adoptionOf } from './adoption.ts'
import type { FoundAnalysis, listReviews } from './analyses.repository.ts'

type ReviewRows = Awaited<ReturnType<typeof listReviews>>

export const mayChange = (viewer: Viewer, { createdBy, state }: FoundAnalysis['row']): boolean =>
  state === 'draft' && (atLeast(viewer, 'steward') || (atLeast(viewer, 'analyst') && createdBy === viewer.id))

/** Nobody reviews their own analysis. */
export const mayDecide = (viewer: Viewer, { createdBy, state }: FoundAnalysis['row']): boolean =>
  state === 'submitted' && can(viewer, 'reviews/decide') && createdBy !== viewer.id

/** `siblings` are the analyses of the same test: a recovery that agrees is evidence. */
export function analysisView(
  viewer: Viewer,
  { row, authorName }: FoundAnalysis,
  siblings: FoundAnalysis['row'][],
  reviews: ReviewRows,
): Analysis {
  const result = analysisResult.parse(row.result)
  const limits = limitFindings({
    T: result.T?.value ?? null,
    S: result.S?.value ?? null,
    storageClass: result.storageClass,
  })
  return {
    id: row.id,
    pumpingTestId: row.pumpingTestId,
    method: row.method as Analysis['method'],
    methodVersion: row.methodVersion,
    state: row.state,
    options: row.method === 'reported' ? null : analysisOptions.parse(row.options),
    result,
    label: row.label,
    rationale: row.rationale,
    adoption: adoptionOf(row, siblings),
    inputsChanged: row.inputsChanged,
    questions: limits.filter(({ severity }) => severity === 'caution'),
    refusals: limits.filter(({ severity }) => severity === 'bad'),
    createdBy: row.createdBy && authorName ? { id: row.createdBy, name: authorName } : null,
    createdAt: row.createdAt.toISOString(),
    submittedAt: row.submittedAt?.toISOString() ?? null,
    reviews: reviews.filter((review) => review.row.analysisId === row.id).map(reviewView),
    rowVersion: row.rowVersion,
    mayEdit: mayChange(viewer, row),
    mayReview: mayDecide(viewer, row),
  }
}

const reviewView = ({ row: { decision, comment, createdAt }, reviewer }: ReviewRows[number]) => ({
  decision,
  comment,
  reviewer: reviewer ?? '',
  createdAt: createdAt.toISOString(),
})
