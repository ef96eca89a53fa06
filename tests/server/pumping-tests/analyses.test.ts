import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { AdoptedValueList } from '#shared/contracts/adopted-values.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeMapping, makeRegion, makeUnit, saveAnalysis, upload } from '../../support/domain.ts'
import { logSpaced, makeTheisSeries } from '../../shared/hydraulics/make-inputs.ts'
import { createTest, decide, makeSite, siteInput, submit, testWithReadings, type Site } from './support.ts'

const tested = useApp()
let analyst: SignedIn
let other: SignedIn
let reviewer: SignedIn
let site: Site

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst', { mayReview: true })
  other = await tested.signIn('analyst')
  reviewer = await tested.signIn('analyst', { mayReview: true })
  site = await makeSite(tested, analyst)
})

const newTest = () => testWithReadings(analyst, siteInput(site))
const save = async (test: PumpingTest) => (await saveAnalysis(analyst, test.id, 'cooper-jacob')).body as Analysis
const reload = async (id: number, person = analyst) =>
  (await person.get(`/api/analyses/${id}`).expect(200)).body as Analysis
const codeOf = (answer: { body: unknown }) => (answer.body as Problem).code

/** The request that the page would send, to be spoilt. */
async function requestFor(test: PumpingTest) {
  const { inputs, sha256 } = (await analyst.get(`/api/pumping-tests/${test.id}/inputs`)).body as WorkbenchInputs
  const options = { wellIds: inputs.series.map(({ wellId }) => wellId), window: null }
  const { methodVersion, T, S } = analyse('cooper-jacob', inputs, options)
  const expected = { methodVersion, T: T!.value, S: S!.value }
  return { method: 'cooper-jacob', options, label: null, expected, inputsSha256: sha256 }
}
const post = (test: PumpingTest, body: object) => analyst.post(`/api/pumping-tests/${test.id}/analyses`).send(body)

async function leaveOneOut(test: PumpingTest) {
  const [series] = test.series
  const body = { seqs: [5], action: 'leave-out', reason: 'spike' }
  await analyst.post(`/api/reading-series/${series!.id}/decisions`).send(body).expect(200)
}

describe('The server stores its own result only', () => {
  it('gives the transmissivity and storativity that the readings were made with', async () => {
    const { result } = await save(await newTest())
    // The readings follow W(u) to first order; a straight line over u < 0.05 is off by less than 5 %.
    expect(result.T!.value / 0.005).toBeCloseTo(1, 1)
    expect(Math.abs(Math.log(result.S!.value / 2e-4))).toBeLessThan(0.2)
  })

  it('refuses a result that differs by more than a millionth', async () => {
    const test = await newTest()
    const request = await requestFor(test)
    const off = (factor: number) => ({ ...request, expected: { ...request.expected, T: request.expected.T * factor } })
    expect(codeOf(await post(test, off(1 + 1e-5)))).toBe('analysis/result-differs')
    expect((await post(test, off(1 + 1e-8))).status).toBe(201)
    const list = (await analyst.get(`/api/pumping-tests/${test.id}/analyses`)).body as { items: Analysis[] }
    expect(list.items).toHaveLength(1)
    expect(list.items[0]!.result.T!.value).toBe(request.expected.T)
  })

  it('refuses another version of the method, and inputs that are no longer those of the test', async () => {
    const test = await newTest()
    const request = await requestFor(test)
    const version = { ...request, expected: { ...request.expected, methodVersion: 99 } }
    expect(codeOf(await post(test, version))).toBe('analysis/method-version')
    await leaveOneOut(test)
    expect(codeOf(await post(test, request))).toBe('analysis/inputs-changed')
  })

  it('refuses what the method refuses, with its sentence', async () => {
    const test = await newTest()
    const request = await requestFor(test)
    const answer = await post(test, { ...request, method: 'recovery' })
    expect(answer.status).toBe(400)
    expect((answer.body as Problem).detail).toContain('has no stop')
  })

  it('tells the second of two who change one draft', async () => {
    const test = await newTest()
    const draft = await save(test)
    const request = { ...(await requestFor(test)), rowVersion: draft.rowVersion, label: 'first' }
    await analyst.put(`/api/analyses/${draft.id}`).send(request).expect(200)
    expect(codeOf(await analyst.put(`/api/analyses/${draft.id}`).send({ ...request, label: 'second' }))).toBe(
      'edit/conflict',
    )
    expect((await reload(draft.id)).label).toBe('first')
    expect((await other.put(`/api/analyses/${draft.id}`).send(request)).status).toBe(403)
  })
})

describe('Limits refuse, or ask to be confirmed one by one', () => {
  it('asks about an unusual storativity and takes it once confirmed', async () => {
    // S goes as 1/r²: a distance of 9 m in place of 90 m makes it a hundredfold.
    const near = siteInput(site)
    near.observationWells[0]!.distanceM = 9
    const draft = await save(await testWithReadings(analyst, near))
    expect(draft.questions.map(({ code }) => code)).toEqual(['unusual-elastic-storage'])
    const asked = await submit(analyst, draft)
    expect(asked.status).toBe(409)
    expect(codeOf(asked)).toBe('analysis/confirmation-needed')
    const taken = await submit(analyst, draft, ['unusual-elastic-storage'])
    expect((taken.body as Analysis).state).toBe('submitted')
  })

  it('refuses a transmissivity that cannot be right, whatever is confirmed', async () => {
    // 60 m³/s in place of 12 L/s: five thousand times the transmissivity and the storativity.
    const huge = siteInput(site, { rateSteps: [{ startS: 0, rate: { value: 60, unit: 'm3/s' } }] })
    const beyond = await save(await testWithReadings(analyst, huge))
    expect(beyond.refusals.map(({ code }) => code)).toEqual(['limit-transmissivity', 'limit-storage'])
    const answer = await submit(analyst, beyond, [
      'limit-transmissivity',
      'unusual-transmissivity',
      'unusual-elastic-storage',
    ])
    expect(answer.status).toBe(400)
    expect(codeOf(answer)).toBe('analysis/outside-limits')
  })
})

describe('Inputs that change afterwards', () => {
  it('mark drafts, stop their submission, and are unmarked when they come back', async () => {
    const test = await newTest()
    const draft = await save(test)
    await leaveOneOut(test)
    expect((await reload(draft.id)).inputsChanged).toBe(true)
    expect(codeOf(await submit(analyst, draft))).toBe('analysis/inputs-changed')
    const back = { seqs: [5], action: 'take', reason: 'it was right' }
    await analyst.post(`/api/reading-series/${test.series[0]!.id}/decisions`).send(back).expect(200)
    expect((await reload(draft.id)).inputsChanged).toBe(false)
  })

  it('show on the adopted value, which stays', async () => {
    const test = await newTest()
    const submitted = (await submit(analyst, await save(test)).expect(200)).body as Analysis
    await decide(reviewer, submitted, 'accepted').expect(200)
    await leaveOneOut(test)
    const table = (await analyst.get('/api/adopted-values').query({ wellId: test.wellId, quantity: 'T' }))
      .body as AdoptedValueList
    const value = table.items.find(({ pumpingTestId }) => pumpingTestId === test.id)!
    expect(value.inputsChanged).toBe(true)
    expect(value.value).toBeCloseTo(submitted.result.T!.value, 12)
  })

  it('cannot be the deletion of a log behind a submitted or adopted value', async () => {
    const test = await newTest()
    const submitted = (await submit(analyst, await save(test)).expect(200)).body as Analysis
    const gone = () => analyst.delete(`/api/reading-series/${test.series[0]!.id}?rowVersion=1`)
    expect(codeOf(await gone())).toBe('pumping-test/in-use')
    await decide(reviewer, submitted, 'accepted').expect(200)
    expect(codeOf(await gone())).toBe('pumping-test/in-use')
  })
})

describe('Review', () => {
  it('is refused to the author and to those without the right', async () => {
    const submitted = (await submit(analyst, await save(await newTest())).expect(200)).body as Analysis
    expect((await reload(submitted.id, analyst)).mayReview).toBe(false)
    expect(codeOf(await decide(analyst, submitted, 'accepted'))).toBe('review/own-work')
    expect((await decide(other, submitted, 'accepted')).status).toBe(403)
    expect((await reload(submitted.id, reviewer)).mayReview).toBe(true)
  })

  it('returns work with a comment, and returned work is copied, not changed', async () => {
    const test = await newTest()
    const submitted = (await submit(analyst, await save(test)).expect(200)).body as Analysis
    expect((await decide(reviewer, submitted, 'returned')).status).toBe(400)
    const returned = (await decide(reviewer, submitted, 'returned', 'Begin later.').expect(200)).body as Analysis
    expect(returned.state).toBe('returned')
    expect(returned.reviews.map(({ comment }) => comment)).toEqual(['Begin later.'])
    expect(returned.mayEdit).toBe(false)
    const request = { ...(await requestFor(test)), rowVersion: returned.rowVersion }
    expect(codeOf(await analyst.put(`/api/analyses/${returned.id}`).send(request))).toBe('analysis/not-draft')
    expect((await saveAnalysis(analyst, test.id, 'cooper-jacob')).status).toBe(201)
    expect(codeOf(await decide(reviewer, submitted, 'accepted'))).toBe('review/not-submitted')
  })

  it('replaces the value of the test and keeps the earlier one in its history', async () => {
    const test = await newTest()
    for (const method of ['cooper-jacob', 'theis'] as const) {
      const draft = (await saveAnalysis(analyst, test.id, method)).body as Analysis
      const submitted = (await submit(analyst, draft).expect(200)).body as Analysis
      await decide(reviewer, submitted, 'accepted').expect(200)
    }
    const history = (await analyst.get(`/api/pumping-tests/${test.id}/adopted-values`)).body as {
      items: { quantity: string; method: string; validTo: string | null }[]
    }
    const T = history.items.filter(({ quantity }) => quantity === 'T')
    expect(T.map(({ method, validTo }) => [method, validTo === null])).toEqual([
      ['theis', true],
      ['cooper-jacob', false],
    ])
  })
})

describe('What was adopted', () => {
  /** Half a day of pumping and half a day of recovery in the pumped well, exactly Theis: T 0.005 m²/s. */
  function pumpedWellLog(): string {
    const rates = [
      { start_s: 0, rate_m3_s: 0.012 },
      { start_s: 43_200, rate_m3_s: 0 },
    ]
    const spaced = logSpaced(40, 60, 43_200)
    const elapsed_s = [...spaced, ...spaced.map((time) => 43_200 + time)]
    const { drawdown_m } = makeTheisSeries(
      { T: 0.005, S: 2e-4 },
      { role: 'pumped', wellRadius_m: 0.15, rates, elapsed_s, included: elapsed_s.map(() => true) },
    )
    return ['min,m', ...elapsed_s.map((time, i) => `${time / 60},${drawdown_m[i]!.toFixed(5)}`)].join('\n')
  }
  const codes = ({ adoption }: Analysis) => adoption?.reasons.map(({ code }) => code)

  it('stays on the analysis as it was, when another of the test would make better evidence of it today', async () => {
    const rateSteps = [
      { startS: 0, rate: { value: 12, unit: 'L/s' } },
      { startS: 43_200, rate: { value: 0, unit: 'L/s' } },
    ]
    const test = await createTest(analyst, siteInput(site, { rateSteps }))
    const pumped = test.wells.find(({ role }) => role === 'pumped')!.id
    await upload(analyst, test.id, pumped, pumpedWellLog(), makeMapping()).expect(201)

    const draft = (await saveAnalysis(analyst, test.id, 'cooper-jacob')).body as Analysis
    const submitted = (await submit(analyst, draft).expect(200)).body as Analysis
    const accepted = (await decide(reviewer, submitted, 'accepted').expect(200)).body as Analysis
    expect(codes(accepted)).toEqual(['single-well'])
    const { adoption } = accepted

    await saveAnalysis(analyst, test.id, 'recovery')
    const proposed = (await saveAnalysis(analyst, test.id, 'cooper-jacob')).body as Analysis
    expect(codes(proposed)).toEqual(['recovery-agrees'])
    expect(proposed.adoption!.log10ErrorT).toBeLessThan(adoption!.log10ErrorT!)
    const list = (await analyst.get(`/api/pumping-tests/${test.id}/analyses`)).body as { items: Analysis[] }
    expect(list.items.find(({ id }) => id === accepted.id)!.adoption).toEqual(adoption)
    expect((await reload(accepted.id)).adoption).toEqual(adoption)

    const table = (await analyst.get(`/api/pumping-tests/${test.id}/adopted-values`)).body as AdoptedValueList
    const T = table.items.find(({ quantity }) => quantity === 'T')!
    expect(adoption).toMatchObject({ evidence: T.evidence, log10ErrorT: T.log10Error, log10ErrorS: null })
  })

  it('is what was proposed before, also where a composite test gives each unit a share', async () => {
    const units = [
      { unitId: site.unitId, share: 0.4, basis: 'flow-log' as const },
      {
        unitId: await makeUnit(tested, { name: 'Brannet Sandstone', depthOrder: 2 }),
        share: 0.6,
        basis: 'flow-log' as const,
      },
    ]
    for (const input of [siteInput(site), siteInput(site, { units })]) {
      const draft = await save(await testWithReadings(analyst, input))
      const submitted = (await submit(analyst, draft).expect(200)).body as Analysis
      const accepted = (await decide(reviewer, submitted, 'accepted').expect(200)).body as Analysis
      expect(draft.adoption).toEqual(accepted.adoption)
      expect(submitted.adoption).toEqual(accepted.adoption)
      if (input.units.length > 1)
        expect(draft.adoption).toMatchObject({ evidence: 'slight', reasons: [{ code: 'composite-share' }] })
    }
  })

  it('stays when the value has left the regional table', async () => {
    const submitted = (await submit(analyst, await save(await newTest())).expect(200)).body as Analysis
    const { adoption } = (await decide(reviewer, submitted, 'accepted').expect(200)).body as Analysis
    expect(codes(submitted)).toEqual(adoption!.reasons.map(({ code }) => code))
    const steward = await tested.signIn('steward')
    const history = (await analyst.get(`/api/pumping-tests/${submitted.pumpingTestId}/adopted-values`))
      .body as AdoptedValueList
    for (const { id } of history.items)
      await steward.post(`/api/adopted-values/${id}/withdrawal`).send({ reason: 'Wrong well.' }).expect(200)
    const withdrawn = await reload(submitted.id)
    expect(withdrawn.state).toBe('withdrawn')
    expect(withdrawn.adoption).toEqual(adoption)
  })
})
