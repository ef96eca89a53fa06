import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import type { ReviewQueueItem } from '#shared/contracts/reviews.ts'
import {
  accept,
  enterTest,
  readAnalysis,
  recalculate,
  submitAnalysis,
  submitDraft,
} from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit, saveAnalysis } from '../../support/domain.ts'

const tested = useApp()
let analyst: SignedIn
/** A steward with the review right: of a small office, the one who corrects and the one who decides. */
let steward: SignedIn
let reviewer: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  analyst = await tested.signIn('analyst')
  steward = await tested.signIn('steward', { mayReview: true })
  reviewer = await tested.signIn('analyst', { mayReview: true })
})

const draftOf = async (testId: number) => (await saveAnalysis(analyst, testId, 'theis')).body as Analysis

const decideReadings = (person: SignedIn, seriesId: number, action: 'leave-out' | 'take') =>
  person
    .post(`/api/reading-series/${seriesId}/decisions`)
    .send({ seqs: [3], action, reason: 'Looked at the field sheet.' })
    .expect(200)

/** Page, queue and decision say the same. */
async function expectBarred(person: SignedIn, analysis: Analysis, barred: boolean) {
  expect((await readAnalysis(person, analysis.id)).mayReview).toBe(!barred)
  const { items } = (await person.get('/api/reviews?limit=500').expect(200)).body as { items: ReviewQueueItem[] }
  expect(items.find(({ id }) => id === analysis.id)?.mayReview).toBe(!barred)
  const answer = await accept(person, analysis)
  if (barred) expect([answer.status, (answer.body as Problem).code]).toEqual([403, 'review/own-work'])
  else expect(answer.status).toBe(200)
}

describe('an analysis is not reviewed by', () => {
  it('a steward who changed the draft, whoever changed it afterwards, and is by somebody else', async () => {
    const { id } = await enterTest(analyst, { unitId })
    const byAnalyst = await recalculate(analyst, await recalculate(steward, await draftOf(id)))
    const submitted = await submitDraft(analyst, byAnalyst)
    await expectBarred(steward, submitted, true)
    await expectBarred(reviewer, submitted, false)
  })

  it('a steward who submitted it', async () => {
    const { id } = await enterTest(analyst, { unitId })
    await expectBarred(steward, await submitDraft(steward, await draftOf(id)), true)
  })

  it('somebody who left a reading of its test out', async () => {
    const { id, test } = await enterTest(analyst, { unitId })
    await decideReadings(steward, test.series[0]!.id, 'leave-out')
    await expectBarred(steward, await submitAnalysis(analyst, id), true)
  })
})

describe('an analysis is reviewed by a steward', () => {
  it('whose choice of readings somebody else has decided about since', async () => {
    const { id, test } = await enterTest(analyst, { unitId })
    await decideReadings(steward, test.series[0]!.id, 'leave-out')
    await decideReadings(analyst, test.series[0]!.id, 'take')
    await expectBarred(steward, await submitAnalysis(analyst, id), false)
  })

  it('who corrected a fact of the test before its author calculated with it', async () => {
    const { id, input, test } = await enterTest(analyst, { unitId })
    const rateSteps = [{ startS: 0, rate: { value: 11, unit: 'L/s' } }]
    await steward
      .put(`/api/pumping-tests/${id}`)
      .send({ ...input, rateSteps, rowVersion: test.rowVersion })
      .expect(200)
    await expectBarred(steward, await submitAnalysis(analyst, id), false)
  })

  it('who took it back and left it to its author to change and submit', async () => {
    const { id } = await enterTest(analyst, { unitId })
    const first = await submitAnalysis(analyst, id)
    const { body } = await steward
      .delete(`/api/analyses/${first.id}/submission?rowVersion=${first.rowVersion}`)
      .expect(200)
    await expectBarred(steward, await submitDraft(analyst, body as Analysis), false)
  })
})
