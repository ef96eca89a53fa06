import { eq } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Problem } from '#shared/contracts/problem.ts'
import type { TestDetails } from '#shared/contracts/test-details.ts'
import { adoptedValues } from '../../../server/db/schema/index.ts'
import { accept, submitDraft } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit } from '../../support/domain.ts'
import { enterKind, readKindInputs, saveKind } from './support.ts'

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

const details = (overrides = {}): TestDetails => ({
  version: 1,
  kind: 'specific-capacity',
  drawdownM: 4,
  drawdownSdM: 0.05,
  wellRadiusM: 0.15,
  casingRadiusM: null,
  ...overrides,
})
const rateSteps = [
  { startS: 0, rate: { value: 6, unit: 'L/s' } },
  { startS: 8 * 3600, rate: { value: 0, unit: 'L/s' } },
]
/** Open to all of its aquifer, so that nothing is corrected for. */
const entered = () =>
  enterKind(analyst, { unitId, details: details(), input: { rateSteps, thicknessM: 25, thicknessError: 0.1 } })

describe('a specific capacity', () => {
  it('is one rate, one drawdown and the time between them', async () => {
    const { id } = await entered()
    const { kind, inputs } = await readKindInputs(analyst, id)
    expect(kind).toBe('specific-capacity')
    expect(inputs).toMatchObject({ rate_m3_s: 0.006, drawdown_m: 4, duration_s: 28_800, screenLength_m: 25 })
  })

  it("gives the transmissivity that Cooper and Jacob's line needs for this drawdown", async () => {
    const { id } = await entered()
    const { result } = await saveKind(analyst, id, 'specific-capacity', { storativity: 1e-4 })
    const T = result.T!.value
    // s = Q/(4πT)·ln(2.2458·T·t/(r²S)), the straight line of Cooper & Jacob 1946, put in again.
    const drawdown = (0.006 / (4 * Math.PI * T)) * Math.log((2.245_838 * T * 28_800) / (0.15 ** 2 * 1e-4))
    expect(drawdown).toBeCloseTo(4, 5)
  })

  it('is adopted with slight evidence, and without a storativity', async () => {
    const { id, wellId } = await entered()
    const draft = await saveKind(analyst, id, 'specific-capacity', {})
    expect(draft.adoption).toMatchObject({ evidence: 'slight', log10ErrorS: null })
    await accept(reviewer, await submitDraft(analyst, draft)).expect(200)
    const { db } = tested.deps.connection
    const values = await db.select().from(adoptedValues).where(eq(adoptedValues.wellId, wellId))
    expect(values.map(({ quantity }) => quantity).sort()).toEqual(['K', 'T'])
    for (const value of values) {
      expect(value).toMatchObject({ origin: 'pumped-well', evidence: 'slight', evidenceReason: 'specific-capacity' })
      expect(value.log10Error).toBeGreaterThanOrEqual(0.35)
    }
  })

  it('belongs to one rate with an end', async () => {
    const { id, input, test } = await entered()
    const changed = { ...input, rateSteps: rateSteps.slice(0, 1), rowVersion: test.rowVersion }
    const answer = await analyst.put(`/api/pumping-tests/${id}`).send(changed).expect(400)
    expect((answer.body as Problem).fields).toMatchObject([{ path: 'rateSteps', code: 'pumping-test/single-rate' }])
  })

  it('names what is missing under its own path', async () => {
    const { id, input, test } = await entered()
    const changed = { ...input, details: details({ drawdownM: null }), rowVersion: test.rowVersion }
    const answer = await analyst.put(`/api/pumping-tests/${id}`).send(changed).expect(400)
    expect((answer.body as Problem).fields.map(({ path }) => path)).toEqual(['details.drawdownM'])
  })
})
