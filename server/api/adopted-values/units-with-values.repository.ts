import { and, eq, inArray, isNull, or } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { adoptedValues, pumpingTests } from '../../db/schema/index.ts'

export type Subject = 'well' | 'pumping-test'

/** A value is hidden with its own well, and with the well of its test, should that be another now. */
const of = {
  well: (ids: number[]) => or(inArray(adoptedValues.wellId, ids), inArray(pumpingTests.wellId, ids)),
  'pumping-test': (ids: number[]) => inArray(adoptedValues.pumpingTestId, ids),
}

/**
 * Units whose estimates change when the wells or tests do.
 * @everyRow Names units only, to the program itself, which makes their estimates anew.
 */
export async function unitsWithValues(executor: Executor, subject: Subject, ids: number[]): Promise<number[]> {
  if (ids.length === 0) return []
  const rows = await executor
    .selectDistinct({ unitId: adoptedValues.unitId })
    .from(adoptedValues)
    .innerJoin(pumpingTests, eq(pumpingTests.id, adoptedValues.pumpingTestId))
    .where(and(of[subject](ids), isNull(adoptedValues.validTo)))
  return rows.map(({ unitId }) => unitId)
}

/** How many current values of an analysis are left. */
export const countCurrentOf = (executor: Executor, analysisId: number): Promise<number> =>
  executor.$count(adoptedValues, and(eq(adoptedValues.analysisId, analysisId), isNull(adoptedValues.validTo)))
