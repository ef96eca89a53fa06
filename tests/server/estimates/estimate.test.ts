import { eq } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Estimate } from '#shared/contracts/estimates.ts'
import { createServices } from '../../../server/api/services.ts'
import type { Workers } from '../../../server/jobs/workers.ts'
import { adoptedValues, variogramModels } from '../../../server/db/schema/index.ts'
import type { Position } from '../../../server/db/spatial.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { islandMiddle, makeRegion, makeUnit, squareAround } from '../../support/domain.ts'
import { keepBooks, wholly, type Bookkeeping, type Reported } from '../../support/values.ts'

const tested = useApp()
let books: Bookkeeping
let reader: SignedIn
let analyst: SignedIn

beforeAll(async () => {
  await makeRegion(tested)
  books = await keepBooks(tested)
  reader = await tested.signIn('reader')
  analyst = await tested.signIn('analyst')
})

const [lon, lat] = islandMiddle
/** A place east and north of the middle of the island, in kilometres; good enough to set wells apart. */
const at = (eastKm: number, northKm: number): Position => [lon + eastKm / 87, lat + northKm / 111]

const ask = (person: SignedIn, query: Record<string, string | number>) =>
  person.get(
    `/api/estimates?${new URLSearchParams(Object.entries({ lat, lon, ...query }).map(([k, v]) => [k, String(v)]))}`,
  )
const estimate = async (person: SignedIn, query: Record<string, string | number>) =>
  (await ask(person, query).expect(200)).body as Estimate
const codes = ({ notes }: Estimate) => notes.map(({ code }) => code)

/** A unit of its own with one value at each place. */
async function unitWith(places: Position[], T: (i: number) => number = () => 1e-3, more = {}) {
  const unitId = await makeUnit(tested, { outline: squareAround(islandMiddle, 0.4), depthOrder: 50 })
  const reported: Reported[] = []
  for (const [i, place] of places.entries())
    reported.push(await books.adopt({ units: wholly(unitId), at: place, T: T(i), ...more }))
  return { unitId, reported }
}

/** Six by six, 2 km apart: 36 independent sites. */
const grid = Array.from({ length: 36 }, (_, i) => at(2 * (i % 6) - 5, 2 * Math.floor(i / 6) - 5))
/** Smooth over the grid, with a little of what tests scatter by: rises to the east by a factor of ten. */
const rising = (i: number) => 10 ** (-3 + (i % 6) / 5 + (((i * 7919) % 13) - 6) / 60)

describe('where there is nothing to estimate from', () => {
  it('no unit is named, with the place in the region’s system', async () => {
    const answer = await estimate(reader, { lat: -38.25, lon: -20.2 })
    expect(answer).toMatchObject({ unit: null, units: [], truth: null, rule: 'none', support: 'none', epsg: 32727 })
    // Zone 27 S has its middle at 21° W and 500 000 m; a degree of longitude is some 87 km here.
    expect(answer.x).toBeGreaterThan(565_000)
    expect(answer.x).toBeLessThan(575_000)
  })

  it('a unit that does not exist is a bad request', async () => {
    expect((await ask(reader, { unitId: 4_000_000 }).expect(400)).body).toMatchObject({ code: 'estimate/unknown-unit' })
  })

  const badQueries: Record<string, string | number>[] = [
    { lat: 91 },
    { lon: 'east' },
    { quantity: 'B' },
    { depthM: -1 },
    { unitId: 'one' },
  ]
  it.each(badQueries)('%j is a bad request', async (query) => {
    await ask(reader, query).expect(400)
  })

  it('an aquitard is named among the units and never chosen', async () => {
    const place: Position = [-20.99, -38.21]
    const clay = await makeUnit(tested, {
      name: 'Pellow Clay',
      kind: 'aquitard',
      depthOrder: 1,
      outline: squareAround(place, 0.004),
    })
    const below = await makeUnit(tested, { name: 'Deep Sand', depthOrder: 2, outline: squareAround(place, 0.004) })
    const answer = await estimate(reader, { lon: place[0], lat: place[1] })
    expect(answer.units.map(({ id }) => id)).toEqual([clay, below])
    expect(answer.unit).toMatchObject({ id: below, name: 'Deep Sand' })
  })
})

describe('fewer than four sites', () => {
  it('give no number, the reason, and the nearest values', async () => {
    const { unitId } = await unitWith([at(1, 0), at(3, 0), at(0, -5)])
    const answer = await estimate(reader, { unitId })
    expect(answer).toMatchObject({
      truth: null,
      newTest: null,
      rule: 'none',
      support: 'none',
      valueCount: 3,
      siteCount: 3,
    })
    expect(answer.notes[0]).toMatchObject({ code: 'too-few-values', severity: 'bad', params: { n: 3, sites: 3 } })
    expect(answer.contributions.map(({ weight }) => weight)).toEqual([0, 0, 0])
    expect(answer.contributions[0]!.distanceM).toBeGreaterThan(900)
    expect(answer.contributions[0]!.distanceM).toBeLessThan(1_100)
    expect(answer.contributions[0]!.bearingDeg).toBeCloseTo(90, -1)
  })

  it('are fewer sites than values where wells stand close together', async () => {
    const { unitId } = await unitWith([at(0, 0), at(0.1, 0), at(0.2, 0), at(0, 0.1), at(5, 0)])
    expect(await estimate(reader, { unitId })).toMatchObject({ truth: null, valueCount: 5, siteCount: 2 })
  })

  it('are no trouble where all wells stand at one place', async () => {
    const { unitId } = await unitWith([at(2, 2), at(2, 2), at(2, 2)])
    expect(await estimate(reader, { unitId })).toMatchObject({ truth: null, valueCount: 3, siteCount: 1 })
  })
})

describe('four to twenty-nine sites', () => {
  it('give the geometric mean of the unit, the same at every place of it', async () => {
    const { unitId } = await unitWith(grid.slice(0, 8), (i) => (i % 2 === 0 ? 1e-3 : 1e-2))
    const here = await estimate(reader, { unitId })
    expect(here).toMatchObject({ rule: 'mean', support: 'weakly', variogram: null })
    expect(codes(here)).toContain('unit-mean-only')
    // Half the values at -3, half at -2, all with the same error.
    expect(here.truth!.median).toBeCloseTo(-2.5, 6)
    const there = await estimate(reader, { unitId, lat: lat + 0.03, lon: lon - 0.03 })
    expect(there.truth!.median).toBeCloseTo(here.truth!.median, 9)
  })
})

describe('thirty sites and more', () => {
  let unitId: number
  beforeAll(async () => {
    unitId = (await unitWith(grid, rising)).unitId
  })

  it('are kriged with a fitted variogram, and the median follows the values', async () => {
    const places = await Promise.all([-4, 0, 4].map((km) => estimate(reader, { unitId, lon: at(km, 0)[0] })))
    for (const { rule, variogram, siteCount, valueCount, crossValidation } of places) {
      expect({ rule, siteCount, valueCount }).toEqual({ rule: 'isotropic', siteCount: 36, valueCount: 36 })
      expect(variogram!.rangeM).toBeGreaterThan(0)
      expect(crossValidation!.n).toBe(36)
    }
    const [west, middle, east] = places.map(({ truth }) => truth!.median)
    expect(west!).toBeLessThan(middle!)
    expect(middle!).toBeLessThan(east!)
    expect(middle!).toBeGreaterThan(-3)
    expect(middle!).toBeLessThan(-2)
  })

  it('give intervals that hold each other, wider for a new test, and weights that add up to one', async () => {
    const { truth, newTest, contributions, secondOpinion } = await estimate(reader, { unitId })
    for (const d of [truth!, newTest!])
      expect([d.low95, d.low80, d.median, d.high80, d.high95]).toEqual(
        [d.low95, d.low80, d.median, d.high80, d.high95].sort((a, b) => a - b),
      )
    expect(newTest!.high95 - newTest!.low95).toBeGreaterThan(truth!.high95 - truth!.low95)
    expect(contributions.reduce((sum, { weight }) => sum + weight, 0)).toBeCloseTo(1, 6)
    expect(secondOpinion!.ratio).toBeGreaterThanOrEqual(1)
    expect(Math.log10(secondOpinion!.value)).toBeCloseTo(truth!.median, 0)
  })
})

describe('outside the unit and between depths', () => {
  it('no number is given outside the outline, and the distance to it is told', async () => {
    const { unitId } = await unitWith(grid.slice(0, 6))
    const answer = await estimate(reader, { unitId, lat: lat + 0.5 })
    expect(answer).toMatchObject({ truth: null, unit: { id: unitId } })
    const note = answer.notes.find(({ code }) => code === 'outside-unit')!
    // 0.1° of latitude beyond the outline: some 11.1 km.
    expect(Number(note.params.distance_m)).toBeGreaterThan(11_000)
    expect(Number(note.params.distance_m)).toBeLessThan(11_200)
  })

  it('a depth outside the tested screens is a note, one inside is not', async () => {
    const { unitId } = await unitWith(grid.slice(0, 6), () => 1e-3, { intervalTopM: 30, intervalBottomM: 55 })
    expect(codes(await estimate(reader, { unitId, depthM: 200 }))).toContain('depth-outside-screens')
    expect(codes(await estimate(reader, { unitId, depthM: 40 }))).not.toContain('depth-outside-screens')
    expect(codes(await estimate(reader, { unitId }))).not.toContain('depth-outside-screens')
  })
})

describe('storage', () => {
  it('is asked for by its class: elastic and specific yield are never pooled', async () => {
    const unitId = await makeUnit(tested, { outline: squareAround(islandMiddle, 0.4), depthOrder: 50 })
    for (const [i, place] of grid.slice(0, 8).entries()) {
      const of =
        i % 2 === 0
          ? { S: 1e-4, storageClass: 'elastic' as const }
          : { S: 0.15, storageClass: 'specific-yield' as const }
      await books.adopt({ units: wholly(unitId), at: place, ...of })
    }
    const elastic = await estimate(reader, { unitId, quantity: 'S' })
    const drained = await estimate(reader, { unitId, quantity: 'Sy' })
    expect(elastic.truth!.median).toBeCloseTo(-4, 6)
    expect(drained.truth!.median).toBeCloseTo(Math.log10(0.15), 6)
    expect([elastic, drained].map(({ valueCount, excludedCount }) => [valueCount, excludedCount])).toEqual([
      [4, 4],
      [4, 4],
    ])
  })
})

describe('an embargoed well', () => {
  /** Hides the test, then its well: a test is never more visible than its well. */
  async function embargo({ wellId, testId }: Reported) {
    const steward = await tested.signIn('steward')
    for (const subject of [`pumping-tests/${testId}`, `wells/${wellId}`]) {
      const { rowVersion } = (await steward.get(`/api/${subject}`).expect(200)).body as { rowVersion: number }
      const body = { visibility: 'published', embargoUntil: '2999-01-01T00:00:00.000Z', rowVersion }
      await steward.put(`/api/${subject}/visibility`).send(body).expect(200)
    }
  }

  let unitId: number
  let odd: Reported
  /** Beside the hidden well, whose value is far from all others. */
  const beside = { lon: grid[14]![0] + 0.0005, lat: grid[14]![1] }

  beforeAll(async () => {
    const made = await unitWith(grid, (i) => (i === 14 ? 0.5 : rising(i)))
    unitId = made.unitId
    odd = made.reported[14]!
    await embargo(odd)
    await tested.deps.jobs.drain()
  })

  it('does not carry the estimate that a reader gets, and does that of an analyst', async () => {
    const open = await estimate(reader, { unitId, ...beside })
    const full = await estimate(analyst, { unitId, ...beside })
    expect(open.contributions.map(({ wellId }) => wellId)).not.toContain(odd.wellId)
    expect(open).toMatchObject({ valueCount: 35, modelOutdated: false })
    expect(full.contributions[0]).toMatchObject({ wellId: odd.wellId })
    expect(full.truth!.median).toBeGreaterThan(open.truth!.median + 0.2)
  })

  it('leaves no trace in a reader’s answer when its value changes, before and after models are fitted anew', async () => {
    const before = await estimate(reader, { unitId, ...beside })
    const full = await estimate(analyst, { unitId, ...beside })
    const { db } = tested.deps.connection
    await db.transaction(async (tx) => {
      await tx.update(adoptedValues).set({ log10Value: -6 }).where(eq(adoptedValues.pumpingTestId, odd.testId))
      await books.services.adoptedValues.changed(tx, [unitId])
    })
    expect(await estimate(reader, { unitId, ...beside })).toEqual(before)
    expect(await estimate(analyst, { unitId, ...beside })).not.toEqual(full)
    await tested.deps.jobs.drain()
    expect(await estimate(reader, { unitId, ...beside })).toEqual(before)
  })
})

describe('the first estimates of a unit', () => {
  /** Services over the same database as another process would have them, and how often these had a model fitted. */
  function anotherProcess() {
    const { workers } = tested.deps
    let fits = 0
    const counting: Workers = {
      ...workers,
      run: (name, input, signal) => {
        if (name === 'fit-model') fits += 1
        return workers.run(name, input, signal)
      },
    }
    const { estimates } = createServices({ ...tested.deps, workers: counting })
    return { estimates, fits: () => fits }
  }
  const query = (unitId: number) => ({ lat, lon, unitId, quantity: 'T' as const })

  it('share one fit when they come at the same moment', async () => {
    const { unitId } = await unitWith(grid.slice(0, 8))
    const { estimates, fits } = anotherProcess()
    const answers = await Promise.all(
      Array.from({ length: 12 }, () => estimates.estimate(books.steward, query(unitId))),
    )
    expect(fits()).toBe(1)
    for (const answer of answers) expect(answer).toEqual(answers[0])
  })

  it('use the fit that another process has stored', async () => {
    const { unitId } = await unitWith(grid.slice(0, 8))
    const first = anotherProcess()
    const second = anotherProcess()
    const answer = await first.estimates.estimate(books.steward, query(unitId))
    expect(await second.estimates.estimate(books.steward, query(unitId))).toEqual(answer)
    expect([first.fits(), second.fits()]).toEqual([1, 0])
  })
})

describe('values that change', () => {
  it('make the newest model serve with a note until the job has fitted a new one', async () => {
    const { unitId } = await unitWith(grid.slice(0, 8))
    await tested.deps.jobs.drain()
    const before = await estimate(reader, { unitId })
    expect(before.modelOutdated).toBe(false)

    await books.adopt({ units: wholly(unitId), at: grid[20]!, T: 1e-2 })
    const between = await estimate(reader, { unitId })
    expect(between).toMatchObject({ modelOutdated: true, valueCount: 9, dataVersion: before.dataVersion + 1 })
    expect(codes(between)).toContain('model-outdated')

    await tested.deps.jobs.drain()
    const after = await estimate(reader, { unitId })
    expect(after).toMatchObject({ modelOutdated: false, valueCount: 9, dataVersion: between.dataVersion })
    expect(codes(after)).not.toContain('model-outdated')
    expect(after.crossValidation!.n).toBe(9)
  })

  it('are not fitted anew where the scope cannot see the change', async () => {
    const { unitId } = await unitWith(grid.slice(0, 5))
    await tested.deps.jobs.drain()
    const { db } = tested.deps.connection
    const models = async (scope: 'published' | 'internal') =>
      (await db.select().from(variogramModels).where(eq(variogramModels.unitId, unitId))).filter(
        (row) => row.scope === scope && row.quantity === 'T',
      ).length
    const before = [await models('published'), await models('internal')]
    await books.adopt({ units: wholly(unitId), at: grid[30]!, visibility: 'internal' })
    await tested.deps.jobs.drain()
    expect([await models('published'), await models('internal')]).toEqual([before[0], before[1]! + 1])
  })

  it('leave the estimate at once when they are withdrawn', async () => {
    const { unitId, reported } = await unitWith(grid.slice(0, 5))
    expect(await estimate(reader, { unitId })).toMatchObject({ valueCount: 5 })
    const steward = await tested.signIn('steward')
    const [value] = (
      (await steward.get(`/api/adopted-values?wellId=${reported[0]!.wellId}`).expect(200)).body as {
        items: { id: number }[]
      }
    ).items
    await steward.post(`/api/adopted-values/${value!.id}/withdrawal`).send({ reason: 'Wrong well.' }).expect(200)
    expect(await estimate(reader, { unitId })).toMatchObject({ valueCount: 4 })
  })
})
