import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import { accept, enterTest, readAnalysis, submitAnalysis } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit, saveAnalysis } from '../../support/domain.ts'

const tested = useApp()
let analyst: SignedIn
let reviewer: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  analyst = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
})
afterEach(() => vi.restoreAllMocks())

const codeOf = ({ body }: { body: unknown }) => (body as Problem).code
const listed = async (testId: number) =>
  ((await analyst.get(`/api/pumping-tests/${testId}/analyses`).expect(200)).body as { items: Analysis[] }).items

/** Does something once a task has been calculated and before its result is used. */
function onceCalculated(task: string, meanwhile: () => PromiseLike<unknown>) {
  const { workers } = tested.deps
  const run = workers.run.bind(workers)
  vi.spyOn(workers, 'run').mockImplementation(async (name, input, signal) => {
    const output = await run(name, input, signal)
    if (name === task) await meanwhile()
    return output as never
  })
}

const leaveOut = ({ series }: PumpingTest, seq: number) =>
  analyst
    .post(`/api/reading-series/${series[0]!.id}/decisions`)
    .send({ seqs: [seq], action: 'leave-out', reason: 'A spike.' })
    .expect(200)

describe('While an analysis is calculated', () => {
  it('a reading is left out, and nothing is saved', async () => {
    const { id, test } = await enterTest(analyst, { unitId })
    onceCalculated('analyse', () => leaveOut(test, 5))
    const answer = await saveAnalysis(analyst, id, 'theis')
    expect([answer.status, codeOf(answer)]).toEqual([409, 'analysis/inputs-changed'])
    expect(await listed(id)).toEqual([])
  })

  it('anew, its draft is submitted, and stays as it was submitted', async () => {
    const { id } = await enterTest(analyst, { unitId })
    const draft = (await saveAnalysis(analyst, id, 'theis')).body as Analysis
    const { rowVersion, options, result, method } = draft
    const inputs = (await analyst.get(`/api/pumping-tests/${id}/inputs`).expect(200)).body as { sha256: string }
    const expected = { methodVersion: result.methodVersion, T: result.T!.value, S: result.S!.value }
    const update = { method, options, label: 'Again', expected, inputsSha256: inputs.sha256, rowVersion }
    onceCalculated('analyse', () =>
      analyst
        .post(`/api/analyses/${draft.id}/submission`)
        .send({ rowVersion, rationale: 'It fits.', confirmed: [] })
        .expect(200),
    )
    const answer = await analyst.put(`/api/analyses/${draft.id}`).send(update)
    expect([answer.status, codeOf(answer)]).toEqual([409, 'analysis/not-draft'])
    expect(await readAnalysis(analyst, draft.id)).toMatchObject({ state: 'submitted', label: null })
  })
})

describe('While a submitted analysis is repeated', () => {
  it('it is taken back, and nothing is adopted', async () => {
    const { id } = await enterTest(analyst, { unitId })
    const submitted = await submitAnalysis(analyst, id)
    onceCalculated('repeat-analysis', () =>
      analyst.delete(`/api/analyses/${submitted.id}/submission?rowVersion=${submitted.rowVersion}`).expect(200),
    )
    const answer = await accept(reviewer, submitted)
    expect([answer.status, codeOf(answer)]).toEqual([409, 'review/not-submitted'])
    expect((await readAnalysis(analyst, submitted.id)).state).toBe('draft')
  })

  it('a reading is left out, and nothing is adopted', async () => {
    const { id, test } = await enterTest(analyst, { unitId })
    const submitted = await submitAnalysis(analyst, id)
    onceCalculated('repeat-analysis', () => leaveOut(test, 5))
    const answer = await accept(reviewer, submitted)
    expect([answer.status, codeOf(answer)]).toEqual([409, 'analysis/inputs-changed'])
    expect((await readAnalysis(analyst, submitted.id)).state).toBe('submitted')
  })
})
