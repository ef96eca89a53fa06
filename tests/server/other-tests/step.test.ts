import { eq } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import type { WellLoss } from '#shared/contracts/analyses.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import { adoptedValues } from '../../../server/db/schema/index.ts'
import { accept, publishTest, submitDraft } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit } from '../../support/domain.ts'
import { enterKind, kindRequest, logOf, readKindInputs, saveKind } from './support.ts'

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

const DAY = 86_400
const STEP = 3 * 3600
/** Increments were read after 100 minutes. */
const READ = 6000

/**
 * Rates in m³/d of a step-drawdown test near Bombay, with what was published for it: B 3.26e-3 d/m², C 1.45e-7 d²/m⁵.
 * Source: Clark 1977, as example of Hantush and Bierschenk's method in Kruseman & de Ridder, ILRI Publication 47, from
 * memory. The readings are made from these losses, with a trend of its own (T 260 m²/d) beneath.
 */
const rates = [1306, 1693, 2423, 3261, 4094, 5019]
const B = 3.26e-3 * DAY
const C = 1.45e-7 * DAY * DAY
const trend = (Math.LN10 * DAY) / (4 * Math.PI * 260)

function drawdownAt(time: number): number {
  const running = rates.filter((_, i) => i * STEP < time)
  const changes = running.map((rate, i) => (rate - (rates[i - 1] ?? 0)) / DAY)
  const aquifer = changes.reduce(
    (sum, change, i) => sum + change * (B + trend * Math.log10((time - i * STEP) / READ)),
    0,
  )
  return aquifer + C * (running.at(-1)! / DAY) ** 2
}
const times = rates.flatMap((_, i) => Array.from({ length: 36 }, (__, k) => i * STEP + (k + 1) * 300))
const log = logOf(times.map((t) => [t, Number(drawdownAt(t).toFixed(4))]))
const rateSteps = [
  ...rates.map((value, i) => ({ startS: i * STEP, rate: { value, unit: 'm3/d' } })),
  { startS: rates.length * STEP, rate: { value: 0, unit: 'm3/d' } },
]

const entered = () =>
  enterKind(analyst, { unitId, details: { version: 1, kind: 'step' }, input: { rateSteps }, logs: [log] })
const lossesOf = async (person: SignedIn, wellId: number) =>
  ((await person.get(`/api/wells/${wellId}/losses`).expect(200)).body as { items: WellLoss[] }).items

describe('a step-drawdown test', () => {
  it('gives from its file the losses that were published for its rates', async () => {
    const { id } = await entered()
    const { result, adoption } = await saveKind(analyst, id, 'step-linear', { increment_s: READ })
    const [linear, quadratic] = result.others!
    expect(linear!.value / B).toBeCloseTo(1, 3)
    expect(quadratic!.value / C).toBeCloseTo(1, 2)
    expect(result.T).toBeNull()
    expect(adoption).toBeNull()
    const free = await saveKind(analyst, id, 'step-free-exponent', { increment_s: READ })
    expect(free.result.others!.find((one) => one.id === 'P')!.value).toBeCloseTo(2, 1)
  })

  it('is accepted without a value of the aquifer, and its losses stand with the well', async () => {
    const { id, wellId } = await entered()
    const draft = await saveKind(analyst, id, 'step-linear', { increment_s: READ })
    expect(await lossesOf(analyst, wellId)).toEqual([])
    const submitted = await submitDraft(analyst, draft)
    expect(submitted.state).toBe('submitted')
    await accept(reviewer, submitted).expect(200)
    const values = await tested.deps.connection.db.select().from(adoptedValues).where(eq(adoptedValues.wellId, wellId))
    expect(values).toEqual([])
    const [loss] = await lossesOf(analyst, wellId)
    expect(loss).toMatchObject({ pumpingTestId: id, analysisId: draft.id, method: 'step-linear', inputsChanged: false })
    expect(loss!.losses.map((one) => one.id)).toEqual(['B', 'C'])
    expect(loss!.rates.high_m3_s * DAY).toBeCloseTo(5019, 6)
  })

  it('tells readers of its losses once the test is published', async () => {
    const { id, wellId } = await entered()
    const draft = await saveKind(analyst, id, 'step-linear', {})
    await accept(reviewer, await submitDraft(analyst, draft)).expect(200)
    await reader.get(`/api/wells/${wellId}/losses`).expect(404)
    await publishTest(steward, { id, pumped: wellId, observation: wellId }, { withObservation: false })
    expect(await lossesOf(reader, wellId)).toHaveLength(1)
  })

  it('keeps only losses that the server finds too', async () => {
    const { id } = await entered()
    const request = await kindRequest(analyst, id, 'step-linear', {})
    const others = { ...request.expected.others, C: request.expected.others.C! * 1.0001 }
    const body = { ...request, expected: { ...request.expected, others } }
    const answer = await analyst.post(`/api/pumping-tests/${id}/analyses`).send(body).expect(409)
    expect((answer.body as Problem).code).toBe('analysis/result-differs')
  })

  it('says so in its method where there are too few steps, or no readings yet', async () => {
    const few = await enterKind(analyst, {
      unitId,
      details: { version: 1, kind: 'step' },
      input: { rateSteps: rateSteps.slice(0, 1) },
    })
    const { sha256: inputsSha256, inputs } = await readKindInputs(analyst, few.id)
    expect('well' in inputs && inputs.well.elapsed_s).toEqual([])
    const expected = { methodVersion: 1, T: null, S: null }
    const body = { method: 'step-linear', options: {}, label: null, expected, inputsSha256 }
    const answer = await analyst.post(`/api/pumping-tests/${few.id}/analyses`).send(body).expect(400)
    expect((answer.body as Problem).code).toBe('analysis/refused')
  })

  it('has no observation wells', async () => {
    const { id, input, test, wellId } = await entered()
    const observed = { wellId, distanceBasis: 'measured', distanceM: 30, reason: null, staticLevelM: null }
    const changed = { ...input, observationWells: [observed], rowVersion: test.rowVersion }
    const answer = await analyst.put(`/api/pumping-tests/${id}`).send(changed).expect(400)
    expect((answer.body as Problem).fields.map(({ code }) => code)).toEqual(['pumping-test/only-one-well'])
  })
})
