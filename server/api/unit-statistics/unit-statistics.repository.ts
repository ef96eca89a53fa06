import { and, asc, eq, inArray } from 'drizzle-orm'
import type { Executor } from '../../db/client.ts'
import { readable, viewerOfScope, type Scope } from '../../db/readable.ts'
import { pumpingTests, rateSteps, testUnits } from '../../db/schema/index.ts'

/** Specific-capacity tests of a unit alone, oldest first, with their rates; of exactly one scope. */
export async function listCapacityTests(executor: Executor, scope: Scope, unitId: number) {
  const tests = await executor
    .select({ id: pumpingTests.id, wellId: pumpingTests.wellId, details: pumpingTests.details })
    .from(pumpingTests)
    .innerJoin(testUnits, and(eq(testUnits.pumpingTestId, pumpingTests.id), eq(testUnits.unitId, unitId)))
    .where(
      and(
        eq(pumpingTests.kind, 'specific-capacity'),
        eq(testUnits.share, 1),
        readable.pumpingTests(viewerOfScope(scope)),
      ),
    )
    .orderBy(asc(pumpingTests.startAt), asc(pumpingTests.id))
  if (tests.length === 0) return []
  const ids = tests.map(({ id }) => id)
  const rates = await executor
    .select({ testId: rateSteps.pumpingTestId, startS: rateSteps.startS, rateM3S: rateSteps.rateM3S })
    .from(rateSteps)
    .where(inArray(rateSteps.pumpingTestId, ids))
    .orderBy(asc(rateSteps.startS))
  return tests.map((test) => ({ ...test, rates: rates.filter(({ testId }) => testId === test.id) }))
}
