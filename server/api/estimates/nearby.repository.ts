import { and, asc, eq, inArray, isNull, sql } from 'drizzle-orm'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { adoptedValues, aquiferUnits, pumpingTests, testUnits, wells } from '../../db/schema/index.ts'
import type { Position } from '../../db/spatial.ts'

export interface Box {
  southWest: Position
  northEast: Position
}

function inside({ southWest: [west, south], northEast: [east, north] }: Box) {
  const ring = `POLYGON((${west} ${south},${east} ${south},${east} ${north},${west} ${north},${west} ${south}))`
  return sql`MBRContains(ST_GeomFromText(${ring}, 4326), ${wells.position})`
}

/** Tests in a box, of one unit or of any, with the names of their units. */
export async function testsInBox(executor: Executor, viewer: Viewer, box: Box, unitId: number | undefined) {
  const rows = await executor
    .select({
      pumpingTestId: pumpingTests.id,
      wellId: wells.id,
      wellCode: wells.code,
      position: wells.position,
      startAt: pumpingTests.startAt,
      zone: pumpingTests.zone,
      unitId: aquiferUnits.id,
      unitName: aquiferUnits.name,
    })
    .from(pumpingTests)
    .innerJoin(wells, eq(wells.id, pumpingTests.wellId))
    .innerJoin(testUnits, eq(testUnits.pumpingTestId, pumpingTests.id))
    .innerJoin(aquiferUnits, eq(aquiferUnits.id, testUnits.unitId))
    .where(and(inside(box), readable.pumpingTests(viewer), readable.wells(viewer)))
    .orderBy(asc(pumpingTests.id), asc(aquiferUnits.depthOrder))
  const wanted = new Set(
    rows.filter((row) => unitId === undefined || row.unitId === unitId).map((row) => row.pumpingTestId),
  )
  return rows.filter(({ pumpingTestId }) => wanted.has(pumpingTestId))
}

/** Current values of tests whose visibility has been checked already. */
export const valuesOfTests = (executor: Executor, testIds: number[]) =>
  testIds.length === 0
    ? Promise.resolve([])
    : executor
        .select()
        .from(adoptedValues)
        .where(and(inArray(adoptedValues.pumpingTestId, testIds), isNull(adoptedValues.validTo)))
        .orderBy(asc(adoptedValues.quantity))
