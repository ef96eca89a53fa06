import { eq, ne, sql } from 'drizzle-orm'
import { beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { visitor, type Viewer } from '#shared/contracts/permissions.ts'
import { mercatorInts } from '#shared/geodesy/index.ts'
import { viewOf, type MapView } from '../../../server/api/map/map-view.ts'
import { groupWells } from '../../../server/api/map/map.repository.ts'
import { wellCells, wells } from '../../../server/db/schema/index.ts'
import { addToCells, countedBits, recountingWells } from '../../../server/db/well-cells.ts'
import { useApp, type SignedIn, type TestApp } from '../../support/app.ts'
import { seededDraws } from '../../support/random-field.ts'
import { createWell, islandMiddle, makeRegion, makeWellInput } from '../../support/domain.ts'

function draws(seed: number) {
  const { uniform } = seededDraws(seed)
  const between = (low: number, high: number) => low + (high - low) * uniform()
  const oneOf = <T>(choices: readonly T[]): T => choices[Math.floor(uniform() * choices.length)]!
  return { uniform, between, oneOf }
}

type Row = typeof wells.$inferInsert
type Box = [west: number, south: number, east: number, north: number]

const viewer = (role: Viewer['role'], id: number): Viewer => ({ id, name: 'Somebody', role, mayReview: false })
const people = { reader: 1, analyst: 2, other: 3, steward: 4 }
const viewers: [who: string, viewer: Viewer][] = [
  ['a visitor', visitor],
  ['a reader', viewer('reader', people.reader)],
  ['an analyst', viewer('analyst', people.analyst)],
  ['another analyst', viewer('analyst', people.other)],
  ['a steward', viewer('steward', people.steward)],
]

/** Crowds near the island and at the date line, and single wells all over the world. */
function randomWells(app: TestApp, count: number): Row[] {
  const { between, oneOf, uniform } = draws(7)
  return Array.from({ length: count }, (_, i) => {
    const [lon, lat] = oneOf<[number, number]>([
      [islandMiddle[0] + between(-0.4, 0.4), islandMiddle[1] + between(-0.3, 0.3)],
      [oneOf([-1, 1]) * between(179.7, 180), between(-1, 1)],
      [between(-180, 180), between(-89, 89)],
    ])
    return {
      ...{ code: `R-${i}`, kind: 'well', position: [lon, lat], ...mercatorInts(lon, lat) },
      ...{ originalX: lon, originalY: lat, originalEpsg: 4326, positionOperation: 'none', positionAccuracyM: 3 },
      visibility: oneOf(['published', 'published', 'internal', 'private']),
      embargoUntil: uniform() < 0.2 ? new Date('2031-01-01T00:00:00Z') : null,
      createdBy: oneOf([null, people.reader, people.analyst, people.other]),
      createdAt: app.deps.now(),
    }
  })
}

/** Who sees what, in plain words: stewards all, analysts what is not private, others what is out; everybody their own. */
function isSeen({ id, role }: Viewer, { visibility, embargoUntil, createdBy }: Row): boolean {
  if (role === 'steward' || (id !== null && createdBy === id)) return true
  return role === 'analyst' ? visibility !== 'private' : visibility === 'published' && embargoUntil === null
}

const holds = ({ bits, columns, rows: [top, bottom] }: MapView, { mx, my }: Row) =>
  columns.some(([from, to]) => mx >> bits >= from && mx >> bits <= to) && my >> bits >= top && my >> bits <= bottom

/** Cell of a view → count and sums, one well after the other. */
function counted(who: Viewer, view: MapView, rows: (Row & { id: number })[]) {
  const cells = new Map<string, [count: number, id: number, mx: number, my: number]>()
  for (const row of rows.filter((each) => isSeen(who, each) && holds(view, each))) {
    const key = `${row.mx >> view.bits} ${row.my >> view.bits}`
    const [count, id, mx, my] = cells.get(key) ?? [0, 0, 0, 0]
    cells.set(key, [count + 1, id + row.id, mx + row.mx, my + row.my])
  }
  return cells
}

async function asked(app: TestApp, who: Viewer, view: MapView) {
  const groups = await groupWells(app.deps.connection.db, who, view)
  const keyOf = (cell: number) => `${Math.floor(cell / 2 ** 24)} ${cell % 2 ** 24}`
  return new Map(
    groups.map(({ cell, count, sumId, sumMx, sumMy }) => [keyOf(cell), [count, sumId, sumMx, sumMy] as const]),
  )
}

function randomBoxes(count: number): { bbox: Box; zoom: number }[] {
  const { between, oneOf } = draws(11)
  return Array.from({ length: count }, (_, i) => {
    const zoom = i % 20
    const [lon, lat] = oneOf<[number, number]>([islandMiddle, [180, 0], [between(-180, 180), between(-80, 80)]])
    const width = Math.min(350, between(0.2, 6) * (360 / 2 ** zoom))
    const [west, east] = [lon - width * between(0, 1), lon + width * between(0, 1)]
    const wrapped = (each: number) => ((each + 540) % 360) - 180
    const [south, north] = [Math.max(-90, lat - width / 3), Math.min(90, lat + width / 3)]
    return { zoom, bbox: [wrapped(west), south, wrapped(east), north] }
  })
}

describe('groups of wells', () => {
  const app = useApp()
  let rows: (Row & { id: number })[]

  beforeAll(async () => {
    const { db } = app.deps.connection
    await db.insert(wells).values(randomWells(app, 1_500))
    rows = await db.select().from(wells)
    await addToCells(db, sql`true`)
  })

  it.each(viewers)('are those that counting one well after the other gives, as %s sees them', async (_, who) => {
    const world = [0, 3, 9, 22].map((zoom) => ({ zoom, bbox: [-180, -90, 180, 90] as Box }))
    let shown = 0
    for (const query of [...randomBoxes(80), ...world]) {
      const view = viewOf(query)
      const groups = await asked(app, who, view)
      expect(groups, JSON.stringify(query)).toEqual(counted(who, view, rows))
      shown += groups.size
    }
    expect(shown).toBeGreaterThan(1_000)
  })

  it('are the same whichever box shows them, so that no cluster changes while the map is moved', async () => {
    const zoom = 10
    const [lon, lat] = islandMiddle
    const whole = await asked(app, visitor, viewOf({ zoom, bbox: [lon - 1, lat - 1, lon + 1, lat + 1] }))
    const { between } = draws(13)
    for (let i = 0; i < 10; i += 1) {
      const [east, north] = [lon + between(-0.1, 0.3), lat + between(-0.1, 0.2)]
      const part = await asked(app, visitor, viewOf({ zoom, bbox: [lon - 0.2, lat - 0.2, east, north] }))
      expect(part.size).toBeGreaterThan(1)
      for (const [cell, group] of part) expect(group).toEqual(whole.get(cell))
    }
  })
})

describe('counts of cells', () => {
  let time = new Date('2030-01-01T00:00:00Z')
  const app = useApp({ now: () => time })
  let steward: SignedIn
  let analyst: SignedIn

  /** What is kept, which must be what counting one well after the other gives. */
  async function keptCounts() {
    const { db } = app.deps.connection
    const anew = new Map<string, number[]>()
    for (const { id, mx, my, visibility, embargoUntil, createdBy } of await db.select().from(wells))
      for (const bits of countedBits) {
        const key = [bits, mx >> bits, my >> bits, visibility, embargoUntil !== null, createdBy ?? 0].join(' ')
        const before = anew.get(key) ?? [0, 0, 0, 0]
        anew.set(
          key,
          [1, id, mx, my].map((value, i) => before[i]! + value),
        )
      }
    const kept = await db.select().from(wellCells).where(ne(wellCells.wellCount, 0))
    const counts = new Map(
      kept.map(({ wellCount, sumId, sumMx, sumMy, ...key }) => [
        Object.values(key).join(' '),
        [wellCount, sumId, sumMx, sumMy],
      ]),
    )
    expect(counts).toEqual(anew)
    return counts
  }

  beforeAll(() => makeRegion(app))
  // Sessions end while the clock goes on.
  beforeEach(async () => {
    steward = await app.signIn('steward')
    analyst = await app.signIn('analyst')
  })

  it('follow whatever is done to wells', async () => {
    const { between, oneOf } = draws(17)
    const place = () => ({ x: islandMiddle[0] + between(-0.3, 0.3), y: islandMiddle[1] + between(-0.3, 0.3) })
    const ids: number[] = []
    for (let i = 0; i < 12; i += 1) {
      const visibility = oneOf(['private', 'internal', 'published'] as const)
      const person = visibility === 'published' ? steward : oneOf([steward, analyst])
      ids.push(await createWell(person, { ...place(), visibility }))
    }
    await keptCounts()
    for (let i = 0; i < 30; i += 1) {
      const id = oneOf(ids)
      const { rowVersion, code } = (await steward.get(`/api/wells/${id}`).expect(200)).body
      const stale = oneOf([0, 0, 1])
      const exposure = {
        visibility: oneOf(['private', 'internal', 'published']),
        embargoUntil: oneOf([null, '2030-06-01T00:00:00.000Z', '2031-06-01T00:00:00.000Z']),
      }
      const answer = oneOf([true, false])
        ? await steward
            .put(`/api/wells/${id}`)
            .send({ ...makeWellInput({ ...place(), code }), rowVersion: rowVersion + stale })
        : await steward.put(`/api/wells/${id}/visibility`).send({ ...exposure, rowVersion: rowVersion + stale })
      expect(answer.status).toBe(stale ? 409 : 200)
    }
    const { rowVersion } = (await steward.get(`/api/wells/${ids[0]}`).expect(200)).body
    await steward
      .put(`/api/wells/${ids[0]}/visibility`)
      .send({ rowVersion, visibility: 'published', embargoUntil: '2030-06-01T00:00:00Z' })
      .expect(200)
    const before = await keptCounts()
    expect([...before.keys()].some((key) => key.includes('true'))).toBe(true)
    time = new Date('2030-07-01T00:00:00Z')
    await app.deps.jobs.enqueue(app.deps.connection.db, 'lift-embargoes')
    await app.deps.jobs.drain()
    const after = await keptCounts()
    expect(after).not.toEqual(before)
    const { db } = app.deps.connection
    expect(await db.$count(wellCells, eq(wellCells.wellCount, 0))).toBeGreaterThan(0)
    await app.deps.jobs.enqueue(db, 'clean-up')
    await app.deps.jobs.drain()
    expect(await db.$count(wellCells)).toBe(after.size)
    expect(await keptCounts()).toEqual(after)
  })

  it('are as before when a change is not carried through', async () => {
    const before = await keptCounts()
    const { db } = app.deps.connection
    const ids = (await db.select({ id: wells.id }).from(wells)).map(({ id }) => id)
    const attempt = db.transaction((tx) =>
      recountingWells(tx, ids, async () => {
        await tx.update(wells).set({ mx: 5, my: 5 })
        throw new Error('given up')
      }),
    )
    await expect(attempt).rejects.toThrow('given up')
    expect(await keptCounts()).toEqual(before)
  })

  it('lose nothing when people write at the same time', async () => {
    const writes = Array.from({ length: 12 }, (_, i) =>
      createWell(oneOfTwo(i), { x: islandMiddle[0] + i / 50, y: islandMiddle[1], visibility: 'internal' }),
    )
    const ids = await Promise.all(writes)
    const moves = ids.map((id, i) =>
      steward
        .put(`/api/wells/${id}/visibility`)
        .send({ rowVersion: 1, visibility: i % 2 ? 'published' : 'private', embargoUntil: null })
        .expect(200),
    )
    await Promise.all(moves)
    await keptCounts()
  })

  const oneOfTwo = (i: number) => (i % 2 ? steward : analyst)
})
