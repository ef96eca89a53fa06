import { and, asc, eq, gte, inArray, isNotNull, isNull, lt, sql, type SQL } from 'drizzle-orm'
import type { AnyMySqlColumn } from 'drizzle-orm/mysql-core'
import type { MapWellQuery } from '#shared/contracts/map.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { mercatorBits, mercatorInts } from '#shared/geodesy/index.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { adoptedValues, pumpingTests, wells } from '../../db/schema/index.ts'

const world = 2 ** mercatorBits
/** As many cells as a screen of 8 K needs with the margin that the map asks for. */
const mostCells = 128 * 128

/** A box as ranges of the Mercator index, ends included; across the date line `left` is more than `right`. */
function rangesOf([west, south, east, north]: MapWellQuery['bbox']) {
  const a = mercatorInts(west, north)
  const b = mercatorInts(east, south)
  // The date line as the eastern edge is the end of the map, not its beginning.
  return { left: a.mx, right: east === 180 ? world - 1 : b.mx, top: a.my, bottom: b.my }
}

/** Wells of a box; a box across the date line wraps. */
function inBox(bbox: MapWellQuery['bbox']): SQL {
  const { left, right, top, bottom } = rangesOf(bbox)
  const x =
    left <= right
      ? sql`${wells.mx} between ${left} and ${right}`
      : sql`(${wells.mx} >= ${left} or ${wells.mx} <= ${right})`
  return sql`${x} and ${wells.my} between ${top} and ${bottom}`
}

function cellsOf(bbox: MapWellQuery['bbox'], bits: number): number {
  const { left, right, top, bottom } = rangesOf(bbox)
  const between = (from: number, to: number) => (to >> bits) - (from >> bits) + 1
  const columns = left <= right ? between(left, right) : between(left, world - 1) + between(0, right)
  return columns * Math.max(0, between(top, bottom))
}

/**
 * Side of a cluster cell in pixels is 64 = 2^6; a pixel at zoom z is 2^(24 − 8 − z) of the Mercator integers. Cells are
 * coarser where a box has more of them than any screen shows: the world at street level would answer with every well.
 */
function cellBits({ bbox, zoom }: MapWellQuery): number {
  let bits = Math.max(0, mercatorBits - 8 - zoom + 6)
  while (cellsOf(bbox, bits) > mostCells) bits += 1
  return bits
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
function measuresOf(query: MapWellQuery) {
  const bits = cellBits(query)
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
export function groupWells(executor: Executor, viewer: Viewer, query: MapWellQuery) {
  const { measures, by } = measuresOf(query)
  return executor
    .select(measures)
    .from(wells)
    .where(and(inBox(query.bbox), readable.wells(viewer)))
    .groupBy(by)
}

/** The wells that the query's filter leaves, grouped; without a filter this is `groupWells` and slower. */
export function groupFilteredWells(executor: Executor, viewer: Viewer, query: MapWellQuery) {
  const { newest, where } = filtered(executor, viewer, query)
  const { measures, by } = measuresOf(query)
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
