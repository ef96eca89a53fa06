import { beforeAll, describe, expect, it } from 'vitest'
import type { Estimate } from '#shared/contracts/estimates.ts'
import type { AquiferUnit } from '#shared/contracts/map.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import type { Well } from '#shared/contracts/wells.ts'
import { accept, enterTest, publishTest, readTest, submitAnalysis } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import {
  createPublishedWell,
  createWell,
  islandMiddle,
  makeRegion,
  makeTestInput,
  makeUnit,
  makeWellInput,
} from '../../support/domain.ts'

let time = new Date('2024-05-31T23:30:00Z')
const tested = useApp({ now: () => time })
let analyst: SignedIn
let reviewer: SignedIn
let steward: SignedIn
let reader: SignedIn

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
  steward = await tested.signIn('steward')
  reader = await tested.signIn('reader')
})

const [lon, lat] = islandMiddle
const codeOf = (body: unknown) => (body as Problem).code
const estimateOf = async (person: SignedIn, unitId: number) =>
  (await person.get(`/api/estimates?lon=${lon}&lat=${lat}&unitId=${unitId}`).expect(200)).body as Estimate

const hide = ({ id, rowVersion }: Well) =>
  steward.put(`/api/wells/${id}/visibility`).send({ rowVersion, visibility: 'private', embargoUntil: null })
const embargo = (id: number, rowVersion: number, embargoUntil: string) =>
  steward.put(`/api/pumping-tests/${id}/visibility`).send({ rowVersion, visibility: 'published', embargoUntil })
const wellOf = async (id: number) => (await steward.get(`/api/wells/${id}`).expect(200)).body as Well

async function adopted(unitId: number) {
  const entered = await enterTest(analyst, { unitId })
  await publishTest(steward, entered)
  await accept(reviewer, await submitAnalysis(analyst, entered.id)).expect(200)
  return { ...entered, test: await readTest(steward, entered.id) }
}

describe('a private well', () => {
  it('is no observation well of a test that others see', async () => {
    const { observation, id } = await enterTest(analyst, { unitId: await makeUnit(tested) })
    const { body } = await hide(await wellOf(observation)).expect(409)
    expect(codeOf(body)).toBe('visibility/tests-more-visible')
    await analyst.get(`/api/pumping-tests/${id}/inputs`).expect(200)
  })
})

describe('an estimate', () => {
  it('moves with a well whose position is corrected', async () => {
    const unitId = await makeUnit(tested)
    const { pumped } = await adopted(unitId)
    const before = (await estimateOf(reader, unitId)).contributions[0]!
    const well = await wellOf(pumped)
    const input = makeWellInput({ code: well.code, x: lon + 0.02, y: lat })
    await analyst
      .put(`/api/wells/${pumped}`)
      .send({ ...input, rowVersion: well.rowVersion })
      .expect(200)
    const after = (await estimateOf(reader, unitId)).contributions[0]!
    expect(before.distanceM).toBeLessThan(1)
    expect(after.distanceM).toBeGreaterThan(1_500)
  })

  it('is without an embargoed test for a reader until the embargo was lifted', async () => {
    const unitId = await makeUnit(tested)
    const { id, test } = await adopted(unitId)
    expect((await estimateOf(reader, unitId)).valueCount).toBe(1)
    await embargo(id, test.rowVersion, '2024-06-01T00:00:00Z').expect(200)
    expect((await estimateOf(reader, unitId)).valueCount).toBe(0)
    expect((await estimateOf(analyst, unitId)).valueCount).toBe(1)

    time = new Date('2024-06-01T00:00:01Z')
    await tested.deps.jobs.enqueue(tested.deps.connection.db, 'lift-embargoes')
    await tested.deps.jobs.drain()
    expect((await estimateOf(reader, unitId)).valueCount).toBe(1)
    expect((await readTest(steward, id)).embargoUntil).toBeNull()
  })
})

describe('an embargo', () => {
  it('cannot end in the past, where it would hide until the daily job or publish by a slip of the pen', async () => {
    const { id, test } = await adopted(await makeUnit(tested))
    for (const over of ['2023-06-01T00:00:00Z', time.toISOString()]) {
      const { body } = await embargo(id, test.rowVersion, over).expect(400)
      expect((body as Problem).fields).toMatchObject([{ path: 'embargoUntil', code: 'visibility/embargo-over' }])
    }
    expect((await readTest(reader, id)).rowVersion).toBe(test.rowVersion)
  })

  it('whose day has come hides its record until the job has lifted it, from lists and addresses alike', async () => {
    const unitId = await makeUnit(tested)
    const { id, test, pumped } = await adopted(unitId)
    // Hours only: in a day, nobody is signed in any more.
    const hours = (count: number) => new Date(time.getTime() + count * 3_600_000)
    await embargo(id, test.rowVersion, hours(1).toISOString()).expect(200)
    time = hours(2)
    const seen = async () =>
      (await reader.get(`/api/pumping-tests?unitId=${unitId}`).expect(200)).body as { total: number }
    expect((await seen()).total).toBe(0)
    await reader.get(`/api/pumping-tests/${id}`).expect(404)
    expect(((await reader.get(`/api/wells/${pumped}`).expect(200)).body as Well).tests).toEqual([])

    await tested.deps.jobs.enqueue(tested.deps.connection.db, 'lift-embargoes')
    await tested.deps.jobs.drain()
    expect((await seen()).total).toBe(1)
    await readTest(reader, id)
  })
})

describe('a published test', () => {
  const body = (wellId: number, unitId: number, visibility: 'published' | 'internal') =>
    makeTestInput({ wellId, units: [{ unitId, share: 1, basis: 'single-unit' }], visibility })

  it('is not entered at an embargoed well, which would hide it', async () => {
    const unitId = await makeUnit(tested)
    const id = await createPublishedWell(steward)
    const exposure = { rowVersion: 1, visibility: 'published', embargoUntil: '2030-01-01T00:00:00Z' }
    await steward.put(`/api/wells/${id}/visibility`).send(exposure).expect(200)
    const refused = await steward
      .post('/api/pumping-tests')
      .send(body(id, unitId, 'published'))
      .expect(400)
    expect((refused.body as Problem).fields).toMatchObject([
      { path: 'visibility', code: 'pumping-test/more-visible-than-well' },
    ])
    await steward
      .post('/api/pumping-tests')
      .send(body(id, unitId, 'internal'))
      .expect(201)
  })

  it('under the embargo of its well is edited like any other', async () => {
    const unitId = await makeUnit(tested)
    const id = await createPublishedWell(steward)
    const made = await steward
      .post('/api/pumping-tests')
      .send(body(id, unitId, 'published'))
      .expect(201)
    const { id: testId } = made.body as { id: number }
    const until = '2030-01-01T00:00:00Z'
    await embargo(testId, 1, until).expect(200)
    await steward
      .put(`/api/wells/${id}/visibility`)
      .send({ rowVersion: 1, visibility: 'published', embargoUntil: until })
      .expect(200)
    const change = { ...body(id, unitId, 'internal'), conditions: 'Rain in the night.', rowVersion: 2 }
    const edited = await steward.put(`/api/pumping-tests/${testId}`).send(change).expect(200)
    expect(edited.body).toMatchObject({ visibility: 'published', conditions: 'Rain in the night.' })
  })
})

describe('the picks of a unit', () => {
  it('are counted without those of hidden wells', async () => {
    const unitId = await makeUnit(tested)
    const picks = [{ unitId, topM: 10, bottomM: 40, source: 'driller’s log' }]
    await createPublishedWell(steward, { picks })
    await createWell(analyst, { picks })
    const countFor = async (person: SignedIn) =>
      ((await person.get(`/api/aquifer-units/${unitId}`).expect(200)).body as AquiferUnit & { pickCount: number })
        .pickCount
    expect([await countFor(reader), await countFor(analyst)]).toEqual([1, 2])
  })
})

describe('nearby tests', () => {
  it('are found on both sides of the date line', async () => {
    const unitId = await makeUnit(tested)
    const place = { x: 179.999, y: -38.4, confirmOutside: true }
    const entered = await enterTest(analyst, {
      unitId,
      pumped: place,
      observation: { ...place, x: 179.998 },
    })
    await publishTest(steward, entered)
    const { body } = await reader.get('/api/nearby-tests?lon=-179.999&lat=-38.4&radiusM=5000').expect(200)
    expect((body as { items: { pumpingTestId: number }[] }).items.map((item) => item.pumpingTestId)).toEqual([
      entered.id,
    ])
  })
})
