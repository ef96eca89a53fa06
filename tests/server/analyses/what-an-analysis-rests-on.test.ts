import { beforeAll, describe, expect, it } from 'vitest'
import { analysisOptions } from '#shared/contracts/analysis-result.ts'
import type { AdoptedValueList } from '#shared/contracts/adopted-values.ts'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import type { Well } from '#shared/contracts/wells.ts'
import { accept, enterTest, publishTest, readAnalysis, submitAnalysis } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeMapping, makeRegion, makeUnit, makeWellInput, saveAnalysis, upload } from '../../support/domain.ts'

const tested = useApp()
let analyst: SignedIn
let reviewer: SignedIn
let steward: SignedIn
let reader: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  analyst = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
  steward = await tested.signIn('steward')
  reader = await tested.signIn('reader')
})

const codeOf = (body: unknown) => (body as Problem).code

/** The input that enters the well as it is now, with some of it changed. */
async function editWell(id: number, change: Partial<ReturnType<typeof makeWellInput>>) {
  const well = (await analyst.get(`/api/wells/${id}`).expect(200)).body as Well
  const same = makeWellInput({ code: well.code, x: well.originalX, y: well.originalY })
  await analyst
    .put(`/api/wells/${id}`)
    .send({ ...same, ...change, rowVersion: well.rowVersion })
    .expect(200)
}

const currentValues = async (wellId: number) =>
  ((await reviewer.get(`/api/adopted-values?wellId=${wellId}`).expect(200)).body as AdoptedValueList).items

describe('an analysis of readings that give no number', () => {
  it.each([
    ['a level log', () => 1],
    ['a log of absurd values', (i: number) => (i % 2 ? 1e300 : 1e299)],
  ])('is refused for %s', async (_, drawdown) => {
    const { id, test } = await enterTest(analyst, { unitId })
    const lines = Array.from({ length: 40 }, (_line, i) => `${i + 1},${drawdown(i)}`)
    const well = test.wells.find(({ role }) => role === 'observation')!
    await upload(analyst, id, well.id, ['minutes,drawdown', ...lines].join('\n'), makeMapping()).expect(201)
    const inputs = (await analyst.get(`/api/pumping-tests/${id}/inputs`).expect(200)).body as { sha256: string }
    const options = { wellIds: [String(well.wellId)], window: null }
    const expected = { methodVersion: 1, T: 1, S: 1 }
    const body = { method: 'cooper-jacob', options, label: null, expected, inputsSha256: inputs.sha256 }
    const answer = await analyst.post(`/api/pumping-tests/${id}/analyses`).send(body)
    expect([answer.status, codeOf(answer.body)]).toEqual([400, 'analysis/refused'])
  })
})

describe('a submitted analysis', () => {
  it('is not accepted for another unit than it was submitted for', async () => {
    const { id, input, test, pumped } = await enterTest(analyst, { unitId })
    const submitted = await submitAnalysis(analyst, id)
    const units = [{ unitId: await makeUnit(tested), share: 1, basis: 'single-unit' as const }]
    await analyst
      .put(`/api/pumping-tests/${id}`)
      .send({ ...input, units, rowVersion: test.rowVersion })
      .expect(200)

    expect((await readAnalysis(analyst, submitted.id)).inputsChanged).toBe(true)
    expect(codeOf((await accept(reviewer, submitted).expect(409)).body)).toBe('analysis/inputs-changed')
    expect(await currentValues(pumped)).toEqual([])
  })

  it('is marked when a well of its test has another radius, and not when it has another name', async () => {
    const { id, observation } = await enterTest(analyst, { unitId })
    const submitted = await submitAnalysis(analyst, id)
    await editWell(observation, { code: `RENAMED-${observation}` })
    expect((await readAnalysis(analyst, submitted.id)).inputsChanged).toBe(false)
    await editWell(observation, { casingRadiusM: 0.2 })
    expect((await readAnalysis(analyst, submitted.id)).inputsChanged).toBe(true)
  })

  it('is accepted once when two reviewers accept it at the same moment', async () => {
    const { id, pumped } = await enterTest(analyst, { unitId })
    const submitted = await submitAnalysis(analyst, id)
    const answers = await Promise.all([accept(reviewer, submitted), accept(reviewer, submitted)])
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409])
    expect((await currentValues(pumped)).filter(({ quantity }) => quantity === 'T')).toHaveLength(1)
  })

  it('leaves one current value when two analyses of a test are accepted at the same moment', async () => {
    const { id, pumped } = await enterTest(analyst, { unitId })
    const both = [await submitAnalysis(analyst, id), await submitAnalysis(analyst, id)]
    const answers = await Promise.all(both.map((analysis) => accept(reviewer, analysis)))
    expect(answers.map(({ status }) => status)).toEqual([200, 200])
    expect((await currentValues(pumped)).filter(({ quantity }) => quantity === 'T')).toHaveLength(1)
  })
})

describe('an accepted analysis', () => {
  it('is withdrawn with the last of its values, and its readings may be deleted then', async () => {
    const { id, pumped, test } = await enterTest(analyst, { unitId })
    const submitted = await submitAnalysis(analyst, id)
    await accept(reviewer, submitted).expect(200)
    const remove = () => analyst.delete(`/api/reading-series/${test.series[0]!.id}?rowVersion=1`)
    expect(codeOf((await remove().expect(409)).body)).toBe('pumping-test/in-use')

    for (const { id: valueId } of await currentValues(pumped)) {
      expect((await readAnalysis(analyst, submitted.id)).state).toBe('accepted')
      await steward
        .post(`/api/adopted-values/${valueId}/withdrawal`)
        .send({ reason: 'The rate was wrong.' })
        .expect(200)
    }
    expect((await readAnalysis(analyst, submitted.id)).state).toBe('withdrawn')
    await remove().expect(200)
  })
})

describe('a reader', () => {
  it('is shown no draft and nothing that waits for review', async () => {
    const entered = await enterTest(analyst, { unitId })
    await publishTest(steward, entered)
    const { id } = entered
    const draft = (await saveAnalysis(analyst, id, 'theis')).body as Analysis
    const submitted = await submitAnalysis(analyst, id)
    await reader.get(`/api/analyses/${draft.id}`).expect(404)
    expect((await reader.get(`/api/pumping-tests/${id}/analyses`).expect(200)).body).toEqual({ items: [] })
    await accept(reviewer, submitted).expect(200)
    const { items } = (await reader.get(`/api/pumping-tests/${id}/analyses`).expect(200)).body as { items: Analysis[] }
    expect(items.map((item) => item.id)).toEqual([submitted.id])
  })

  it('learns nothing of a hidden observation well from the analysis of a published test', async () => {
    const observation = { casingRadiusM: null, wellRadiusM: null }
    const entered = await enterTest(analyst, { unitId, observation })
    await publishTest(steward, entered, { withObservation: false })
    const { id, test } = entered
    const hidden = test.wells.find(({ role }) => role === 'observation')!
    const submitted = await submitAnalysis(analyst, id)
    await accept(reviewer, submitted).expect(200)
    expect((await readAnalysis(analyst, submitted.id)).result.residuals).not.toEqual([])

    const seen = await readAnalysis(reader, submitted.id)
    expect(seen.result.T!.value).toBe(submitted.result.T!.value)
    expect(seen.result.residuals).toEqual([])
    expect(JSON.stringify(seen)).not.toContain(`"${hidden.code}"`)
    expect(analysisOptions.parse(seen.options).wellIds).not.toContain(String(hidden.wellId))
    const { items } = (await reader.get(`/api/pumping-tests/${id}/analyses`).expect(200)).body as { items: Analysis[] }
    expect(items).toEqual([seen])
  })
})

describe('an analysis that is sent twice with one key', () => {
  it('is saved once', async () => {
    const { id } = await enterTest(analyst, { unitId })
    const first = (await saveAnalysis(analyst, id, 'theis')).body as Analysis
    const inputs = (await analyst.get(`/api/pumping-tests/${id}/inputs`).expect(200)).body as { sha256: string }
    const { method, options, methodVersion, result } = first
    const expected = { methodVersion, T: result.T!.value, S: result.S!.value }
    const body = { method, options, label: 'again', expected, inputsSha256: inputs.sha256 }
    const send = () =>
      analyst.post(`/api/pumping-tests/${id}/analyses`).set('Idempotency-Key', 'analysis').send(body).expect(201)
    expect((await send()).body).toEqual((await send()).body)
    const { items } = (await analyst.get(`/api/pumping-tests/${id}/analyses`).expect(200)).body as { items: Analysis[] }
    expect(items).toHaveLength(2)
  })
})
