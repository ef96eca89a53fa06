import { and, asc, desc, eq, gte, inArray, isNull, like, lte, or, sql, type SQL } from 'drizzle-orm'
import type { AdoptedValueFilters, AdoptedValueQuery } from '#shared/contracts/adopted-values.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import { containing } from '../../db/like.ts'
import { readable } from '../../db/readable.ts'
import { adoptedValues, analyses, aquiferUnits, pumpingTests, users, wells } from '../../db/schema/index.ts'

export type AdoptedRow = typeof adoptedValues.$inferSelect
export type NewAdoptedValue = typeof adoptedValues.$inferInsert

const fields = {
  row: adoptedValues,
  wellCode: wells.code,
  position: wells.position,
  unitName: aquiferUnits.name,
  inputsChanged: analyses.inputsChanged,
  adoptedByName: users.name,
}

/** Values whose test and well the viewer may see. */
const visible = (executor: Executor) =>
  executor
    .select(fields)
    .from(adoptedValues)
    .innerJoin(pumpingTests, eq(pumpingTests.id, adoptedValues.pumpingTestId))
    .innerJoin(wells, eq(wells.id, adoptedValues.wellId))
    .innerJoin(aquiferUnits, eq(aquiferUnits.id, adoptedValues.unitId))
    .innerJoin(analyses, eq(analyses.id, adoptedValues.analysisId))
    .leftJoin(users, eq(users.id, adoptedValues.adoptedBy))

export type FoundValue = Awaited<ReturnType<typeof listCurrent>>[number]

const may = (viewer: Viewer) => and(readable.pumpingTests(viewer), readable.wells(viewer))

function inBox([west, south, east, north]: NonNullable<AdoptedValueFilters['bbox']>): SQL {
  const ring = `POLYGON((${west} ${south},${east} ${south},${east} ${north},${west} ${north},${west} ${south}))`
  return sql`MBRContains(ST_GeomFromText(${ring}, 4326), ${wells.position})`
}

function matching(viewer: Viewer, filters: AdoptedValueFilters): SQL | undefined {
  const { unitId, quantity, storageClass, evidence, method, yearFrom, yearTo, text, wellId, bbox } = filters
  const pattern = text ? containing(text) : null
  return and(
    isNull(adoptedValues.validTo),
    may(viewer),
    unitId ? eq(adoptedValues.unitId, unitId) : undefined,
    quantity ? eq(adoptedValues.quantity, quantity) : undefined,
    storageClass ? eq(adoptedValues.storageClass, storageClass) : undefined,
    evidence ? eq(adoptedValues.evidence, evidence) : undefined,
    method ? eq(adoptedValues.method, method) : undefined,
    yearFrom ? gte(adoptedValues.testYear, yearFrom) : undefined,
    yearTo ? lte(adoptedValues.testYear, yearTo) : undefined,
    wellId ? eq(adoptedValues.wellId, wellId) : undefined,
    bbox ? inBox(bbox) : undefined,
    pattern ? or(like(wells.code, pattern), like(wells.name, pattern), like(pumpingTests.source, pattern)) : undefined,
  )
}

const columns = {
  value: adoptedValues.log10Value,
  year: adoptedValues.testYear,
  well: wells.code,
  unit: aquiferUnits.depthOrder,
  evidence: adoptedValues.evidence,
  method: adoptedValues.method,
  quantity: adoptedValues.quantity,
}

function order(sort: AdoptedValueQuery['sort']) {
  const column = columns[sort.replace('-', '') as keyof typeof columns]
  return sort.startsWith('-') ? desc(column) : asc(column)
}

/** Current values, one page or all of them. */
export function listCurrent(
  executor: Executor,
  viewer: Viewer,
  query: AdoptedValueFilters & { sort?: AdoptedValueQuery['sort']; limit?: number; offset?: number },
) {
  const { sort = 'well', limit = 1_000_000, offset = 0 } = query
  return visible(executor)
    .where(matching(viewer, query))
    .orderBy(order(sort), asc(wells.code), asc(adoptedValues.id))
    .limit(limit)
    .offset(offset)
}

/** The logarithms of all current values that match, for statistics. */
export const listLogarithms = (executor: Executor, viewer: Viewer, filters: AdoptedValueFilters) =>
  executor
    .select({
      quantity: adoptedValues.quantity,
      storageClass: adoptedValues.storageClass,
      log10: adoptedValues.log10Value,
    })
    .from(adoptedValues)
    .innerJoin(pumpingTests, eq(pumpingTests.id, adoptedValues.pumpingTestId))
    .innerJoin(wells, eq(wells.id, adoptedValues.wellId))
    .where(matching(viewer, filters))

/** Every value a test ever had, newest first. */
export const listHistory = (executor: Executor, viewer: Viewer, testId: number) =>
  visible(executor)
    .where(and(eq(adoptedValues.pumpingTestId, testId), may(viewer)))
    .orderBy(desc(adoptedValues.validFrom), desc(adoptedValues.id))

export async function findValue(executor: Executor, viewer: Viewer, id: number): Promise<FoundValue | null> {
  const [found] = await visible(executor).where(and(eq(adoptedValues.id, id), may(viewer)))
  return found ?? null
}

/** Current rows of a test, locked. */
export const lockCurrent = (executor: Executor, testId: number): Promise<AdoptedRow[]> =>
  executor
    .select()
    .from(adoptedValues)
    .where(and(eq(adoptedValues.pumpingTestId, testId), isNull(adoptedValues.validTo)))
    .for('update')

export async function insertValue(executor: Executor, row: NewAdoptedValue): Promise<number> {
  const [inserted] = await executor.insert(adoptedValues).values(row).$returningId()
  return inserted!.id
}

export const endValues = (executor: Executor, ids: number[], validTo: Date, replacedBy: number | null) =>
  executor.update(adoptedValues).set({ validTo, replacedBy }).where(inArray(adoptedValues.id, ids))
