import { and, asc, desc, eq, isNull, sql } from 'drizzle-orm'
import type { EstimateQuantity } from '#shared/contracts/estimates.ts'
import type { UnitModel } from '#shared/estimates/types.ts'
import type { Executor } from '../../db/client.ts'
import { readable, viewerOfScope, type Scope } from '../../db/readable.ts'
import {
  adoptedValues,
  aquiferUnits,
  boundaries,
  boundaryUnits,
  pumpingTests,
  unitPicks,
  variogramModels,
  wells,
} from '../../db/schema/index.ts'
import type { Position } from '../../db/spatial.ts'

const at = ([lon, lat]: Position) => sql`ST_GeomFromText(${`POINT(${lon} ${lat})`}, 4326)`

/** Units mapped at a place, shallow first; aquitards hold no values. */
export const unitsAt = (executor: Executor, place: Position) =>
  executor
    .select()
    .from(aquiferUnits)
    .where(sql`ST_Contains(${aquiferUnits.outline}, ${at(place)})`)
    .orderBy(asc(aquiferUnits.depthOrder))

export async function findUnit(executor: Executor, id: number) {
  const [row] = await executor.select().from(aquiferUnits).where(eq(aquiferUnits.id, id))
  return row ?? null
}

/** Storativity and specific yield are stored as one quantity and told apart by their class. */
const stored = { T: 'T', S: 'S', Sy: 'S', K: 'K' } as const

/** Current adopted values of one unit and quantity, of exactly one scope. */
export function listScopeValues(executor: Executor, scope: Scope, unitId: number, quantity: EstimateQuantity) {
  const viewer = viewerOfScope(scope)
  return executor
    .select({
      row: adoptedValues,
      wellCode: wells.code,
      position: wells.position,
      accuracyM: wells.positionAccuracyM,
      intervalTopM: pumpingTests.intervalTopM,
      intervalBottomM: pumpingTests.intervalBottomM,
    })
    .from(adoptedValues)
    .innerJoin(pumpingTests, eq(pumpingTests.id, adoptedValues.pumpingTestId))
    .innerJoin(wells, eq(wells.id, adoptedValues.wellId))
    .where(
      and(
        eq(adoptedValues.unitId, unitId),
        eq(adoptedValues.quantity, stored[quantity]),
        eq(adoptedValues.usable, true),
        isNull(adoptedValues.validTo),
        readable.pumpingTests(viewer),
        readable.wells(viewer),
      ),
    )
    .orderBy(asc(adoptedValues.id))
}

/** Mapped lines that affect the unit. */
export const listUnitBoundaries = (executor: Executor, unitId: number) =>
  executor
    .select({ kind: boundaries.kind, name: boundaries.name, path: boundaries.path })
    .from(boundaries)
    .innerJoin(boundaryUnits, eq(boundaryUnits.boundaryId, boundaries.id))
    .where(eq(boundaryUnits.unitId, unitId))

export const countPicks = (executor: Executor, unitId: number): Promise<number> =>
  executor.$count(unitPicks, eq(unitPicks.unitId, unitId))

export async function newestModel(executor: Executor, unitId: number, quantity: EstimateQuantity, scope: Scope) {
  const [row] = await executor
    .select()
    .from(variogramModels)
    .where(
      and(eq(variogramModels.unitId, unitId), eq(variogramModels.quantity, quantity), eq(variogramModels.scope, scope)),
    )
    .orderBy(desc(variogramModels.dataVersion))
    .limit(1)
  return row ? { dataVersion: row.dataVersion, model: row.model as StoredModel } : null
}

/** With a hash of the values and barriers that it was fitted to. */
export type StoredModel = UnitModel & { fingerprint?: string }

interface NewModel {
  unitId: number
  quantity: EstimateQuantity
  scope: Scope
  dataVersion: number
  model: StoredModel
  createdAt: Date
}

/** Keeps a fitted model; two processes that fit the same data keep the same model. */
export const saveModel = (executor: Executor, row: NewModel) =>
  executor
    .insert(variogramModels)
    .values({ ...row, valueCount: row.model.n })
    .onDuplicateKeyUpdate({ set: { model: row.model, createdAt: row.createdAt } })
