import { beforeAll, describe, expect, it } from 'vitest'
import type { Problem } from '#shared/contracts/problem.ts'
import type { Well, WellInput } from '#shared/contracts/wells.ts'
import { geodesicDistance } from '#shared/geodesy/index.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { createPublishedWell, createWell, makeRegion, makeUnit, makeWellInput } from '../../support/domain.ts'

const app = useApp()
let steward: SignedIn
let analyst: SignedIn
let reader: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(app)
  steward = await app.signIn('steward')
  analyst = await app.signIn('analyst')
  reader = await app.signIn('reader')
  unitId = await makeUnit(app)
})

const read = async (person: SignedIn, id: number) => (await person.get(`/api/wells/${id}`).expect(200)).body as Well
const refused = async (overrides: Partial<Record<keyof WellInput, unknown>>) => {
  const answer = await analyst.post('/api/wells').send({ ...makeWellInput(), ...overrides })
  expect(answer.status).toBe(400)
  return (answer.body as Problem).fields.map(({ path, code }) => [path, code])
}

describe('entering a well', () => {
  it('keeps everything that was given', async () => {
    const screens = [{ topM: 20, bottomM: 40, validFrom: '1998-01-01T00:00:00.000Z', validTo: null }]
    const picks = [{ unitId, topM: 12, bottomM: null, source: "Driller's log, 1998" }]
    const input = makeWellInput({ name: 'By the mill', notes: 'Locked', ownerLabel: 'Water board', screens, picks })
    const id = await createWell(analyst, input)
    const { x: _x, y: _y, epsg: _epsg, confirmOutside: _, picks: _picks, ...facts } = input
    const saved = await read(analyst, id)
    expect(saved).toMatchObject(facts)
    expect(saved.picks).toEqual([{ ...picks[0], unitName: 'Fennick Limestone' }])
    expect(saved).toMatchObject({ tests: [], values: [], mayEdit: true, rowVersion: 1 })
  })

  it('places coordinates of any offered system, and keeps them as given', async () => {
    // cs2cs of PROJ 9.1.1 (Debian 12), EPSG:32727 to EPSG:4326.
    const id = await createWell(analyst, { epsg: 32727, x: 483_940, y: 5_747_880 })
    const saved = await read(analyst, id)
    expect(geodesicDistance(saved, { lon: -21.1839683, lat: -38.4171829 })).toBeLessThan(0.02)
    expect(saved).toMatchObject({ originalEpsg: 32727, originalX: 483_940, originalY: 5_747_880 })
  })

  it.each([
    ['at latitude 0, longitude 0', { x: 0, y: 0 }, 'x', 'well/at-zero'],
    ['with an unknown system', { epsg: 1234 }, 'epsg', 'crs/unknown'],
    ['with latitude and longitude exchanged', { x: -38.4, y: -21.2 }, 'x', 'well/swapped'],
    ['with a sign forgotten', { x: 21.2, y: -38.4 }, 'x', 'well/sign'],
    ['with both signs forgotten', { x: 21.2, y: 38.4 }, 'x', 'well/sign'],
    ['far outside the region', { x: -10, y: -38.4 }, 'x', 'well/outside-region'],
    ['with a latitude beyond the pole', { y: -138.4 }, 'x', 'crs/outside-area'],
    ['with coordinates of another zone', { epsg: 32727, x: 48_394, y: 574_788 }, 'x', 'crs/outside-area'],
  ])('is refused %s', async (_, position, path, code) => {
    expect(await refused(position)).toEqual([[path, code]])
  })

  it('says which place was probably meant', async () => {
    const answer = await analyst.post('/api/wells').send(makeWellInput({ x: -38.4, y: -21.2 }))
    expect((answer.body as Problem).fields[0]?.params).toEqual({ lat: -38.4, lon: -21.2 })
  })

  it('is possible outside the region once that is confirmed', async () => {
    await createWell(analyst, { x: -10, y: -38.4, confirmOutside: true })
  })

  it('is refused at 0, 0 even when confirmed', async () => {
    expect(await refused({ x: 0, y: 0, confirmOutside: true })).toEqual([['x', 'well/at-zero']])
  })

  it('is refused for a code that is taken, whatever its case', async () => {
    await createWell(analyst, { code: 'Mill-7' })
    expect(await refused({ code: 'MILL-7' })).toEqual([['code', 'well/code-taken']])
    expect(await refused({ code: '  mill-7 ' })).toEqual([['code', 'well/code-taken']])
  })

  it('is refused for construction that cannot be', async () => {
    const screen = (topM: number, bottomM: number) => ({ topM, bottomM, validFrom: null, validTo: null })
    const pick = { unitId, topM: 10, bottomM: 20, source: 'log' }
    expect(await refused({ screens: [screen(40, 30)] })).toEqual([['screens.0.bottomM', 'well/screen-order']])
    expect(await refused({ screens: [screen(20, 30), screen(40, 70)] })).toEqual([
      ['screens.1.bottomM', 'well/screen-too-deep'],
    ])
    expect(await refused({ picks: [{ ...pick, bottomM: 5 }] })).toEqual([['picks.0.bottomM', 'well/pick-order']])
    expect(await refused({ picks: [pick, pick] })).toEqual([['picks.1.unitId', 'well/pick-twice']])
    expect(await refused({ picks: [{ ...pick, unitId: 999_999 }] })).toEqual([['picks', 'well/unknown-unit']])
  })

  it('names every field that is missing or of the wrong kind', async () => {
    const paths = (await refused({ code: ' ', x: null, y: 'south', wellRadiusM: 0 })).map(([path]) => path)
    expect(paths.sort()).toEqual(['code', 'wellRadiusM', 'x', 'y'])
  })

  it.each(['<img src=x onerror=alert(1)>', "'; DROP TABLE wells; --", '=HYPERLINK("http://x")', 'Brønn № 5 💧'])(
    'takes the name %s as it is',
    async (name) => {
      const id = await createWell(analyst, { name, notes: name })
      expect(await read(analyst, id)).toMatchObject({ name, notes: name })
    },
  )

  it('is not open to readers', async () => {
    await reader.post('/api/wells').send(makeWellInput()).expect(403)
  })

  it('shows it to readers only when a steward or an administrator enters it', async () => {
    expect(await refused({ visibility: 'published' })).toEqual([
      ['visibility', 'visibility/publishing-is-for-stewards'],
    ])
    for (const role of ['steward', 'administrator'] as const) {
      const id = await createPublishedWell(await app.signIn(role))
      expect((await read(reader, id)).visibility).toBe('published')
    }
  })
})

describe('reading wells', () => {
  it('answers 404 for a well that is hidden from the reader, as for one that does not exist', async () => {
    const internal = await createWell(steward)
    const own = await createWell(analyst, { visibility: 'private' })
    const hidden = await reader.get(`/api/wells/${internal}`).expect(404)
    const missing = await reader.get('/api/wells/999999').expect(404)
    expect({ ...hidden.body, requestId: '' }).toEqual({ ...missing.body, requestId: '' })
    const other = await app.signIn('analyst')
    await other.get(`/api/wells/${own}`).expect(404)
    await analyst.get(`/api/wells/${own}`).expect(200)
    await steward.get(`/api/wells/${own}`).expect(200)
  })

  it('lists by code in pages, and finds by part of code or name', async () => {
    for (const code of ['LIST-b', 'LIST-a', 'LIST-c']) await createPublishedWell(steward, { code })
    await createWell(steward, { code: 'LIST-d' })
    const page = await reader.get('/api/wells').query({ text: 'list-', limit: 2 }).expect(200)
    expect(page.body).toMatchObject({ total: 3, next: 2 })
    expect(page.body.items.map(({ code }: { code: string }) => code)).toEqual(['LIST-a', 'LIST-b'])
  })

  it.each(['0', '-1', '1e3', 'one', '1%20or%201=1'])('knows no well %s', async (id) => {
    await reader.get(`/api/wells/${id}`).expect(400)
  })
})

describe('changing a well', () => {
  it('is for the person who entered it and for stewards', async () => {
    const id = await createWell(analyst, { code: 'OWN' })
    const change = { ...makeWellInput({ code: 'OWN', depthM: 71 }), rowVersion: 1 }
    const other = await app.signIn('analyst')
    await other.put(`/api/wells/${id}`).send(change).expect(403)
    expect((await read(other, id)).mayEdit).toBe(false)
    await analyst.put(`/api/wells/${id}`).send(change).expect(200)
    await steward
      .put(`/api/wells/${id}`)
      .send({ ...change, depthM: 72, rowVersion: 2 })
      .expect(200)
    expect(await read(analyst, id)).toMatchObject({ depthM: 72, rowVersion: 3 })
  })

  it('of an older version is a conflict and changes nothing', async () => {
    const id = await createWell(analyst, { code: 'RACE' })
    const change = (depthM: number) => ({ ...makeWellInput({ code: 'RACE', depthM }), rowVersion: 1 })
    await analyst.put(`/api/wells/${id}`).send(change(61)).expect(200)
    const late = await steward.put(`/api/wells/${id}`).send(change(99)).expect(409)
    expect(late.body).toMatchObject({ code: 'edit/conflict' })
    expect(await read(steward, id)).toMatchObject({ depthM: 61 })
  })

  it('leaves its visibility to the stewards', async () => {
    const id = await createWell(analyst, { code: 'STAYS' })
    const change = { ...makeWellInput({ code: 'STAYS', visibility: 'published' }), rowVersion: 1 }
    await analyst.put(`/api/wells/${id}`).send(change).expect(200)
    expect((await read(analyst, id)).visibility).toBe('internal')
  })

  it('replaces screens and picks', async () => {
    const picks = [{ unitId, topM: 5, bottomM: 9, source: 'log' }]
    const id = await createWell(analyst, { code: 'PARTS', picks })
    const screens = [{ topM: 1, bottomM: 2, validFrom: null, validTo: null }]
    await analyst
      .put(`/api/wells/${id}`)
      .send({ ...makeWellInput({ code: 'PARTS', screens, picks: [] }), rowVersion: 1 })
      .expect(200)
    expect(await read(analyst, id)).toMatchObject({ screens, picks: [] })
  })

  it('does not add the error of the datum shift a second time', async () => {
    // Pulkovo 1942: the registry states metres for its shift to WGS 84.
    const place = { epsg: 4284, x: 30, y: 60, confirmOutside: true }
    const id = await createWell(analyst, { code: 'SHIFT', ...place })
    const first = (await read(analyst, id)).positionAccuracyM
    expect(first).toBeGreaterThan(3)
    const again = makeWellInput({ code: 'SHIFT', ...place, positionAccuracyM: first })
    await analyst
      .put(`/api/wells/${id}`)
      .send({ ...again, rowVersion: 1 })
      .expect(200)
    expect((await read(analyst, id)).positionAccuracyM).toBe(first)
    await analyst
      .put(`/api/wells/${id}`)
      .send({ ...again, positionAccuracyM: 100, rowVersion: 2 })
      .expect(200)
    expect((await read(analyst, id)).positionAccuracyM).toBeGreaterThan(100)
  })
})
