import { and, asc, eq, inArray, isNull, or, sql, type SQL } from 'drizzle-orm'
import type { AnyMySqlColumn } from 'drizzle-orm/mysql-core'
import type { MapWellQuery } from '#shared/contracts/map.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { mercatorBits } from '#shared/geodesy/index.ts'
import type { Executor } from '../../db/client.ts'
import { readable } from '../../db/readable.ts'
import { adoptedValues, pumpingTests, wellCells, wells } from '../../db/schema/index.ts'
import { countedBits } from '../../db/well-cells.ts'
import type { MapView, Span } from './map-view.ts'

/** Places of a table: columns and rows of squares whose side is 2^bits of the Mercator integers. */
interface Grid {
  x: AnyMySqlColumn
  y: AnyMySqlColumn
  bits: number
}

const wellGrid: Grid = { x: wells.mx, y: wells.my, bits: 0 }

function inView({ bits, columns, rows }: MapView, grid: Grid): SQL | undefined {
  const finer = bits - grid.bits
  const within = (column: AnyMySqlColumn, [from, to]: Span) =>
    sql`${column} between ${from << finer} and ${((to + 1) << finer) - 1}`
  return and(or(...columns.map((span) => within(grid.x, span))), within(grid.y, rows))
}

/** One number for the cell of the view that a place lies in; queries group by it as `cell`. */
function cellOf({ bits }: MapView, { x, y, bits: own }: Grid) {
  const finer = bits - own
  return sql<number>`((${x} >> ${finer}) << ${mercatorBits}) | (${y} >> ${finer})`.mapWith(Number).as('cell')
}

const byCell = sql`cell`

/** Sums of doubles: sums of whole numbers are decimals, which cost four times as much. All here are exact below 2⁵³. */
const total = (column: AnyMySqlColumn) => sql<number>`sum(${column} + 0e0)`.mapWith(Number)

/** All wells of a view's cells, counted one by one: answered by one index alone. */
const countEach = (executor: Executor, viewer: Viewer, view: MapView) =>
  executor
    .select({
      cell: cellOf(view, wellGrid),
      count: sql<number>`count(*)`.mapWith(Number),
      sumId: total(wells.id),
      sumMx: total(wells.mx),
      sumMy: total(wells.my),
    })
    .from(wells)
    .where(and(inView(view, wellGrid), readable.wells(viewer)))
    .groupBy(byCell)

/** The same from the counts of cells that are no larger than the view's. */
function addCounts(executor: Executor, viewer: Viewer, view: MapView, bits: number) {
  const grid = { x: wellCells.cx, y: wellCells.cy, bits }
  const count = total(wellCells.wellCount)
  return executor
    .select({
      cell: cellOf(view, grid),
      count,
      sumId: total(wellCells.sumId),
      sumMx: total(wellCells.sumMx),
      sumMy: total(wellCells.sumMy),
    })
    .from(wellCells)
    .where(and(eq(wellCells.bits, bits), inView(view, grid), readable.wellCells(viewer)))
    .groupBy(byCell)
    .having(sql`${count} > 0`)
}

/** Per cell of a view: how many wells, and the sums of their ids and places. */
export function groupWells(executor: Executor, viewer: Viewer, view: MapView) {
  const counted = countedBits.filter((bits) => bits <= view.bits).at(-1)
  return counted === undefined ? countEach(executor, viewer, view) : addCounts(executor, viewer, view, counted)
}

interface Pair {
  unitId: number
  quantity: MapWellQuery['quantity']
  storageClass: MapWellQuery['storageClass']
}

/** Current values of a unit and quantity at wells, from tests the viewer may see; oldest first. */
export const listValues = (executor: Executor, viewer: Viewer, { unitId, quantity, storageClass }: Pair) =>
  executor
    .select({
      wellId: wells.id,
      mx: wells.mx,
      my: wells.my,
      log10: adoptedValues.log10Value,
      evidence: adoptedValues.evidence,
    })
    .from(adoptedValues)
    .innerJoin(pumpingTests, eq(pumpingTests.id, adoptedValues.pumpingTestId))
    .innerJoin(wells, eq(wells.id, adoptedValues.wellId))
    .where(
      and(
        eq(adoptedValues.unitId, unitId),
        eq(adoptedValues.quantity, quantity),
        isNull(adoptedValues.validTo),
        storageClass ? eq(adoptedValues.storageClass, storageClass) : undefined,
        readable.pumpingTests(viewer),
        readable.wells(viewer),
      ),
    )
    .orderBy(asc(adoptedValues.id))

/** Single wells by their code: those with these ids, or all of a view. */
export const listMapWells = (executor: Executor, viewer: Viewer, which: number[] | MapView) =>
  executor
    .select({ id: wells.id, code: wells.code, kind: wells.kind, position: wells.position })
    .from(wells)
    .where(and(Array.isArray(which) ? inArray(wells.id, which) : inView(which, wellGrid), readable.wells(viewer)))
    .orderBy(asc(wells.code))
