import { and, asc, desc, eq, exists, inArray, like, or, sql, type SQL } from 'drizzle-orm'
import type { PumpingTestQuery, PumpingTestSummary } from '#shared/contracts/pumping-tests.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { containing } from '../../db/like.ts'
import { readable } from '../../db/readable.ts'
import {
  analyses,
  aquiferUnits,
  pumpingTests,
  readingSeries,
  testUnits,
  testWells,
  wells,
} from '../../db/schema/index.ts'

/** The analyses of a test that the viewer may see: neither state nor count tells of the others. */
const seen = (viewer: Viewer) =>
  sql`from ${analyses} where ${analyses.pumpingTestId} = ${pumpingTests.id} and ${readable.analyses(viewer)}`

type State = PumpingTestSummary['state']

/** The furthest that work on a test has come, as far as the viewer may know. */
const stateFor = (viewer: Viewer) => sql<State>`(case
  when exists (select 1 ${seen(viewer)} and ${analyses.state} = 'accepted') then 'accepted'
  when exists (select 1 ${seen(viewer)} and ${analyses.state} = 'submitted') then 'submitted'
  when exists (select 1 ${seen(viewer)} and ${analyses.state} = 'returned') then 'returned'
  when exists (select 1 from ${readingSeries} where ${readingSeries.pumpingTestId} = ${pumpingTests.id} and ${readingSeries.deletedAt} is null) then 'open'
  else 'no-readings' end)`

const countsFor = (viewer: Viewer) => ({
  // In the subquery, wells are those that take part, not the pumped well of the query around it.
  wellCount: sql<number>`(select count(*) from ${testWells} inner join ${wells} on ${wells.id} = ${testWells.wellId}
    where ${testWells.pumpingTestId} = ${pumpingTests.id} and ${readable.wells(viewer)})`.mapWith(Number),
  analysisCount: sql<number>`(select count(*) ${seen(viewer)})`.mapWith(Number),
})

const orders = { '-start': desc(pumpingTests.startAt), start: asc(pumpingTests.startAt), well: asc(wells.code) }

function filters(executor: Executor, viewer: Viewer, query: PumpingTestQuery): SQL | undefined {
  const inUnit = (unitId: number) =>
    exists(
      executor
        .select({ one: sql`1` })
        .from(testUnits)
        .where(and(eq(testUnits.pumpingTestId, pumpingTests.id), eq(testUnits.unitId, unitId))),
    )
  const pattern = query.text ? containing(query.text) : null
  return and(
    readable.pumpingTests(viewer),
    pattern ? or(like(wells.code, pattern), like(wells.name, pattern), like(pumpingTests.source, pattern)) : undefined,
    query.unitId ? inUnit(query.unitId) : undefined,
    query.wellId ? eq(pumpingTests.wellId, query.wellId) : undefined,
    query.kind ? eq(pumpingTests.kind, query.kind) : undefined,
    query.state ? eq(stateFor(viewer), query.state) : undefined,
  )
}

export function listPumpingTests(executor: Executor, viewer: Viewer, query: PumpingTestQuery) {
  return executor
    .select({ test: pumpingTests, wellCode: wells.code, state: stateFor(viewer), ...countsFor(viewer) })
    .from(pumpingTests)
    .innerJoin(wells, eq(wells.id, pumpingTests.wellId))
    .where(filters(executor, viewer, query))
    .orderBy(orders[query.sort], desc(pumpingTests.id))
    .limit(query.limit)
    .offset(query.offset)
}

export async function countPumpingTests(executor: Executor, viewer: Viewer, query: PumpingTestQuery): Promise<number> {
  const [row] = await executor
    .select({ n: sql<number>`count(*)`.mapWith(Number) })
    .from(pumpingTests)
    .innerJoin(wells, eq(wells.id, pumpingTests.wellId))
    .where(filters(executor, viewer, query))
  return row?.n ?? 0
}

/** Names of the units of several tests, shallow first. */
export async function unitNames(executor: Executor, testIds: number[]): Promise<Map<number, string[]>> {
  const names = new Map<number, string[]>()
  if (testIds.length === 0) return names
  const rows = await executor
    .select({ testId: testUnits.pumpingTestId, name: aquiferUnits.name })
    .from(testUnits)
    .innerJoin(aquiferUnits, eq(aquiferUnits.id, testUnits.unitId))
    .where(inArray(testUnits.pumpingTestId, testIds))
    .orderBy(asc(aquiferUnits.depthOrder))
  for (const { testId, name } of rows) names.set(testId, [...(names.get(testId) ?? []), name])
  return names
}
