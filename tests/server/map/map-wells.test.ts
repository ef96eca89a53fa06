import { like } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import type { MapWells } from '#shared/contracts/map.ts'
import { wells } from '../../../server/db/schema/index.ts'
import { addToCells } from '../../../server/db/well-cells.ts'
import { mercatorInts } from '#shared/geodesy/index.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { createPublishedWell, createWell, makeRegion, makeUnit } from '../../support/domain.ts'
import { makeAdoptedValue } from './make-value.ts'

const app = useApp()
const island = '-21.5,-38.6,-20.9,-38.2'
let steward: SignedIn
let analyst: SignedIn
let reader: SignedIn
let unitId: number
let otherUnitId: number

const ask = async (person: SignedIn, query: Record<string, string | number | undefined>) =>
  (
    await person
      .get('/api/map/wells')
      .query({ bbox: island, zoom: 11, ...query })
      .expect(200)
  ).body as MapWells
const codes = ({ wells: list }: MapWells) => list.map(({ code }) => code).sort()

/** Straight into the table: hundreds of wells through the API would take a minute. */
async function insertWells(count: number, place: (i: number) => [lon: number, lat: number], prefix: string) {
  const rows = Array.from({ length: count }, (_, i) => {
    const [lon, lat] = place(i)
    const original = { originalX: lon, originalY: lat, originalEpsg: 4326, positionOperation: 'none' }
    const exposure = { visibility: 'published' as const, createdAt: app.deps.now(), positionAccuracyM: 3 }
    const position: [number, number] = [lon, lat]
    return {
      code: `${prefix}${i}`,
      kind: 'well' as const,
      position,
      ...mercatorInts(lon, lat),
      ...original,
      ...exposure,
    }
  })
  const { db } = app.deps.connection
  await db.insert(wells).values(rows)
  await addToCells(db, like(wells.code, `${prefix}%`))
}

beforeAll(async () => {
  await makeRegion(app)
  steward = await app.signIn('steward')
  analyst = await app.signIn('analyst')
  reader = await app.signIn('reader')
  unitId = await makeUnit(app)
  otherUnitId = await makeUnit(app, { name: 'Brannet Sandstone' })

  const firm = await createPublishedWell(steward, { code: 'FIRM', x: -21.3 })
  const slight = await createPublishedWell(steward, { code: 'SLIGHT', x: -21.25 })
  await createPublishedWell(steward, { code: 'BARE' })
  await createWell(steward, { code: 'INSIDE', x: -21.1 })
  const embargoed = await createPublishedWell(steward, { code: 'LATER', x: -21.05 })
  await makeAdoptedValue(app, steward, { wellId: firm, unitId, value: 5e-3 })
  await makeAdoptedValue(app, steward, { wellId: slight, unitId, value: 1e-4, evidence: 'slight' })
  await makeAdoptedValue(app, steward, {
    wellId: slight,
    unitId,
    quantity: 'S',
    value: 0.2,
    storageClass: 'specific-yield',
  })
  await steward
    .put(`/api/wells/${embargoed}/visibility`)
    .send({ rowVersion: 1, visibility: 'published', embargoUntil: '2031-01-01T00:00:00Z' })
    .expect(200)
  // Far from the island, in two crowds on either side of the date line.
  await insertWells(3, (i) => [179.5 + i / 10, 10], 'WEST-')
  await insertWells(2, (i) => [-179.9 + i / 10, 10], 'EAST-')
  await insertWells(1_300, (i) => [40 + (i % 40) / 100, 20 + Math.floor(i / 40) / 100], 'MANY-')
  await insertWells(90, (i) => [60 + (i % 9) / 1e4, 20 + Math.floor(i / 9) / 1e4], 'DENSE-')
  await insertWells(1, () => [60.5, 20], 'ALONE-')
})

describe('wells on the map', () => {
  it('shows each well with the value and evidence of the chosen pair', async () => {
    const { wells: list } = await ask(steward, { unitId })
    const byCode = Object.fromEntries(list.map((well) => [well.code, well]))
    expect(byCode.FIRM).toMatchObject({ value: expect.closeTo(5e-3, 9), evidence: 'firm' })
    expect(byCode.SLIGHT).toMatchObject({ value: expect.closeTo(1e-4, 9), evidence: 'slight' })
    expect(byCode.BARE).toMatchObject({ value: null, evidence: null })
  })

  it('shows every well hollow without a unit, and for a unit without values', async () => {
    const queries: Record<string, number>[] = [{}, { unitId: otherUnitId }]
    for (const query of queries) {
      const answer = await ask(steward, query)
      expect(answer.wells.every(({ value }) => value === null)).toBe(true)
      expect(answer.valued).toBe(0)
      expect(answer.total).toBe(5)
    }
  })

  it('tells specific yield from elastic storage', async () => {
    const withClass = (storageClass: string) => ask(steward, { unitId, quantity: 'S', storageClass, only: 'valued' })
    expect(codes(await withClass('specific-yield'))).toEqual(['SLIGHT'])
    expect(codes(await withClass('elastic'))).toEqual([])
  })

  it.each([
    [{ only: 'firm' }, ['FIRM']],
    [{ only: 'slight' }, ['SLIGHT']],
    [{ only: 'fair' }, []],
    [{ only: 'none' }, ['BARE', 'INSIDE', 'LATER']],
    [{ only: 'valued' }, ['FIRM', 'SLIGHT']],
    [{ from: 1e-3 }, ['FIRM']],
    [{ below: 1e-3 }, ['SLIGHT']],
    [{ from: 1e-4, below: 5e-3 }, ['SLIGHT']],
  ])('leaves only the wells of a legend entry: %o', async (filter, expected) => {
    expect(codes(await ask(steward, { unitId, ...filter }))).toEqual(expected)
  })

  it('hides internal and embargoed wells from readers, and counts without them', async () => {
    expect(codes(await ask(analyst, {}))).toEqual(['BARE', 'FIRM', 'INSIDE', 'LATER', 'SLIGHT'])
    const shown = await ask(reader, {})
    expect(codes(shown)).toEqual(['BARE', 'FIRM', 'SLIGHT'])
    expect(shown.total).toBe(3)
  })

  it('hides the value of an internal test at a published well from readers', async () => {
    const wellId = await createPublishedWell(steward, { code: 'HALF', x: -21.4 })
    const { testId } = await makeAdoptedValue(app, steward, { wellId, unitId })
    await steward
      .put(`/api/pumping-tests/${testId}/visibility`)
      .send({ rowVersion: 1, visibility: 'internal', embargoUntil: null })
      .expect(200)
    const half = async (person: SignedIn) => (await ask(person, { unitId })).wells.find(({ code }) => code === 'HALF')
    expect((await half(analyst))?.value).toBeCloseTo(1e-3)
    expect(await half(reader)).toMatchObject({ value: null, evidence: null })
  })

  it('shows the newest of several current values, and none that has ended', async () => {
    const wellId = await createPublishedWell(steward, { code: 'OFTEN', x: -21.45 })
    await makeAdoptedValue(app, steward, { wellId, unitId, value: 1e-2 })
    await makeAdoptedValue(app, steward, { wellId, unitId, value: 2e-2, evidence: 'fair' })
    await makeAdoptedValue(app, steward, { wellId, unitId, value: 9e-2, validTo: app.deps.now() })
    const { wells: list } = await ask(steward, { unitId })
    expect(list.find(({ code }) => code === 'OFTEN')).toMatchObject({
      value: expect.closeTo(2e-2, 9),
      evidence: 'fair',
    })
  })
})

describe('clusters', () => {
  it('stand for more wells than can be shown, and lose none', async () => {
    const { wells: single, clusters, total } = await ask(reader, { bbox: '39,19,41,21', zoom: 9 })
    expect(total).toBe(1_300)
    expect(clusters.length).toBeGreaterThan(5)
    expect(clusters.reduce((sum, { count }) => sum + count, single.length)).toBe(1_300)
    for (const { lon, lat, count } of clusters) {
      expect(count).toBeGreaterThan(1)
      expect(lon >= 40 && lon <= 40.4 && lat >= 20 && lat <= 20.4).toBe(true)
    }
  })

  it('count the wells with a value', async () => {
    const world = await ask(steward, { bbox: '-180,-85,180,85', zoom: 2, unitId })
    const valued = world.clusters.reduce((sum, cluster) => sum + cluster.valued, 0)
    expect(valued + world.wells.filter(({ value }) => value !== null).length).toBe(world.valued)
    expect(world.valued).toBeGreaterThanOrEqual(2)
  })

  it('give way to single wells in a smaller box', async () => {
    const { wells: single, clusters } = await ask(reader, { bbox: '40,20,40.1,20.1', zoom: 13 })
    expect(clusters).toEqual([])
    expect(single.length).toBeGreaterThan(80)
  })

  it('stand for few wells too where these would hide each other, and leave a lone one single', async () => {
    const { wells: single, clusters } = await ask(reader, { bbox: '59,19,61,21', zoom: 10 })
    expect(codes({ wells: single } as MapWells)).toEqual(['ALONE-0'])
    expect(clusters.reduce((sum, { count }) => sum + count, 0)).toBe(90)
    expect((await ask(reader, { bbox: '59.99,19.99,60.01,20.01', zoom: 16 })).wells).toHaveLength(90)
  })
})

describe('boxes', () => {
  it('reach across the date line', async () => {
    const { total } = await ask(reader, { bbox: '179,9,-179,11', zoom: 8 })
    expect(total).toBe(5)
  })

  it('end at the date line', async () => {
    expect((await ask(reader, { bbox: '179,9,180,11', zoom: 8 })).total).toBe(3)
    expect((await ask(reader, { bbox: '-180,9,-179,11', zoom: 8 })).total).toBe(2)
  })

  it('hold every well when they are the world', async () => {
    const everything = await ask(steward, { bbox: '-180,-90,180,90', zoom: 1 })
    expect(everything.total).toBe(await app.deps.connection.db.$count(wells))
  })

  it('of the world are answered as coarsely at street level as a screen of 8 K would show them', async () => {
    const bbox = '-180,-85,180,85'
    const close = await ask(steward, { bbox, zoom: 22, unitId })
    expect(close).toEqual(await ask(steward, { bbox, zoom: 5, unitId }))
    expect(close.clusters.length + close.wells.length).toBeLessThan(30)
    // What a window shows is as fine as its zoom.
    const window = await ask(reader, { bbox: '40,20,40.4,20.4', zoom: 15 })
    expect(window.clusters.length + window.wells.length).toBeGreaterThan(1_000)
  })

  it.each([
    [{ bbox: '1,2,3' }],
    [{ bbox: 'a,b,c,d' }],
    [{ bbox: '-200,0,0,10' }],
    [{ zoom: 23 }],
    [{ zoom: 1.5 }],
    [{ unitId: "1' or '1'='1" }],
    [{ only: 'all' }],
    [{ from: 0 }],
    [{ from: -1 }],
    [{ quantity: 'Q' }],
  ])('and other questions that make no sense are refused: %o', async (query) => {
    const answer = await reader.get('/api/map/wells').query({ bbox: island, zoom: 11, ...query })
    expect(answer.status).toBe(400)
    expect(answer.body).toMatchObject({ code: 'request/invalid' })
  })
})
