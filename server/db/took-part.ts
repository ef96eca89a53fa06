import { sql, type SQL } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { analyses, analysisEditors, otherWells, readingEdits, readingSeries, testCorrections } from './schema/index.ts'

/**
 * Whether the viewer took part in an analysis, and so does not review it. Those took part who
 * - made, changed or submitted the analysis itself, whatever became of it afterwards;
 * - left a reading of its test out, or took one in, for as long as that decision is the newest for its reading: which
 *   readings count is judgement, and the value rests on it;
 * - set a correction of its readings, or another well that is superposed, as it is, or removed one: the same.
 * Facts of the test (rates, distances, the log itself, the construction of a well) bar nobody: a change of them marks
 * the analysis, nobody can accept it then, and its author answers for them by calculating again. In an office of three,
 * a steward who corrected a typing error once must still be able to review.
 */
export function tookPart({ id }: Viewer): SQL<boolean> {
  if (id === null) return sql<boolean>`false`.mapWith(Boolean)
  return sql<boolean>`(${isEditor(id)} or ${choseReadings(id)} or ${corrected(id)})`.mapWith(Boolean)
}

const isEditor = (id: number) =>
  sql`exists (select 1 from ${analysisEditors}
    where ${analysisEditors.analysisId} = ${analyses.id} and ${analysisEditors.userId} = ${id})`

const corrected = (id: number) =>
  sql`(exists (select 1 from ${testCorrections}
    where ${testCorrections.pumpingTestId} = ${analyses.pumpingTestId} and ${testCorrections.changedBy} = ${id})
  or exists (select 1 from ${otherWells}
    where ${otherWells.pumpingTestId} = ${analyses.pumpingTestId} and ${otherWells.changedBy} = ${id}))`

const choseReadings = (id: number) =>
  sql`exists (select 1 from ${readingEdits}
    inner join ${readingSeries} on ${readingSeries.id} = ${readingEdits.seriesId}
    where ${readingSeries.pumpingTestId} = ${analyses.pumpingTestId} and ${readingSeries.deletedAt} is null
    and ${readingEdits.createdBy} = ${id}
    and not exists (select 1 from ${readingEdits} as later where later.series_id = ${readingEdits.seriesId}
      and later.seq = ${readingEdits.seq} and later.id > ${readingEdits.id}))`
