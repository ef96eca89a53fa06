import { sql, type SQL } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { analyses, analysisEditors, readingEdits, readingSeries } from './schema/index.ts'

/**
 * Whether the viewer took part in an analysis, and so does not review it. Those took part who
 * - made, changed or submitted the analysis itself, whatever became of it afterwards;
 * - left a reading of its test out, or took one in, for as long as that decision is the newest for its reading: which
 *   readings count is judgement, and the value rests on it.
 * Facts of the test (rates, distances, the log itself, the construction of a well) bar nobody: a change of them marks
 * the analysis, nobody can accept it then, and its author answers for them by calculating again. In an office of three,
 * a steward who corrected a typing error once must still be able to review.
 */
export function tookPart({ id }: Viewer): SQL<boolean> {
  if (id === null) return sql<boolean>`false`.mapWith(Boolean)
  return sql<boolean>`(${isEditor(id)} or ${choseReadings(id)})`.mapWith(Boolean)
}

const isEditor = (id: number) =>
  sql`exists (select 1 from ${analysisEditors}
    where ${analysisEditors.analysisId} = ${analyses.id} and ${analysisEditors.userId} = ${id})`

const choseReadings = (id: number) =>
  sql`exists (select 1 from ${readingEdits}
    inner join ${readingSeries} on ${readingSeries.id} = ${readingEdits.seriesId}
    where ${readingSeries.pumpingTestId} = ${analyses.pumpingTestId} and ${readingSeries.deletedAt} is null
    and ${readingEdits.createdBy} = ${id}
    and not exists (select 1 from ${readingEdits} as later where later.series_id = ${readingEdits.seriesId}
      and later.seq = ${readingEdits.seq} and later.id > ${readingEdits.id}))`
