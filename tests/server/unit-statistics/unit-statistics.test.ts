import { beforeAll, describe, expect, it } from 'vitest'
import type { UnitStatistics } from '#shared/contracts/unit-statistics.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { islandMiddle, makeRegion, makeUnit, squareAround } from '../../support/domain.ts'
import { keepBooks, wholly, type Bookkeeping, type Reported } from '../../support/values.ts'

const tested = useApp()
let books: Bookkeeping
let reader: SignedIn
let analyst: SignedIn
let unitId: number
const adopted: Reported[] = []

const [lon, lat] = islandMiddle
/** 2 km apart, so that each well is a site of its own. */
const at = (i: number): [number, number] => [lon + (2 * (i % 3)) / 87, lat + (2 * Math.floor(i / 3)) / 111]

beforeAll(async () => {
  await makeRegion(tested)
  books = await keepBooks(tested)
  reader = await tested.signIn('reader')
  analyst = await tested.signIn('analyst')
  unitId = await makeUnit(tested, { name: 'Fennick Limestone', outline: squareAround(islandMiddle, 0.4) })
  // log10 T of -4, -3.5 … -2: the arithmetic can be done by hand.
  for (let i = 0; i < 5; i++)
    adopted.push(
      await books.adopt({
        code: `L-${i}`,
        at: at(i),
        units: wholly(unitId),
        T: 10 ** (-4 + i / 2),
        startLocal: `${1980 + i}-05-04`,
        origin: i === 0 ? 'slug-test' : 'legacy-reviewed',
        intervalTopM: 10 * i,
        intervalBottomM: 10 * i + 10,
      }),
    )
  const storage = { units: wholly(unitId), T: 1e-3, S: 1e-4 }
  await books.adopt({ ...storage, code: 'E-1', at: at(6), storageClass: 'elastic' })
  await books.adopt({ ...storage, code: 'A-1', at: at(7), S: 0.01, storageClass: 'apparent' })
})

const ask = (person: SignedIn, query = '', id = unitId) => person.get(`/api/aquifer-units/${id}/statistics?${query}`)
const statistics = async (person: SignedIn, query = '') => (await ask(person, query).expect(200)).body as UnitStatistics

describe('the statistics of a unit', () => {
  it('are those of the logarithms, with sites, evidence, depth and year', async () => {
    const { unit, figures, values, excluded, variogram } = await statistics(reader)
    expect(unit).toMatchObject({ id: unitId, name: 'Fennick Limestone' })
    // -4, -3.5, -3, -2.5, -2 and twice -3: mean and median -3, squares add up to 2.5.
    expect(figures).toMatchObject({ n: 7, sites: 7, mean: expect.closeTo(-3, 9), median: expect.closeTo(-3, 9) })
    expect(figures!.deviation).toBeCloseTo(Math.sqrt(2.5 / 6), 9)
    expect([figures!.least, figures!.most]).toEqual([expect.closeTo(-4, 9), expect.closeTo(-2, 9)])
    // t(0.975; 6) = 2.446912 (scipy); as many sites as wells, so that both intervals are one.
    expect(figures!.meanIfIndependent!.high).toBeCloseTo(-3 + 2.446912 * Math.sqrt(2.5 / 42), 5)
    expect(figures!.meanBySites).toEqual(figures!.meanIfIndependent)
    // Too few for a variogram.
    expect([variogram, figures!.meanByKriging, excluded]).toEqual([null, null, 0])
    expect(values.find(({ wellCode }) => wellCode === 'L-3')).toMatchObject({
      depthM: 35,
      year: 1983,
      group: 'reported',
    })
    expect(values.find(({ wellCode }) => wellCode === 'L-0')).toMatchObject({ group: 'slug', evidence: 'slight' })
  })

  it('never pool classes of storage, and leave out apparent storage', async () => {
    expect((await statistics(reader, 'quantity=S')).values.map(({ wellCode }) => wellCode)).toEqual(['E-1'])
    expect((await statistics(reader, 'quantity=Sy')).figures).toBeNull()
  })

  it('keep to the evidence that is asked for', async () => {
    expect((await statistics(reader, 'evidence=slight')).values.map(({ wellCode }) => wellCode)).toEqual(['L-0'])
  })

  it('count no pairs of specific capacity where nobody tested for it', async () => {
    expect((await statistics(reader)).capacity).toEqual({ pairs: [], regression: null })
    expect((await statistics(reader, 'quantity=S')).capacity).toBeNull()
  })

  it.each(['quantity=B', 'evidence=best'])('refuse %s as a bad request', async (query) => {
    await ask(reader, query).expect(400)
  })

  it('are none of a unit that does not exist', async () => {
    await ask(reader, '', 4_000_000).expect(404)
  })
})

describe('what is not published', () => {
  it('changes nothing for a reader, and counts for an analyst', async () => {
    const before = await statistics(reader)
    await books.adopt({ code: 'I-1', at: at(8), units: wholly(unitId), T: 1e-1, visibility: 'internal' })
    expect(await statistics(reader)).toEqual(before)
    expect((await statistics(analyst)).figures!.n).toBe(before.figures!.n + 1)
  })

  it('as an embargoed value changes, a reader’s page does not', async () => {
    const hidden = await books.adopt({ code: 'H-1', at: at(9), units: wholly(unitId), T: 5e-2 })
    expect((await statistics(reader)).figures!.n).toBe(8)
    const steward = await tested.signIn('steward')
    const { body } = await steward.get(`/api/pumping-tests/${hidden.testId}`).expect(200)
    const { rowVersion } = body as { rowVersion: number }
    await steward
      .put(`/api/pumping-tests/${hidden.testId}/visibility`)
      .send({ visibility: 'published', embargoUntil: '2099-01-01T00:00:00.000Z', rowVersion })
      .expect(200)
    await tested.deps.jobs.drain()
    const before = await statistics(reader)
    expect(before.figures!.n).toBe(7)
    expect(before.values.map(({ wellCode }) => wellCode)).not.toContain('H-1')

    const [value] = (await steward.get(`/api/adopted-values?wellId=${hidden.wellId}&quantity=T`).expect(200)).body.items
    await steward.post(`/api/adopted-values/${value.id}/withdrawal`).send({ reason: 'Misread.' }).expect(200)
    expect(await statistics(reader)).toEqual(before)
  })
})
