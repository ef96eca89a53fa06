import { beforeAll, describe, expect, it } from 'vitest'
import type { AdoptedValueList, AdoptedValueSort } from '#shared/contracts/adopted-values.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit } from '../../support/domain.ts'
import { keepBooks, wholly, type Bookkeeping } from '../../support/values.ts'

const tested = useApp()
let books: Bookkeeping
let reader: SignedIn
let analyst: SignedIn
let limestone: number
let sandstone: number

beforeAll(async () => {
  await makeRegion(tested)
  limestone = await makeUnit(tested, { name: 'Fennick Limestone', depthOrder: 1 })
  sandstone = await makeUnit(tested, { name: 'Brannet Sandstone', depthOrder: 2 })
  books = await keepBooks(tested)
  reader = await tested.signIn('reader')
  analyst = await tested.signIn('analyst')
  const { adopt } = books
  // T 1e-4, 1e-3, 1e-2 and 1e-1: the arithmetic of their logarithms can be done by hand.
  await adopt({
    code: 'A-1',
    units: wholly(limestone),
    T: 1e-4,
    startLocal: '1970',
    name: 'Orchard',
    S: 1e-4,
    storageClass: 'elastic',
  })
  await adopt({
    code: 'A-2',
    units: wholly(limestone),
    T: 1e-3,
    startLocal: '1985-05-01',
    K: 5e-5,
    source: 'Tin box 4',
  })
  await adopt({
    code: 'A-3',
    units: wholly(sandstone),
    T: 1e-2,
    startLocal: '1999-05-01',
    origin: 'slug-test',
    observationWell: false,
  })
  await adopt({
    code: 'A-4',
    units: wholly(sandstone),
    T: 1e-1,
    startLocal: '2011-05-01',
    origin: 'legacy-number',
    S: 0.2,
    storageClass: 'specific-yield',
  })
  await adopt({ code: 'B-5', units: wholly(limestone), T: 5e-3, visibility: 'internal' })
})

async function table(query: string, person = reader): Promise<AdoptedValueList> {
  return (await person.get(`/api/adopted-values?${query}`).expect(200)).body as AdoptedValueList
}
const codes = ({ items }: AdoptedValueList) => items.map(({ wellCode }) => wellCode)
const kinds = ({ items }: AdoptedValueList) => items.map(({ wellCode, quantity }) => `${wellCode} ${quantity}`)

describe('what the table holds', () => {
  it('gives one row for each quantity that an accepted analysis stands for, in SI', async () => {
    const { items, total, next } = await table('limit=100')
    expect([total, next]).toEqual([7, null])
    expect(items.find(({ wellCode, quantity }) => wellCode === 'A-2' && quantity === 'K')).toMatchObject({
      value: expect.closeTo(5e-5, 12),
      unitId: limestone,
      unitName: 'Fennick Limestone',
      method: 'reported',
      thicknessBasis: 'aquifer',
      testYear: 1985,
      validTo: null,
    })
  })

  it('gives the 95 % interval that the error of the logarithm means', async () => {
    const [row] = (await table('quantity=T&text=A-1')).items
    // Common practice: 1.96 standard deviations to both sides.
    expect(Math.log10(row!.high / row!.value)).toBeCloseTo(1.96 * row!.log10Error, 4)
    expect(Math.log10(row!.value / row!.low)).toBeCloseTo(1.96 * row!.log10Error, 4)
  })

  it('shows internal values to analysts and never to readers, in rows and in statistics', async () => {
    expect(codes(await table('limit=100'))).not.toContain('B-5')
    expect(codes(await table('limit=100', analyst))).toContain('B-5')
    const of = (list: AdoptedValueList) => list.statistics.find(({ quantity }) => quantity === 'T')!.n
    expect([of(await table('')), of(await table('', analyst))]).toEqual([4, 5])
  })

  it('keeps the year of a test in its own zone, also where the year alone is known', async () => {
    const east = await makeUnit(tested, { name: 'Far shore' })
    await books.adopt({ code: 'Z-9', units: wholly(east), startLocal: '1991', zone: 'Pacific/Auckland' })
    expect((await table('text=Z-9')).items[0]).toMatchObject({ testYear: 1991 })
    expect((await table(`unitId=${east}&yearFrom=1991`)).total).toBe(1)
  })
})

describe('pages', () => {
  it('follow each other without gap or repeat, and say where the next one begins', async () => {
    const first = await table('limit=3&offset=0&yearTo=2020&text=A-')
    const second = await table('limit=3&offset=3&text=A-')
    const third = await table('limit=3&offset=6&text=A-')
    expect([first.next, second.next, third.next]).toEqual([3, 6, null])
    expect([first, second, third].map(({ total }) => total)).toEqual([7, 7, 7])
    const ids = [first, second, third].flatMap(({ items }) => items.map(({ id }) => id))
    expect(new Set(ids).size).toBe(7)
  })

  it('carry the statistics of all rows, not of the page', async () => {
    const page = await table('limit=1&quantity=T&text=A-')
    expect(page.statistics[0]).toMatchObject({ n: 4 })
  })

  it.each(['limit=0', 'limit=501', 'offset=-1', 'sort=colour', 'quantity=Q', 'yearFrom=last', 'bbox=1,2,3'])(
    'refuse %s as a bad request',
    async (query) => {
      await reader.get(`/api/adopted-values?${query}`).expect(400)
    },
  )
})

describe('order', () => {
  type Key = 'value' | 'year' | 'well'
  const keys: Record<Key, (item: AdoptedValueList['items'][number]) => string | number> = {
    value: ({ value }) => value,
    year: ({ testYear }) => testYear,
    well: ({ wellCode }) => wellCode,
  }

  it.each(Object.keys(keys) as Key[])('rises and falls by %s', async (key) => {
    const of = async (sort: AdoptedValueSort) => (await table(`sort=${sort}&quantity=T&text=A-`)).items.map(keys[key])
    const rising = await of(key)
    expect(rising).toEqual([...rising].sort((a, b) => (a < b ? -1 : a > b ? 1 : 0)))
    expect(await of(`-${key}`)).toEqual([...rising].reverse())
  })

  it('goes by depth for units and from firm to slight for evidence', async () => {
    const units = (await table('sort=unit&text=A-')).items.map(({ unitName }) => unitName)
    expect(units).toEqual([...Array(4).fill('Fennick Limestone'), ...Array(3).fill('Brannet Sandstone')])
    const evidences = (await table('sort=-evidence&quantity=T&text=A-')).items.map(({ evidence }) => evidence)
    expect(evidences).toEqual(['slight', 'slight', 'fair', 'fair'])
  })

  it('takes every other key that the contract names', async () => {
    for (const sort of ['method', '-method', 'quantity', '-quantity', '-unit', 'evidence'])
      expect((await table(`sort=${sort}&text=A-`)).items).toHaveLength(7)
  })
})

describe('filters', () => {
  const cases: [string, () => string, string[]][] = [
    ['unit', () => `unitId=${sandstone}`, ['A-3 T', 'A-4 T', 'A-4 S']],
    ['quantity', () => 'quantity=K', ['A-2 K']],
    ['class of storage', () => 'storageClass=specific-yield', ['A-4 S']],
    ['evidence', () => 'evidence=fair&quantity=T', ['A-1 T', 'A-2 T']],
    ['method', () => 'method=reported&quantity=S', ['A-1 S', 'A-4 S']],
    ['first year', () => 'yearFrom=1999&quantity=T&yearTo=2011', ['A-3 T', 'A-4 T']],
    ['last year', () => 'yearTo=1985&quantity=T', ['A-1 T', 'A-2 T']],
    ['code of the well', () => 'text=a-3', ['A-3 T']],
    ['name of the well', () => 'text=orch', ['A-1 T', 'A-1 S']],
    ['source', () => 'text=tin box', ['A-2 T', 'A-2 K']],
    ['several at once', () => `unitId=${limestone}&quantity=T&yearTo=1980`, ['A-1 T']],
    ['method that nobody used', () => 'method=theis', []],
  ]

  it.each(cases)('by %s leave what fits', async (_what, query, expected) => {
    const list = await table(`${query()}&limit=100`)
    expect(
      kinds(list)
        .filter((kind) => !kind.startsWith('Z-'))
        .sort(),
    ).toEqual([...expected].sort())
  })

  it('read % and _ of a text as themselves', async () => {
    expect((await table('text=%25')).total).toBe(0)
    expect((await table('text=A_1')).total).toBe(0)
  })

  it('by a box leave the wells inside', async () => {
    expect((await table('bbox=-21.3,-38.5,-21.1,-38.3')).total).toBeGreaterThanOrEqual(7)
    expect((await table('bbox=-20.3,-38.5,-20.1,-38.3')).total).toBe(0)
  })
})

describe('statistics against a calculation by hand', () => {
  it('of log10 T = -4, -3, -2, -1: mean -2.5, deviation 1.291, P10 -3.7, P50 -2.5, P90 -1.3', async () => {
    const { statistics } = await table('quantity=T&text=A-')
    expect(statistics).toHaveLength(1)
    const { n, geometricMean, log10Sd, p10, p50, p90 } = statistics[0]!
    expect(n).toBe(4)
    expect(Math.log10(geometricMean)).toBeCloseTo(-2.5, 10)
    // Squares of ±1.5 and ±0.5 add up to 5; divided by n − 1 = 3.
    expect(log10Sd).toBeCloseTo(Math.sqrt(5 / 3), 10)
    // Positions 0.3, 1.5 and 2.7 between the ordered values.
    expect([p10, p50, p90].map(Math.log10).map((log) => Math.round(log * 1e9) / 1e9)).toEqual([-3.7, -2.5, -1.3])
  })

  it('never pool quantities or classes of storage, and stand in a fixed order', async () => {
    const { statistics } = await table('text=A-')
    expect(statistics.map(({ quantity, storageClass, n }) => [quantity, storageClass, n])).toEqual([
      ['T', null, 4],
      ['S', 'elastic', 1],
      ['S', 'specific-yield', 1],
      ['K', null, 1],
    ])
    expect(statistics[1]!.log10Sd).toBeNull()
  })

  it('are none where nothing fits', async () => {
    expect(await table('text=nothing-like-it')).toEqual({ items: [], total: 0, next: null, statistics: [] })
  })
})
