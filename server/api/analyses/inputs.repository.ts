import { and, asc, eq, inArray, isNull } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { readingEdits, readings, readingSeries } from '../../db/schema/index.ts'

export interface ReadingRow {
  seriesId: number
  seq: number
  elapsedS: number | null
  valueM: number | null
  taken: boolean
  flags: string
}

/** Readings of several series in their order, without the raw lines. */
export const listReadings = (executor: Executor, seriesIds: number[]): Promise<ReadingRow[]> =>
  seriesIds.length === 0
    ? Promise.resolve([])
    : executor
        .select({
          seriesId: readings.seriesId,
          seq: readings.seq,
          elapsedS: readings.elapsedS,
          valueM: readings.valueM,
          taken: readings.taken,
          flags: readings.flags,
        })
        .from(readings)
        .where(inArray(readings.seriesId, seriesIds))
        .orderBy(asc(readings.seriesId), asc(readings.seq))

/** Decisions about readings, oldest first, so that the newest wins. */
export const listEdits = (executor: Executor, seriesIds: number[]) =>
  seriesIds.length === 0
    ? Promise.resolve([])
    : executor
        .select()
        .from(readingEdits)
        .where(inArray(readingEdits.seriesId, seriesIds))
        .orderBy(asc(readingEdits.id))

export const listLiveSeries = (executor: Executor, testId: number) =>
  executor
    .select()
    .from(readingSeries)
    .where(and(eq(readingSeries.pumpingTestId, testId), isNull(readingSeries.deletedAt)))
    .orderBy(asc(readingSeries.id))
