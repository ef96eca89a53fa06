import { sql } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import { mapWellQuery, type MapWells } from '#shared/contracts/map.ts'
import { visitor, type Viewer } from '#shared/contracts/permissions.ts'
import { mercatorInts } from '#shared/geodesy/index.ts'
import { bumpDataVersions, dataVersion } from '../../../server/api/adopted-values/data-versions.repository.ts'
import { createMapValues } from '../../../server/api/map/map-values.ts'
import { createServices } from '../../../server/api/services.ts'
import { adoptedValues, pumpingTests, wells } from '../../../server/db/schema/index.ts'
import { addToCells } from '../../../server/db/well-cells.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { countStatements } from '../../support/count-statements.ts'
import { createPublishedWell, islandMiddle, makeRegion, makeUnit } from '../../support/domain.ts'
import { seededDraws } from '../../support/random-field.ts'
import { makeAdoptedValue } from './make-value.ts'

const box = '-22,-39,-20,-38'
const mapQuery = (query: object) => mapWellQuery.parse({ bbox: box, zoom: 9, ...query })

describe('wells with values', () => {
  const app = useApp()
  const person = (role: Viewer['role'], id: number): Viewer => ({ id, name: 'Somebody', role, mayReview: false })
  const viewers: [who: string, viewer: Viewer][] = [
    ['a visitor', visitor],
    ['a reader who entered some as an analyst once', person('reader', 1)],
    ['an analyst', person('analyst', 2)],
    ['a steward', person('steward', 3)],
  ]
  type Shown = Pick<typeof wells.$inferSelect, 'visibility' | 'embargoUntil' | 'createdBy'>
  let facts: { well: typeof wells.$inferSelect; values: { test: Shown; value: typeof adoptedValues.$inferSelect }[] }[]

  beforeAll(async () => {
    const { db } = app.deps.connection
    const { uniform } = seededDraws(5)
    const oneOf = <T>(choices: readonly T[]): T => choices[Math.floor(uniform() * choices.length)]!
    const now = app.deps.now()
    const exposure = () => ({
      visibility: oneOf(['published', 'published', 'internal'] as const),
      embargoUntil: uniform() < 0.2 ? new Date('2031-01-01T00:00:00Z') : null,
      createdBy: oneOf([null, 1, 2]),
      createdAt: now,
    })
    const wellRows = Array.from({ length: 300 }, (_, i) => {
      const position: [number, number] = [
        islandMiddle[0] + uniform() * 0.6 - 0.3,
        islandMiddle[1] + uniform() * 0.4 - 0.2,
      ]
      const [x, y] = position
      const place = { position, ...mercatorInts(x, y), originalX: x, originalY: y, originalEpsg: 4326 }
      return {
        code: `V-${i}`,
        kind: 'well' as const,
        ...place,
        positionOperation: 'none',
        positionAccuracyM: 3,
        ...exposure(),
      }
    })
    await db.insert(wells).values(wellRows)
    await addToCells(db, sql`true`)
    const known = await db.select().from(wells)
    const testRows = known.flatMap(({ id }) =>
      Array.from({ length: oneOf([0, 1, 1, 3]) }, () => ({
        ...{ kind: 'reported' as const, wellId: id, startAt: now, startPrecision: 'day' as const, zone: 'UTC' },
        ...{ aquifer: 'confined' as const, intervalBasis: 'unknown' as const, thicknessBasis: 'unknown' as const },
        ...{ thicknessError: 0.1, rateError: 0.05, ...exposure() },
      })),
    )
    await db.insert(pumpingTests).values(testRows)
    const tests = await db.select().from(pumpingTests)
    const valueRows = tests.map(({ id, wellId }) => ({
      ...{ pumpingTestId: id, analysisId: id, wellId, unitId: oneOf([1, 1, 2]), quantity: oneOf(['T', 'S'] as const) },
      ...{ storageClass: oneOf(['elastic', 'specific-yield'] as const), evidence: oneOf(['firm', 'fair'] as const) },
      ...{
        log10Value: -3 + Math.round(uniform() * 4) / 2,
        log10Error: 0.2,
        method: 'reported',
        origin: 'other' as const,
      },
      ...{ thicknessBasis: 'unknown' as const, testYear: 2010, validFrom: now, validTo: uniform() < 0.1 ? now : null },
    }))
    await db.insert(adoptedValues).values(valueRows)
    const values = await db.select().from(adoptedValues)
    facts = known.map((well) => ({
      well,
      values: values
        .filter(({ wellId }) => wellId === well.id)
        .map((value) => ({ value, test: tests.find(({ id }) => id === value.pumpingTestId)! })),
    }))
  })

  /** Who sees what, in plain words: analysts and stewards all of these, others what is out, everybody their own. */
  const isSeen = ({ id, role }: Viewer, { visibility, embargoUntil, createdBy }: Shown) =>
    role === 'analyst' ||
    role === 'steward' ||
    (visibility === 'published' && !embargoUntil) ||
    (id !== null && createdBy === id)

  /** Code → log10 of the newest current value that somebody sees, of each well that they see and the filter leaves. */
  function expected(who: Viewer, query: ReturnType<typeof mapQuery>) {
    const shown = facts
      .filter(({ well }) => isSeen(who, well))
      .map(({ well, values }) => ({
        code: well.code,
        newest: values
          .filter(({ test }) => isSeen(who, test))
          .map(({ value }) => value)
          .filter((value) => value.unitId === query.unitId && value.quantity === query.quantity && !value.validTo)
          .filter((value) => !query.storageClass || value.storageClass === query.storageClass)
          .at(-1),
      }))
      .filter(({ newest }) => {
        if (query.only === 'none') return !newest
        if (query.only === 'valued' && !newest) return false
        if (query.only && query.only !== 'valued' && newest?.evidence !== query.only) return false
        if (query.from && !(newest && newest.log10Value >= Math.log10(query.from))) return false
        return !(query.below && !(newest && newest.log10Value < Math.log10(query.below)))
      })
    return Object.fromEntries(shown.map(({ code, newest }) => [code, newest?.log10Value ?? null]))
  }

  const filters = [
    {},
    { only: 'valued' },
    { only: 'none' },
    { only: 'firm' },
    { from: 1e-2 },
    { only: 'valued', from: 1e-3, below: 1e-2 },
  ]
  const pairs = [
    { unitId: '1' },
    { unitId: '2', quantity: 'S' },
    { unitId: '1', quantity: 'S', storageClass: 'elastic' },
  ]

  it.each(viewers)('are those that going through all of them leaves, as %s sees them', async (_, who) => {
    const { map } = createServices(app.deps)
    for (const pair of pairs)
      for (const filter of filters) {
        const query = mapQuery({ ...pair, ...filter, zoom: 15 })
        const wanted = expected(who, query)
        const single = await map.wells(who, query)
        const shown = single.wells.map(({ code, value }) => [code, value === null ? null : Math.log10(value)] as const)
        expect(shown.length, JSON.stringify(query)).toBe(Object.keys(wanted).length)
        for (const [code, log10] of shown) {
          if (wanted[code] === null) expect(log10).toBeNull()
          else expect(log10).toBeCloseTo(wanted[code]!, 12)
        }
        const valued = Object.values(wanted).filter((value) => value !== null).length
        expect(single).toMatchObject({ total: shown.length, valued, clusters: [] })
        const grouped = await map.wells(who, { ...query, zoom: 6 })
        expect(grouped).toMatchObject({ total: shown.length, valued })
        const sumOf = (key: 'count' | 'valued') => grouped.clusters.reduce((sum, cluster) => sum + cluster[key], 0)
        expect(sumOf('count') + grouped.wells.length).toBe(shown.length)
        expect(sumOf('valued') + grouped.wells.filter(({ value }) => value !== null).length).toBe(valued)
      }
  })
})

describe('values that are kept', () => {
  let time = new Date('2030-01-01T00:00:00Z')
  const app = useApp({ now: () => time })
  let steward: SignedIn
  let reader: SignedIn
  let unitId: number

  beforeAll(async () => {
    await makeRegion(app)
    unitId = await makeUnit(app)
    steward = await app.signIn('steward')
    reader = await app.signIn('reader')
  })

  const ask = async (who: SignedIn) =>
    (await who.get('/api/map/wells').query({ bbox: box, zoom: 12, unitId }).expect(200)).body as MapWells
  const valueOf = async (who: SignedIn, code: string) =>
    (await ask(who)).wells.find((well) => well.code === code)?.value
  const show = (testId: number, rowVersion: number, exposure: object) =>
    steward
      .put(`/api/pumping-tests/${testId}/visibility`)
      .send({ rowVersion, visibility: 'published', embargoUntil: null, ...exposure })
      .expect(200)

  it('are gone from the map at once when their test is hidden or their value withdrawn, and come with a new one', async () => {
    const wellId = await createPublishedWell(steward, { code: 'KEPT' })
    const { testId, valueId } = await makeAdoptedValue(app, steward, { wellId, unitId, value: 1e-3 })
    expect(await valueOf(reader, 'KEPT')).toBeCloseTo(1e-3)
    await show(testId, 1, { visibility: 'internal' })
    expect(await valueOf(reader, 'KEPT')).toBeNull()
    expect(await valueOf(steward, 'KEPT')).toBeCloseTo(1e-3)
    await show(testId, 2, {})
    await makeAdoptedValue(app, steward, { wellId, unitId, value: 5e-3 })
    expect(await valueOf(reader, 'KEPT')).toBeCloseTo(5e-3)
    await steward.post(`/api/adopted-values/${valueId}/withdrawal`).send({ reason: 'Wrong well' }).expect(200)
    expect((await ask(reader)).valued).toBe(1)
  })

  it('move with their well, and appear when an embargo ends', async () => {
    const wellId = await createPublishedWell(steward, { code: 'LATER' })
    const { testId } = await makeAdoptedValue(app, steward, { wellId, unitId, value: 2e-3 })
    await show(testId, 1, { embargoUntil: '2030-01-01T02:00:00Z' })
    expect(await valueOf(reader, 'LATER')).toBeNull()
    time = new Date('2030-01-01T03:00:00Z')
    await app.deps.jobs.enqueue(app.deps.connection.db, 'lift-embargoes')
    await app.deps.jobs.drain()
    expect(await valueOf(reader, 'LATER')).toBeCloseTo(2e-3)
    const well = (await steward.get(`/api/wells/${wellId}`).expect(200)).body
    const there = { ...well, x: -21.9, y: -38.9, epsg: 4326, confirmOutside: true }
    await steward.put(`/api/wells/${wellId}`).send(there).expect(200)
    const near = await reader
      .get('/api/map/wells')
      .query({ bbox: '-21.91,-38.91,-21.89,-38.89', zoom: 12, unitId, only: 'valued' })
      .expect(200)
    expect((near.body as MapWells).wells.map(({ code }) => code)).toEqual(['LATER'])
  })

  it('are read once for all views of a person until they change, and dropped where there is no room', async () => {
    const { db } = app.deps.connection
    const other = await makeUnit(app)
    await makeAdoptedValue(app, steward, { wellId: await createPublishedWell(steward), unitId: other })
    const valuesOf = createMapValues(app.deps, { adoptedValues: { dataVersion } }, 202)
    const statements = countStatements(app.deps.connection.pool)
    const look = async (id: number) => {
      const before = statements()
      await valuesOf(visitor, mapQuery({ unitId: String(id) }))
      return statements() - before
    }
    // The version alone is one statement. The lists of both units weigh one too many to be kept together.
    expect([await look(unitId), await look(unitId)]).toEqual([2, 1])
    expect([await look(other), await look(other), await look(unitId)]).toEqual([2, 1, 2])
    await bumpDataVersions(db, [unitId])
    expect([await look(unitId), await look(unitId)]).toEqual([2, 1])
  })
})
