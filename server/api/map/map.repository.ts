import { and, asc, eq, gte, inArray, isNotNull, isNull, lt, sql, type SQL } from 'drizzle-orm'
import type { AnyMySqlColumn } from 'drizzle-orm/mysql-core'
import type { MapWellQuery } from '#shared/contracts/map.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { mercatorBits, mercatorInts } from '#shared/geodesy/index.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { adoptedValues, pumpingTests, wells } from '../../db/schema/index.ts'

/** Side of a cluster cell in pixels is 64 = 2^6; a pixel at zoom z is 2^(24 − 8 − z) of the Mercator integers. */
const cellBits = (zoom: number) => Math.max(0, mercatorBits - 8 - zoom + 6)

/** Wells of a box, as a range of the Mercator index; a box across the date line wraps. */
function inBox([west, south, east, north]: MapWellQuery['bbox']): SQL {
  const a = mercatorInts(west, north)
  const b = mercatorInts(east, south)
  // The date line as the eastern edge is the end of the map, not its beginning.
  const last = east === 180 ? 2 ** mercatorBits - 1 : b.mx
  const x =
    west <= east
      ? sql`${wells.mx} between ${a.mx} and ${last}`
      : sql`(${wells.mx} >= ${a.mx} or ${wells.mx} <= ${last})`
  return sql`${x} and ${wells.my} between ${a.my} and ${b.my}`
}

const log10 = (value: number | undefined, within: (log: number) => SQL) =>
  value === undefined ? undefined : within(Math.log10(value))

/** The newest current value of each well in the chosen unit and quantity, from tests the viewer may see. */
function valuesOf(executor: Executor, viewer: Viewer, { unitId, quantity, storageClass }: MapWellQuery) {
  return executor
    .select({
      wellId: adoptedValues.wellId,
      newest: sql<number>`max(${adoptedValues.id})`.as('newest'),
    })
    .from(adoptedValues)
    .innerJoin(pumpingTests, eq(pumpingTests.id, adoptedValues.pumpingTestId))
    .where(
      and(
        eq(adoptedValues.unitId, unitId ?? 0),
        eq(adoptedValues.quantity, quantity),
        isNull(adoptedValues.validTo),
        storageClass ? eq(adoptedValues.storageClass, storageClass) : undefined,
        readable.pumpingTests(viewer),
      ),
    )
    .groupBy(adoptedValues.wellId)
    .as('newest_values')
}

function filtered(executor: Executor, viewer: Viewer, query: MapWellQuery) {
  const newest = valuesOf(executor, viewer, query)
  const only: Record<NonNullable<MapWellQuery['only']>, SQL | undefined> = {
    firm: eq(adoptedValues.evidence, 'firm'),
    fair: eq(adoptedValues.evidence, 'fair'),
    slight: eq(adoptedValues.evidence, 'slight'),
    none: isNull(adoptedValues.id),
    valued: isNotNull(adoptedValues.id),
  }
  const where = and(
    inBox(query.bbox),
    readable.wells(viewer),
    query.only ? only[query.only] : undefined,
    log10(query.from, (log) => gte(adoptedValues.log10Value, log)),
    log10(query.below, (log) => lt(adoptedValues.log10Value, log)),
  )
  return { newest, where }
}

/**
 * Per grid cell: how many wells, and their mean place. Sums of doubles and one expression to group by, because averages
 * of whole numbers are decimals and cost four times as much.
 */
function measuresOf(zoom: number) {
  const bits = cellBits(zoom)
  const cell = sql<number>`((${wells.mx} >> ${bits}) << ${mercatorBits}) | (${wells.my} >> ${bits})`
  const mean = (column: AnyMySqlColumn) => sql<number>`sum(${column} + 0e0) / count(*)`.mapWith(Number)
  const measures = {
    cell: cell.mapWith(Number).as('cell'),
    count: sql<number>`count(*)`.mapWith(Number),
    mx: mean(wells.mx),
    my: mean(wells.my),
    /** One of its wells; the only one where the count is 1. */
    wellId: sql<number>`min(${wells.id})`.mapWith(Number),
  }
  return { measures, by: sql`cell` }
}

/** All wells of the box, grouped: answered by one index alone, always fresh. */
export function groupWells(executor: Executor, viewer: Viewer, { bbox, zoom }: MapWellQuery) {
  const { measures, by } = measuresOf(zoom)
  return executor
    .select(measures)
    .from(wells)
    .where(and(inBox(bbox), readable.wells(viewer)))
    .groupBy(by)
}

/** The wells that the query's filter leaves, grouped; without a filter this is `groupWells` and slower. */
export function groupFilteredWells(executor: Executor, viewer: Viewer, query: MapWellQuery) {
  const { newest, where } = filtered(executor, viewer, query)
  const { measures, by } = measuresOf(query.zoom)
  return executor
    .select(measures)
    .from(wells)
    .leftJoin(newest, eq(newest.wellId, wells.id))
    .leftJoin(adoptedValues, eq(adoptedValues.id, newest.newest))
    .where(where)
    .groupBy(by)
}

/** Single wells, all or those with these ids; those with a value first. */
export function listMapWells(executor: Executor, viewer: Viewer, query: MapWellQuery, ids?: number[]) {
  const { newest, where } = filtered(executor, viewer, query)
  return executor
    .select({
      id: wells.id,
      code: wells.code,
      kind: wells.kind,
      position: wells.position,
      log10: adoptedValues.log10Value,
      evidence: adoptedValues.evidence,
    })
    .from(wells)
    .leftJoin(newest, eq(newest.wellId, wells.id))
    .leftJoin(adoptedValues, eq(adoptedValues.id, newest.newest))
    .where(and(where, ids && inArray(wells.id, ids)))
    .orderBy(asc(isNull(adoptedValues.id)), asc(wells.code))
}
