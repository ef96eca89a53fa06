import type { Analysis } from '#shared/contracts/analyses.ts'
import { analysisResult } from '#shared/contracts/analysis-result.ts'
import { parseOptions } from '#shared/contracts/kind-analyses.ts'
import { atLeast, can, type Viewer } from '#shared/contracts/permissions.ts'
import { limitFindings } from '#shared/hydraulics/limits.ts'
import type { AdoptedRow } from './adopted.repository.ts'
import { adoptedRows, adoptionOf, type AdoptedTest } from './adoption.ts'
import type { FoundAnalysis, listReviews } from './analyses.repository.ts'
import type { Digest } from './digest.ts'

type ReviewRows = Awaited<ReturnType<typeof listReviews>>

const isTheirs = (viewer: Viewer, { createdBy }: FoundAnalysis['row']): boolean =>
  atLeast(viewer, 'steward') || (atLeast(viewer, 'analyst') && createdBy === viewer.id)

export const mayChange = (viewer: Viewer, row: FoundAnalysis['row']): boolean =>
  row.state === 'draft' && isTheirs(viewer, row)

/** An analysis is a draft again then; a reported value, which has none, is deleted. */
export const mayTakeBack = (viewer: Viewer, row: FoundAnalysis['row']): boolean =>
  row.state === 'submitted' && isTheirs(viewer, row)

/** Nobody reviews an analysis in which they took part. */
const mayDecide = (viewer: Viewer, { row, tookPart }: FoundAnalysis): boolean =>
  row.state === 'submitted' && can(viewer, 'reviews/decide') && !tookPart

/** What the view of an analysis is made from beside itself; of other analyses too. */
export interface Surroundings {
  /** Analyses of the same test: a recovery that agrees is evidence. */
  siblings: FoundAnalysis['row'][]
  reviews: ReviewRows
  adopted: AdoptedRow[]
  test: AdoptedTest
  /** By analysis, of those at least that are not adopted. */
  digests: Map<number, Digest>
}

/**
 * What adopting the analysis wrote into the regional table, or would write; null where it gives no transmissivity.
 * Analyses of the same test weigh only until a reviewer has decided: what was adopted stays what it was.
 */
function adoptionShown(row: FoundAnalysis['row'], { adopted, digests, siblings, test }: Surroundings) {
  const written = adopted.filter(({ analysisId }) => analysisId === row.id)
  const digest = digests.get(row.id)
  return adoptionOf(written) ?? (digest ? adoptionOf(adoptedRows(row, digest, siblings, test)) : null)
}

export function analysisView(viewer: Viewer, found: FoundAnalysis, around: Surroundings): Analysis {
  const { row, authorName } = found
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
    options: row.method === 'reported' ? null : parseOptions(row.method, row.options),
    result,
    label: row.label,
    rationale: row.rationale,
    adoption: adoptionShown(row, around),
    inputsChanged: row.inputsChanged,
    questions: limits.filter(({ severity }) => severity === 'caution'),
    refusals: limits.filter(({ severity }) => severity === 'bad'),
    createdBy: row.createdBy && authorName ? { id: row.createdBy, name: authorName } : null,
    createdAt: row.createdAt.toISOString(),
    submittedAt: row.submittedAt?.toISOString() ?? null,
    reviews: around.reviews.filter((review) => review.row.analysisId === row.id).map(reviewView),
    rowVersion: row.rowVersion,
    mayEdit: mayChange(viewer, row),
    mayTakeBack: mayTakeBack(viewer, row),
    mayReview: mayDecide(viewer, found),
  }
}

const reviewView = ({ row: { decision, comment, createdAt }, reviewer }: ReviewRows[number]) => ({
  decision,
  comment,
  reviewer: reviewer ?? '',
  createdAt: createdAt.toISOString(),
})
