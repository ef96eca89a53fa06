import { beforeAll, describe, expect, it } from 'vitest'
import type { z } from 'zod'
import type { nearbyTests } from '#shared/contracts/estimates.ts'
import { destination } from '#shared/geodesy/geodesic.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { islandMiddle, makeRegion, makeUnit } from '../../support/domain.ts'
import { keepBooks, reportAt, wholly, type Bookkeeping } from '../../support/values.ts'

type Answer = z.infer<typeof nearbyTests>

const tested = useApp()
let books: Bookkeeping
let reader: SignedIn
let limestone: number
let sandstone: number

const middle = { lon: islandMiddle[0], lat: islandMiddle[1] }
/** A place at a bearing and distance from the middle, by the geodesic on the ellipsoid. */
function around(bearing: number, metres: number): [number, number] {
  const { lon, lat } = destination(middle, bearing, metres)
  return [lon, lat]
}

beforeAll(async () => {
  await makeRegion(tested)
  limestone = await makeUnit(tested, { name: 'Fennick Limestone' })
  sandstone = await makeUnit(tested, { name: 'Brannet Sandstone', depthOrder: 2 })
  books = await keepBooks(tested)
  reader = await tested.signIn('reader')
  const { adopt, report } = books
  await adopt({
    code: 'E-990',
    at: around(90, 990),
    units: wholly(limestone),
    T: 2e-3,
    S: 1e-4,
    storageClass: 'elastic',
    startLocal: '1987',
  })
  await adopt({ code: 'N-400', at: around(0, 400), units: wholly(sandstone), T: 5e-3 })
  await adopt({ code: 'S-1010', at: around(180, 1_010), units: wholly(limestone) })
  // Inside the box around the circle, outside the circle.
  await adopt({ code: 'NE-1200', at: around(45, 1_200), units: wholly(limestone) })
  await adopt({ code: 'Hidden', at: around(200, 100), units: wholly(limestone), visibility: 'internal' })
  await report({ code: 'Waiting', at: around(270, 700), units: wholly(limestone) })
})

async function near(query: Record<string, string | number> = {}, person = reader): Promise<Answer> {
  const search = new URLSearchParams(
    Object.entries({ ...middle, radiusM: 1_000, ...query }).map(([k, v]) => [k, String(v)]),
  )
  return (await person.get(`/api/nearby-tests?${search}`).expect(200)).body as Answer
}
const codes = ({ items }: Answer) => items.map(({ wellCode }) => wellCode)

describe('tests within a radius', () => {
  it('come nearest first, with those just inside and without those just outside', async () => {
    const answer = await near()
    expect(codes(answer)).toEqual(['N-400', 'Waiting', 'E-990'])
    expect(answer.truncated).toBe(false)
    expect(codes(await near({ radiusM: 1_020 }))).toEqual(['N-400', 'Waiting', 'E-990', 'S-1010'])
    expect(codes(await near({ radiusM: 399 }))).toEqual([])
  })

  it('tell distance and bearing on the ellipsoid', async () => {
    const [north, west, east] = (await near()).items
    expect(north!.distanceM).toBeCloseTo(400, 0)
    expect(Math.min(north!.bearingDeg, 360 - north!.bearingDeg)).toBeCloseTo(0, 1)
    expect([west!.bearingDeg, east!.bearingDeg].map(Math.round)).toEqual([270, 90])
    expect(east!.distanceM).toBeCloseTo(990, 0)
  })

  it('tell what they gave: quantity, class, evidence, method, year and unit', async () => {
    const east = (await near()).items.find(({ wellCode }) => wellCode === 'E-990')!
    expect(east).toMatchObject({ year: 1987, unitNames: ['Fennick Limestone'] })
    expect(east.values).toEqual([
      { quantity: 'T', value: expect.closeTo(2e-3, 12), storageClass: null, evidence: 'fair', method: 'reported' },
      {
        quantity: 'S',
        value: expect.closeTo(1e-4, 12),
        storageClass: 'elastic',
        evidence: expect.any(String),
        method: 'reported',
      },
    ])
  })

  it('are there without a value while they wait for review', async () => {
    expect((await near()).items.find(({ wellCode }) => wellCode === 'Waiting')!.values).toEqual([])
  })

  it('of one unit leave the others out', async () => {
    expect(codes(await near({ unitId: sandstone }))).toEqual(['N-400'])
    expect(codes(await near({ unitId: limestone }))).toEqual(['Waiting', 'E-990'])
  })

  it('that are internal show to analysts only', async () => {
    expect(codes(await near({}, await tested.signIn('analyst')))[0]).toBe('Hidden')
    expect(codes(await near())).not.toContain('Hidden')
  })

  it('are looked for within 5 km unless told otherwise', async () => {
    const { lon, lat } = middle
    const answer = (await reader.get(`/api/nearby-tests?lat=${lat}&lon=${lon}`).expect(200)).body as Answer
    expect(codes(answer)).toContain('NE-1200')
  })

  it.each([{ radiusM: 0 }, { radiusM: 100_001 }, { lat: 'north' }, { lon: 181 }])(
    '%j is a bad request',
    async (query) => {
      const search = new URLSearchParams(Object.entries({ ...middle, ...query }).map(([k, v]) => [k, String(v)]))
      await reader.get(`/api/nearby-tests?${search}`).expect(400)
    },
  )

  it('beyond two hundred are cut off, the nearest kept, and the answer says so', async () => {
    const crowd: [number, number] = [-21.35, -38.5]
    const { services, steward } = books
    const { wellId } = await books.report({ at: crowd, units: wholly(limestone), startLocal: '1960-01-01' })
    for (let i = 0; i < 200; i += 1)
      await reportAt(services, steward, wellId, {
        units: wholly(limestone),
        startLocal: `${1961 + Math.floor(i / 12)}-${String((i % 12) + 1).padStart(2, '0')}-01`,
      })
    await books.report({ code: 'Farthest', at: [crowd[0] + 0.005, crowd[1]], units: wholly(limestone) })
    const answer = await near({ lon: crowd[0], lat: crowd[1] })
    expect(answer.items).toHaveLength(200)
    expect(answer.truncated).toBe(true)
    expect(codes(answer)).not.toContain('Farthest')
  })
})
