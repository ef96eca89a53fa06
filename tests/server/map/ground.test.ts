import { beforeAll, describe, expect, it } from 'vitest'
import type { AquiferUnit, SearchHit } from '#shared/contracts/map.ts'
import { boundaries, boundaryUnits, streams, unitStreams } from '../../../server/db/schema/index.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import request from 'supertest'
import {
  createPublishedWell,
  createWell,
  islandMiddle,
  makeRegion,
  makeTestInput,
  makeUnit,
} from '../../support/domain.ts'
import { makeAdoptedValue } from './make-value.ts'

const app = useApp()
let steward: SignedIn
let reader: SignedIn
let gravels: number
let streamId: number

beforeAll(async () => {
  const { db } = app.deps.connection
  await makeRegion(app)
  steward = await app.signIn('steward')
  reader = await app.signIn('reader')
  gravels = await makeUnit(app, { name: 'Tarrow Gravels', code: 'TG', kind: 'unconfined', depthOrder: 1 })
  const limestone = await makeUnit(app, { name: 'Fennick Limestone', code: 'FL', depthOrder: 3 })
  const [stream] = await db
    .insert(streams)
    .values({ name: 'Tarrow', createdAt: app.deps.now(), streamOrder: 1, path: [islandMiddle, [-21.2, -38.5]] })
    .$returningId()
  streamId = stream!.id
  await db.insert(unitStreams).values({ unitId: gravels, streamId })
  const [fault] = await db
    .insert(boundaries)
    .values({
      name: 'Kelder fault',
      kind: 'fault',
      path: [
        [-21.1, -38.3],
        [-21.1, -38.5],
      ],
    })
    .$returningId()
  await db.insert(boundaryUnits).values({ boundaryId: fault!.id, unitId: limestone })
})

describe('units, streams and boundaries', () => {
  it('lists units shallow first, with the values that the viewer may see', async () => {
    const wellId = await createPublishedWell(steward)
    const { testId } = await makeAdoptedValue(app, steward, { wellId, unitId: gravels })
    await makeAdoptedValue(app, steward, { wellId, unitId: gravels, quantity: 'K' })
    await steward
      .put(`/api/pumping-tests/${testId}/visibility`)
      .send({ rowVersion: 1, visibility: 'internal', embargoUntil: null })
      .expect(200)
    const listFor = async (person: SignedIn) =>
      ((await person.get('/api/aquifer-units').expect(200)).body as { items: AquiferUnit[] }).items
    const items = await listFor(steward)
    expect(items.map(({ code }) => code)).toEqual(['TG', 'FL'])
    expect(items[0]?.valueCounts).toEqual({ T: 1, S: 0, K: 1 })
    expect((await listFor(reader))[0]?.valueCounts).toEqual({ T: 0, S: 0, K: 1 })
  })

  it('describes a unit with its area and connected streams', async () => {
    const { body } = await reader.get(`/api/aquifer-units/${gravels}`).expect(200)
    expect(body).toMatchObject({ name: 'Tarrow Gravels', pickCount: 0, streams: [{ id: streamId, name: 'Tarrow' }] })
    // A square of 0.2° at 38.4° S: 22.2 km by 17.5 km on a sphere, within 1 %.
    expect(body.areaM2 / 1e6).toBeGreaterThan(384)
    expect(body.areaM2 / 1e6).toBeLessThan(392)
  })

  it('describes a stream with its length and the units it is connected to', async () => {
    const { body } = await reader.get(`/api/streams/${streamId}`).expect(200)
    expect(body).toMatchObject({
      name: 'Tarrow',
      streamOrder: 1,
      units: [{ id: gravels, name: 'Tarrow Gravels' }],
    })
    // geod of PROJ 9.1.1 on WGS 84: 11 100.501 m; a sphere is good to 0.5 %.
    expect(Math.abs(body.lengthM / 11_100.501 - 1)).toBeLessThan(0.005)
  })

  it('lists boundaries with the units they affect', async () => {
    const { body } = await reader.get('/api/boundaries').expect(200)
    expect(body.items).toMatchObject([{ name: 'Kelder fault', kind: 'fault', unitIds: [expect.any(Number)] }])
  })

  it.each(['/api/aquifer-units/999', '/api/streams/999'])('answers 404 for %s', async (path) => {
    await reader.get(path).expect(404)
  })

  it('opens to visitors only when the region is open', async () => {
    const administrator = await app.signIn('administrator')
    const open = async (openToVisitors: boolean) => {
      const { rowVersion } = (await administrator.get('/api/region').expect(200)).body as { rowVersion: number }
      await administrator.patch('/api/region').send({ rowVersion, openToVisitors }).expect(200)
    }
    await request(app.app).get('/api/streams').expect(401)
    await open(true)
    await request(app.app).get('/api/streams').expect(200)
    await open(false)
  })
})

describe('the search', () => {
  const search = async (person: SignedIn, text: string) =>
    ((await person.get('/api/search').query({ text }).expect(200)).body as { items: SearchHit[] }).items

  it('finds units, streams and wells by part of their names, whatever the case', async () => {
    await createPublishedWell(steward, { code: 'V-0001', name: 'Tarrow bridge' })
    const kinds = (await search(reader, 'tarrow')).map(({ kind }) => kind)
    expect(kinds).toEqual(['well', 'aquifer-unit', 'stream'])
  })

  it('puts the whole code before codes that begin with it, and those before the rest', async () => {
    for (const code of ['A-Q7', 'Q70', 'Q7']) await createPublishedWell(steward, { code })
    expect((await search(reader, 'q7')).map(({ title }) => title)).toEqual(['Q7', 'Q70', 'A-Q7'])
  })

  it('finds tests by the code of their well and by their day', async () => {
    const wellId = await createPublishedWell(steward, { code: 'TESTED' })
    const units = [{ unitId: gravels, share: 1, basis: 'single-unit' as const }]
    await steward
      .post('/api/pumping-tests')
      .send(makeTestInput({ wellId, units, startLocal: '2017-05-06T09:00', visibility: 'published' }))
      .expect(201)
    expect((await search(reader, 'TESTED')).map(({ kind }) => kind)).toEqual(['well', 'pumping-test'])
    expect((await search(reader, '2017-05-06')).map(({ title }) => title)).toEqual(['TESTED, 2017-05-06'])
  })

  it('does not betray hidden wells and tests', async () => {
    const wellId = await createWell(steward, { code: 'SECRET-9' })
    const units = [{ unitId: gravels, share: 1, basis: 'single-unit' as const }]
    await steward.post('/api/pumping-tests').send(makeTestInput({ wellId, units })).expect(201)
    expect(await search(steward, 'secret-9')).toHaveLength(2)
    expect(await search(reader, 'secret-9')).toEqual([])
  })

  it.each(['%', '_', '\\', "'; drop table wells; --", '<script>alert(1)</script>', '☃'])(
    'takes %s for text and nothing else',
    async (text) => {
      expect(await search(reader, text)).toEqual([])
    },
  )

  it.each(['', ' ', 'x'.repeat(101)])('refuses the text %j', async (text) => {
    await reader.get('/api/search').query({ text }).expect(400)
  })
})
