import { and, eq } from 'drizzle-orm'
import { beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { AdoptedValueList } from '#shared/contracts/adopted-values.ts'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { DecidedReview, ReviewQueueItem } from '#shared/contracts/reviews.ts'
import { adoptedValues, analyses, auditTrail, reviews } from '../../../server/db/schema/index.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import {
  createWell,
  islandMiddle,
  makeMapping,
  makeRegion,
  makeTestInput,
  makeUnit,
  saveAnalysis,
  upload,
} from '../../support/domain.ts'

const tested = useApp()
let analyst: SignedIn
let reviewer: SignedIn
let unitId: number
let test: PumpingTest

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  analyst = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
})

const MINUTES = [1, 2, 3, 5, 8, 12, 20, 30, 50, 80, 120, 200, 300, 500, 800]
/** A straight line in the logarithm of time, as a late confined response draws it; slopes differ between logs. */
const log = (slope: number) =>
  ['min,m', ...MINUTES.map((t) => `${t},${(0.1 + slope * Math.log10(t)).toFixed(4)}`)].join('\n')

/** A test with an observation well and its log. */
async function enterTest(person = analyst, slope = 0.4): Promise<PumpingTest> {
  const wellId = await createWell(person)
  const observation = await createWell(person, { x: islandMiddle[0] + 0.0005, kind: 'piezometer' })
  const input = makeTestInput({
    wellId,
    units: [{ unitId, share: 1, basis: 'single-unit' }],
    observationWells: [
      { wellId: observation, distanceBasis: 'measured', distanceM: 40, reason: null, staticLevelM: null },
    ],
  })
  const { id } = (await person.post('/api/pumping-tests').send(input).expect(201)).body as { id: number }
  const entered = (await person.get(`/api/pumping-tests/${id}`).expect(200)).body as PumpingTest
  await uploadTo(entered, person, slope)
  return entered
}

const uploadTo = ({ id, wells }: PumpingTest, person: SignedIn, slope: number) => {
  const { id: testWellId } = wells.find(({ role }) => role === 'observation')!
  return upload(person, id, testWellId, log(slope), makeMapping()).expect(201)
}

async function submit(
  person = analyst,
  of = test,
  rationale = 'The line follows the late readings.',
): Promise<Analysis> {
  const saved = (await saveAnalysis(person, of.id, 'theis', { readingsPerCycle: null })).body as Analysis
  const confirmed = saved.questions.map(({ code }) => code)
  const body = { rowVersion: saved.rowVersion, rationale, confirmed }
  return (await person.post(`/api/analyses/${saved.id}/submission`).send(body).expect(200)).body as Analysis
}

const decide = (person: SignedIn, { id, rowVersion }: Analysis, decision: string, comment: string | null = null) =>
  person.post(`/api/analyses/${id}/review`).send({ rowVersion, decision, comment })

const valuesOf = async ({ wellId }: PumpingTest) =>
  ((await reviewer.get(`/api/adopted-values?wellId=${wellId}`).expect(200)).body as AdoptedValueList).items
const stateOf = async ({ id }: Analysis) =>
  ((await analyst.get(`/api/analyses/${id}`).expect(200)).body as Analysis).state
const auditOf = (action: string, id: number) =>
  tested.deps.connection.db
    .select()
    .from(auditTrail)
    .where(and(eq(auditTrail.action, action), eq(auditTrail.subjectId, id)))

beforeEach(async () => {
  test = await enterTest()
})

describe('accepting', () => {
  it('puts what the analysis stands for into the regional table, with reviewer and audit record', async () => {
    const submitted = await submit()
    const answer = await decide(reviewer, submitted, 'accepted', 'Repeated, agrees.').expect(200)
    expect(answer.body).toMatchObject({
      state: 'accepted',
      reviews: [{ decision: 'accepted', comment: 'Repeated, agrees.' }],
    })

    const values = await valuesOf(test)
    expect(values.map(({ quantity }) => quantity).sort()).toEqual(['K', 'S', 'T'])
    const T = values.find(({ quantity }) => quantity === 'T')!
    expect(T.value).toBeCloseTo(submitted.result.T!.value, 12)
    expect(T.value / values.find(({ quantity }) => quantity === 'K')!.value).toBeCloseTo(20, 9)

    const [entry] = await auditOf('reviews/accept', submitted.id)
    expect(entry).toMatchObject({
      actorId: reviewer.id,
      details: {
        comment: 'Repeated, agrees.',
        pumpingTestId: test.id,
        valueIds: values.map(({ id }) => id).sort((a, b) => a - b),
      },
    })
  })

  it('is undone whole when its last step fails: no value, no review, no audit record, still submitted', async () => {
    const submitted = await submit()
    // Readings that changed are noticed only after review and state were written.
    await tested.deps.connection.db.update(analyses).set({ inputsChanged: true }).where(eq(analyses.id, submitted.id))
    await decide(reviewer, submitted, 'accepted').expect(409)
    expect(await valuesOf(test)).toEqual([])
    expect(await stateOf(submitted)).toBe('submitted')
    const { db } = tested.deps.connection
    expect(await db.select().from(reviews).where(eq(reviews.analysisId, submitted.id))).toEqual([])
    expect(await auditOf('reviews/accept', submitted.id)).toEqual([])
  })

  it('a second analysis replaces the values of the first and keeps them as history', async () => {
    const first = await submit()
    await decide(reviewer, first, 'accepted').expect(200)
    const before = await valuesOf(test)
    const second = await submit()
    await decide(reviewer, second, 'accepted').expect(200)
    const after = await valuesOf(test)
    expect(new Set(after.map(({ analysisId }) => analysisId))).toEqual(new Set([second.id]))
    expect(after).toHaveLength(before.length)

    const { db } = tested.deps.connection
    const T = before.find(({ quantity }) => quantity === 'T')!
    const [old] = await db.select().from(adoptedValues).where(eq(adoptedValues.id, T.id))
    expect(old!.validTo).not.toBeNull()
    expect(old!.replacedBy).toBe(after.find(({ quantity }) => quantity === 'T')!.id)
  })

  it('repeats the analysis from its own snapshot, and refuses a stored number that does not come out again', async () => {
    const submitted = await submit()
    const { db } = tested.deps.connection
    const tampered = { ...submitted.result, T: { ...submitted.result.T!, value: 2 * submitted.result.T!.value } }
    await db.update(analyses).set({ result: tampered }).where(eq(analyses.id, submitted.id))
    const answer = await decide(reviewer, submitted, 'accepted').expect(409)
    expect(answer.body).toMatchObject({ code: 'analysis/result-differs' })
    expect(await valuesOf(test)).toEqual([])
  })
})

describe('returning', () => {
  it('sends the analysis back with the comment, and adopts nothing', async () => {
    const submitted = await submit()
    const answer = await decide(reviewer, submitted, 'returned', 'Begin the window later.').expect(200)
    expect(answer.body).toMatchObject({
      state: 'returned',
      reviews: [{ decision: 'returned', comment: 'Begin the window later.' }],
    })
    expect(await valuesOf(test)).toEqual([])
    expect(await auditOf('reviews/return', submitted.id)).toHaveLength(1)
  })

  it.each([null, '', '   '])('needs a comment (%j)', async (comment) => {
    const submitted = await submit()
    const answer = await decide(reviewer, submitted, 'returned', comment).expect(400)
    expect(answer.body).toMatchObject({ fields: [{ path: 'comment', code: 'review/comment-needed' }] })
    expect(await stateOf(submitted)).toBe('submitted')
  })

  it('leaves the values that the test has', async () => {
    await decide(reviewer, await submit(), 'accepted').expect(200)
    const before = await valuesOf(test)
    await decide(reviewer, await submit(), 'returned', 'The first one was better.').expect(200)
    expect(await valuesOf(test)).toEqual(before)
  })
})

describe('who may not decide', () => {
  it('is the author, also with the review right', async () => {
    const own = await enterTest(reviewer)
    const answer = await decide(reviewer, await submit(reviewer, own), 'accepted').expect(403)
    expect(answer.body).toMatchObject({ code: 'review/own-work' })
    expect(await valuesOf(own)).toEqual([])
  })

  it('is everybody without the review right, stewards and administrators too', async () => {
    const submitted = await submit()
    for (const role of ['reader', 'analyst', 'steward', 'administrator'] as const)
      await decide(await tested.signIn(role), submitted, 'accepted').expect(403)
    expect(await stateOf(submitted)).toBe('submitted')
  })
})

describe('what cannot be decided', () => {
  it('is a draft', async () => {
    const draft = (await saveAnalysis(analyst, test.id, 'theis')).body as Analysis
    expect((await decide(reviewer, draft, 'accepted').expect(409)).body).toMatchObject({ code: 'review/not-submitted' })
  })

  it('is what another reviewer has decided meanwhile', async () => {
    const submitted = await submit()
    await decide(reviewer, submitted, 'returned', 'See the note.').expect(200)
    const other = await tested.signIn('steward', { mayReview: true })
    expect((await decide(other, submitted, 'accepted').expect(409)).body).toMatchObject({
      code: 'review/not-submitted',
    })
  })

  it('is decided once by two reviewers at the same moment', async () => {
    const submitted = await submit()
    const other = await tested.signIn('steward', { mayReview: true })
    const answers = await Promise.all([reviewer, other].map((person) => decide(person, submitted, 'accepted')))
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409])
    expect((await valuesOf(test)).filter(({ quantity }) => quantity === 'T')).toHaveLength(1)
  })

  it('is an analysis whose readings changed after it was submitted', async () => {
    const submitted = await submit()
    await uploadTo(test, analyst, 0.7)
    const answer = await decide(reviewer, submitted, 'accepted').expect(409)
    expect(answer.body).toMatchObject({ code: 'analysis/inputs-changed' })
    expect(await valuesOf(test)).toEqual([])
    await decide(reviewer, submitted, 'returned', 'The readings were replaced.').expect(200)
  })

  it('is an analysis that does not exist, or with an unknown decision', async () => {
    await reviewer
      .post('/api/analyses/4000000000/review')
      .send({ rowVersion: 1, decision: 'accepted', comment: null })
      .expect(404)
    await decide(reviewer, await submit(), 'perhaps').expect(400)
  })
})

describe('readings that change after adoption', () => {
  it('mark the value and leave it in the table', async () => {
    await decide(reviewer, await submit(), 'accepted').expect(200)
    const before = await valuesOf(test)
    expect(before.every(({ inputsChanged }) => !inputsChanged)).toBe(true)
    await uploadTo(test, analyst, 0.7)
    const after = await valuesOf(test)
    expect(after).toEqual(before.map((value) => ({ ...value, inputsChanged: true })))
  })
})

describe('the queue', () => {
  const queue = async (person: SignedIn, query = 'limit=500') =>
    (await person.get(`/api/reviews?${query}`).expect(200)).body as {
      items: ReviewQueueItem[]
      total: number
      next: number | null
    }

  it('holds what waits, the oldest first, with what a reviewer needs to choose', async () => {
    const earlier = await submit()
    const later = await submit(analyst, await enterTest(), 'A later one.')
    const { items } = await queue(reviewer)
    const [first, second] = [earlier, later].map(({ id }) => items.findIndex((item) => item.id === id))
    expect(first).toBeGreaterThanOrEqual(0)
    expect(second).toBeGreaterThan(first!)
    expect(items[second!]).toMatchObject({
      method: 'theis',
      rationale: 'A later one.',
      startLocal: '2019-03-14T09:00:00',
      T: { value: later.result.T!.value },
      mayReview: true,
      inputsChanged: false,
    })
  })

  it('says of own work that somebody else must decide', async () => {
    const own = await submit(reviewer, await enterTest(reviewer))
    expect((await queue(reviewer)).items.find(({ id }) => id === own.id)).toMatchObject({ mayReview: false })
  })

  it('is paged, and counts all that wait', async () => {
    await submit()
    const all = await queue(reviewer)
    const page = await queue(reviewer, 'limit=1&offset=0')
    expect(page.items).toEqual(all.items.slice(0, 1))
    expect(page.total).toBe(all.total)
    expect(page.next).toBe(all.total > 1 ? 1 : null)
  })

  it('loses what was decided, which is then among the latest decisions', async () => {
    const submitted = await submit()
    await decide(reviewer, submitted, 'returned', 'Once more, please.').expect(200)
    expect((await queue(reviewer)).items.map(({ id }) => id)).not.toContain(submitted.id)
    const { items } = (await reviewer.get('/api/reviews/decided').expect(200)).body as { items: DecidedReview[] }
    expect(items[0]).toMatchObject({ id: submitted.id, decision: 'returned', comment: 'Once more, please.' })
  })

  it('is closed to readers', async () => {
    const reader = await tested.signIn('reader')
    await reader.get('/api/reviews').expect(403)
    await reader.get('/api/reviews/decided').expect(403)
  })
})
