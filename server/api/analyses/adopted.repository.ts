import { asc, inArray } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { adoptedValues } from '../../db/schema/index.ts'

export type AdoptedRow = Awaited<ReturnType<typeof listAdopted>>[number]

/** What adopting these analyses wrote into the regional table, current or ended since. */
export const listAdopted = (executor: Executor, analysisIds: number[]) =>
  executor
    .select({
      analysisId: adoptedValues.analysisId,
      quantity: adoptedValues.quantity,
      evidence: adoptedValues.evidence,
      evidenceReason: adoptedValues.evidenceReason,
      log10Error: adoptedValues.log10Error,
      usable: adoptedValues.usable,
    })
    .from(adoptedValues)
    .where(inArray(adoptedValues.analysisId, analysisIds))
    .orderBy(asc(adoptedValues.id))
