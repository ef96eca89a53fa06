import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTestSummary } from '#shared/contracts/pumping-tests.ts'
import type { Well } from '#shared/contracts/wells.ts'
import { accept, enterTest, publishTest, readTest, submitAnalysis } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit, saveAnalysis } from '../../support/domain.ts'

const tested = useApp()
let analyst: SignedIn
let reviewer: SignedIn
let steward: SignedIn
let reader: SignedIn

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
  steward = await tested.signIn('steward')
  reader = await tested.signIn('reader')
})

async function listFor(person: SignedIn, unitId: number, state?: string) {
  const answer = await person.get('/api/pumping-tests').query({ unitId, ...(state ? { state } : {}) })
  return answer.body as { items: PumpingTestSummary[]; total: number }
}

/** State and number of analyses of the one test of a unit. */
async function told(person: SignedIn, unitId: number) {
  const { items } = await listFor(person, unitId)
  return items.map(({ state, analysisCount }) => [state, analysisCount])
}

describe('a reader', () => {
  it('learns of analyses of a published test only once they are decided', async () => {
    const unitId = await makeUnit(tested)
    const entered = await enterTest(analyst, { unitId })
    await publishTest(steward, entered)
    await saveAnalysis(analyst, entered.id, 'theis')
    const submitted = await submitAnalysis(analyst, entered.id)
    expect([await told(analyst, unitId), await told(reader, unitId)]).toEqual([[['submitted', 2]], [['open', 0]]])
    expect((await listFor(reader, unitId, 'submitted')).total).toBe(0)
    expect((await listFor(reader, unitId, 'open')).total).toBe(1)

    const { tests } = (await reader.get(`/api/wells/${entered.pumped}`).expect(200)).body as Well
    expect(tests.map(({ state, analysisCount }) => [state, analysisCount])).toEqual([['open', 0]])

    await accept(reviewer, submitted).expect(200)
    expect([await told(analyst, unitId), await told(reader, unitId)]).toEqual([[['accepted', 2]], [['accepted', 1]]])
  })

  it('does not learn that an analysis was returned', async () => {
    const unitId = await makeUnit(tested)
    const entered = await enterTest(analyst, { unitId })
    await publishTest(steward, entered)
    const { id, rowVersion } = await submitAnalysis(analyst, entered.id)
    const decision = { rowVersion, decision: 'returned', comment: 'Begin the window later.' }
    const returned = (await reviewer.post(`/api/analyses/${id}/review`).send(decision).expect(200)).body as Analysis
    expect(returned.state).toBe('returned')
    expect([await told(analyst, unitId), await told(reader, unitId)]).toEqual([[['returned', 1]], [['open', 0]]])
    expect((await listFor(reader, unitId, 'returned')).total).toBe(0)
  })

  it('sees a published test without its internal observation well, its readings and its number', async () => {
    const unitId = await makeUnit(tested)
    const entered = await enterTest(analyst, { unitId })
    await publishTest(steward, entered, { withObservation: false })
    const wellCounts = async (person: SignedIn) =>
      (await listFor(person, unitId)).items.map(({ wellCount }) => wellCount)
    expect([await wellCounts(analyst), await wellCounts(reader)]).toEqual([[2], [1]])

    const seen = await readTest(reader, entered.id)
    expect([seen.wells.map(({ wellId }) => wellId), seen.series]).toEqual([[entered.pumped], []])
    const { body } = await reader.get(`/api/pumping-tests/${entered.id}/inputs`).expect(200)
    const { inputs, readings } = body as WorkbenchInputs
    expect([inputs.series, readings]).toEqual([[], []])
    await reader.get(`/api/reading-series/${entered.test.series[0]!.id}/rows`).expect(404)
    await reader.get(`/api/reading-series/${entered.test.series[0]!.id}/file`).expect(404)
  })
})
