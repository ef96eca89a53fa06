import { and, eq } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import type { AdoptedValue } from '#shared/contracts/adopted-values.ts'
import { auditTrail, dataVersions, jobs } from '../../../server/db/schema/index.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit } from '../../support/domain.ts'
import { accept, keepBooks, wholly, type Bookkeeping, type Reported } from '../../support/values.ts'

const tested = useApp()
let books: Bookkeeping
let reader: SignedIn
let steward: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  books = await keepBooks(tested)
  reader = await tested.signIn('reader')
  steward = await tested.signIn('steward')
})

const items = async (person: SignedIn, path: string) =>
  ((await person.get(path).expect(200)).body as { items: AdoptedValue[] }).items
const history = (testId: number, person = reader) => items(person, `/api/pumping-tests/${testId}/adopted-values`)
const current = (wellId: number) => items(reader, `/api/adopted-values?wellId=${wellId}`)

/** A second reported value of the same test, accepted after the first. */
async function replace({ testId }: Reported, T: number) {
  const { id } = await books.services.analyses.report(books.steward, testId, {
    T,
    S: null,
    K: null,
    storageClass: null,
    origin: 'legacy-reviewed',
    observationWell: true,
    aquifer: 'confined',
    source: 'Read again from the original',
  })
  await accept(books.services, books.reviewer, id)
  return id
}

const versionOf = async (unit: number) =>
  (await tested.deps.connection.db.select().from(dataVersions).where(eq(dataVersions.unitId, unit)))[0]!.version

describe('a value that is replaced', () => {
  it('leaves the table and stays in the history of its test, ended when its successor began', async () => {
    const first = await books.adopt({ units: wholly(unitId), T: 1e-3, S: 1e-4, storageClass: 'elastic' })
    const second = await replace(first, 4e-3)

    expect((await current(first.wellId)).map(({ quantity, value }) => [quantity, value])).toEqual([
      ['T', expect.closeTo(4e-3, 12)],
    ])
    const [newest, ...before] = await history(first.testId)
    expect(newest).toMatchObject({ analysisId: second, validTo: null })
    expect(before.map(({ quantity }) => quantity).sort()).toEqual(['S', 'T'])
    for (const old of before) {
      expect(old.validTo).toBe(newest!.validFrom)
      expect(old.analysisId).toBe(first.analysisId)
    }
  })

  it('can still be read by its own address', async () => {
    const first = await books.adopt({ units: wholly(unitId), T: 1e-3 })
    const [value] = await current(first.wellId)
    await replace(first, 2e-3)
    const answer = await reader.get(`/api/adopted-values/${value!.id}`).expect(200)
    expect(answer.body).toMatchObject({ id: value!.id, validTo: expect.any(String), value: expect.closeTo(1e-3, 12) })
  })
})

describe('a value of several units', () => {
  it('gives each unit its share of T with a wider error and slight evidence, marked composite', async () => {
    const other = await makeUnit(tested, { name: 'Brannet Sandstone', depthOrder: 2 })
    const { wellId } = await books.adopt({
      units: [
        { unitId, share: 0.25, basis: 'flow-log' },
        { unitId: other, share: 0.75, basis: 'flow-log' },
      ],
      T: 4e-3,
      K: 1e-4,
    })
    const rows = await current(wellId)
    expect(rows.map(({ unitId: of, value }) => [of, value])).toEqual([
      [unitId, expect.closeTo(1e-3, 12)],
      [other, expect.closeTo(3e-3, 12)],
    ])
    for (const row of rows)
      expect(row).toMatchObject({ composite: true, evidence: 'slight', quantity: 'T', log10Error: 0.35 })
  })
})

describe('a storage value that cannot be believed', () => {
  it.each([
    { origin: 'slug-test', storageClass: 'elastic' },
    { origin: 'specific-capacity', storageClass: 'elastic' },
    { origin: 'legacy-reviewed', storageClass: 'apparent' },
    { origin: 'legacy-reviewed', storageClass: 'unclassified' },
  ] as const)('is kept and shown, and marked as not used: $storageClass, $origin', async (of) => {
    const { wellId } = await books.adopt({ units: wholly(unitId), S: 1e-4, observationWell: false, ...of })
    const S = (await current(wellId)).find(({ quantity }) => quantity === 'S')
    expect(S).toMatchObject({ usable: false })
  })
})

describe('withdrawal', () => {
  it('by a steward ends the value, names reason and person in the audit, and asks for new models', async () => {
    const { wellId, testId } = await books.adopt({ units: wholly(unitId) })
    const [value] = await current(wellId)
    const before = await versionOf(unitId)
    await tested.deps.jobs.drain()
    await steward.post(`/api/adopted-values/${value!.id}/withdrawal`).send({ reason: 'The pump was off.' }).expect(200)

    expect(await current(wellId)).toEqual([])
    expect((await history(testId))[0]).toMatchObject({ id: value!.id, validTo: expect.any(String) })
    expect(await versionOf(unitId)).toBe(before + 1)
    const { db } = tested.deps.connection
    const [entry] = await db
      .select()
      .from(auditTrail)
      .where(and(eq(auditTrail.action, 'adopted-values/withdraw'), eq(auditTrail.subjectId, value!.id)))
    expect(entry).toMatchObject({ actorId: steward.id, details: { reason: 'The pump was off.', quantity: 'T' } })
    const waiting = await db
      .select()
      .from(jobs)
      .where(and(eq(jobs.kind, 'refit-models'), eq(jobs.state, 'waiting')))
    expect(waiting.map(({ payload }) => payload)).toEqual([{ unitId }])
  })

  it('happens once', async () => {
    const { wellId } = await books.adopt({ units: wholly(unitId) })
    const [value] = await current(wellId)
    const withdraw = () => steward.post(`/api/adopted-values/${value!.id}/withdrawal`).send({ reason: 'Wrong well.' })
    await withdraw().expect(200)
    expect((await withdraw().expect(409)).body).toMatchObject({ code: 'adopted-value/not-current' })
  })

  it('needs a reason', async () => {
    const { wellId } = await books.adopt({ units: wholly(unitId) })
    const [value] = await current(wellId)
    const answer = await steward.post(`/api/adopted-values/${value!.id}/withdrawal`).send({ reason: '  ' }).expect(400)
    expect(answer.body).toMatchObject({ fields: [{ path: 'reason' }] })
    expect(await current(wellId)).toHaveLength(1)
  })

  it('is refused to analysts, also to those who review', async () => {
    const { wellId } = await books.adopt({ units: wholly(unitId) })
    const [value] = await current(wellId)
    const analyst = await tested.signIn('analyst', { mayReview: true })
    await analyst.post(`/api/adopted-values/${value!.id}/withdrawal`).send({ reason: 'Doubtful.' }).expect(403)
  })
})

describe('values that a reader may not see', () => {
  it('are not found by any address', async () => {
    const { wellId, testId } = await books.adopt({ units: wholly(unitId), visibility: 'internal' })
    const [value] = await items(steward, `/api/adopted-values?wellId=${wellId}`)
    await reader.get(`/api/adopted-values/${value!.id}`).expect(404)
    expect(await history(testId)).toEqual([])
    expect(await current(wellId)).toEqual([])
    expect(await history(testId, steward)).toHaveLength(1)
  })

  it('are those of an embargoed well, until the embargo ends', async () => {
    const { wellId, testId } = await books.adopt({ units: wholly(unitId) })
    const subject = (await steward.get(`/api/wells/${wellId}`).expect(200)).body as { rowVersion: number }
    const embargo = {
      visibility: 'published',
      embargoUntil: '2999-01-01T00:00:00.000Z',
      rowVersion: subject.rowVersion,
    }
    // The test first: a child is never more visible than its parent.
    const test = (await steward.get(`/api/pumping-tests/${testId}`).expect(200)).body as { rowVersion: number }
    await steward
      .put(`/api/pumping-tests/${testId}/visibility`)
      .send({ ...embargo, rowVersion: test.rowVersion })
      .expect(200)
    const hidden = await steward.put(`/api/wells/${wellId}/visibility`).send(embargo).expect(200)
    expect(await current(wellId)).toEqual([])
    const { rowVersion } = hidden.body as { rowVersion: number }
    await steward
      .put(`/api/wells/${wellId}/visibility`)
      .send({ ...embargo, embargoUntil: null, rowVersion })
      .expect(200)
    await steward
      .put(`/api/pumping-tests/${testId}/visibility`)
      .send({ ...embargo, embargoUntil: null, rowVersion: test.rowVersion + 1 })
      .expect(200)
    expect(await current(wellId)).toHaveLength(1)
  })

  it('give 404 for a test or value that does not exist', async () => {
    await reader.get('/api/adopted-values/4000000000').expect(404)
  })
})
