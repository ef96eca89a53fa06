import type { EstimateQuantity } from '#shared/contracts/estimates.ts'
import { prepareValues, type PreparedValues } from '#shared/estimates/prepared-values.ts'
import type { Polyline, SiteValue, UnitOutline } from '#shared/estimates/types.ts'
import { fromWgs84 } from '#shared/geodesy/transform.ts'
import type { Executor } from '../../db/client.ts'
import type { Scope } from '../../db/readable.ts'
import type { Position } from '../../db/spatial.ts'
import * as repository from './estimates.repository.ts'

type ValueRow = Awaited<ReturnType<typeof repository.listScopeValues>>[number]

/** Everything an estimate needs of one unit, quantity and scope at one data version; distances in projected metres. */
export interface UnitData {
  values: PreparedValues
  siteValues: SiteValue[]
  positions: Map<string, Position>
  unit: UnitOutline
  barriers: Polyline[]
  coasts: Polyline[]
}

export const projector =
  (epsg: number) =>
  ([lon, lat]: Position) => {
    const { x, y } = fromWgs84(epsg, lon, lat)
    return { x, y }
  }

export async function loadUnitData(
  executor: Executor,
  unitId: number,
  quantity: EstimateQuantity,
  scope: Scope,
  epsg: number,
): Promise<UnitData | null> {
  const unit = await repository.findUnit(executor, unitId)
  if (!unit) return null
  const project = projector(epsg)
  const planar = (position: Position) => {
    const { x, y } = project(position)
    return [x, y] as const
  }
  const rows = await repository.listScopeValues(executor, scope, unitId, quantity)
  const lines = await repository.listUnitBoundaries(executor, unitId)
  const siteValues = rows.map((row) => siteValue(row, project))
  return {
    siteValues,
    values: prepareValues(siteValues, quantity),
    positions: new Map(rows.map(({ row, position }) => [String(row.id), position])),
    unit: {
      name: unit.name,
      kind: unit.kind,
      outline: unit.outline.map((ring) => ring.map(planar)),
      byOutlineOnly: (await repository.countPicks(executor, unitId)) === 0,
    },
    barriers: lines.filter(({ kind }) => kind === 'fault' || kind === 'barrier').map(({ path }) => path.map(planar)),
    coasts: lines.filter(({ kind }) => kind === 'coast').map(({ path }) => path.map(planar)),
  }
}

function siteValue(
  { row, wellCode, position, accuracyM, intervalTopM, intervalBottomM }: ValueRow,
  project: ReturnType<typeof projector>,
): SiteValue {
  return {
    id: String(row.id),
    testId: String(row.pumpingTestId),
    wellId: String(row.wellId),
    label: wellCode,
    ...project(position),
    log10: row.log10Value,
    error: row.log10Error,
    evidence: row.evidence,
    method: row.method,
    origin: row.origin,
    year: row.testYear,
    storageClass: row.storageClass,
    composite: row.composite,
    // A composite value reaches the table only with its unit's share.
    apportioned: row.composite,
    positionAccuracy_m: accuracyM,
    screenTop_m: intervalTopM,
    screenBottom_m: intervalBottomM,
  }
}
