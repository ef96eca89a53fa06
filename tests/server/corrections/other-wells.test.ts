import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { OtherWellInput, OtherWellRecord } from '#shared/contracts/other-wells.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import type { Well } from '#shared/contracts/wells.ts'
import { otherWells } from '../../../server/db/schema/index.ts'
import { accept, enterTest, publishTest, readAnalysis, submitDraft } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { createWell, islandMiddle, makeRegion, makeUnit, makeWellInput, saveAnalysis } from '../../support/domain.ts'
import { correctionsOf, enterWeatherTest, inputsOf } from './support.ts'

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

const makeOther = (overrides: Partial<OtherWellInput> = {}): OtherWellInput => ({
  label: 'Dairy',
  place: { kind: 'distance', distanceM: 400, bearingDeg: 90 },
  rateSteps: [
    { startS: -3600, rate: { value: 18, unit: 'm3/h' } },
    { startS: 7200, rate: { value: 0, unit: 'm3/h' } },
  ],
  fitted: false,
  ...overrides,
})
const list = (person: SignedIn, testId: number, wanted: OtherWellInput) =>
  person.post(`/api/pumping-tests/${testId}/other-wells`).send(wanted)
const codeOf = ({ body }: { body: unknown }) => {
  const { code, fields } = body as Problem
  return fields[0]?.code ?? code
}

describe('another well that pumped', () => {
  it('is superposed where it is typed, switched off, and removed without a trace in the numbers', async () => {
    const { id } = await enterTest(analyst, { unitId })
    const before = await inputsOf(analyst, id)
    const made = (await list(analyst, id, makeOther()).expect(201)).body as OtherWellRecord
    const [other] = (await inputsOf(analyst, id)).inputs.otherWells!
    expect(other!.rates).toEqual([
      { start_s: -3600, rate_m3_s: 0.005 },
      { start_s: 7200, rate_m3_s: 0 },
    ])
    const pumpedId = before.inputs.series[0]!.wellId
    // The observation well stands 87 m east on the map, so it is that much nearer.
    const near = other!.distances.find(({ wellId }) => wellId === pumpedId)!
    expect(Math.abs(near.distance_m - (400 - 87))).toBeLessThan(1)
    const saved = (await saveAnalysis(analyst, id, 'theis')).body as Analysis
    expect(saved.result.findings.map(({ code }) => code)).toContain('other-well-superposed')

    const { id: otherId, rowVersion, label, place, rateSteps, fitted } = made
    const off = { label, place, rateSteps, fitted, active: false, rowVersion }
    await analyst.put(`/api/other-wells/${otherId}`).send(off).expect(200)
    expect(await inputsOf(analyst, id)).toEqual(before)
    expect((await readAnalysis(analyst, saved.id)).inputsChanged).toBe(true)
    await analyst.delete(`/api/other-wells/${otherId}?rowVersion=2`).expect(200)
    expect((await correctionsOf(analyst, id)).otherWells).toEqual([])
  })

  it('of the map marks analyses when its position changes, and is hidden from who may not see it', async () => {
    const entered = await enterTest(analyst, { unitId })
    const { id } = entered
    const wellId = await createWell(analyst, { x: islandMiddle[0] + 0.004 })
    await list(analyst, id, makeOther({ label: null, place: { kind: 'well', wellId }, fitted: true })).expect(201)
    const well = (await analyst.get(`/api/wells/${wellId}`).expect(200)).body as Well
    const draft = (await saveAnalysis(analyst, id, 'theis')).body as Analysis
    const submitted = await submitDraft(analyst, draft)
    await accept(reviewer, submitted).expect(200)
    const match = { T: 0.005, S: 2e-4, [`rate_factor:${well.code}`]: 0.9 }
    const laid = (await saveAnalysis(analyst, id, 'theis', { match })).body as Analysis
    await accept(reviewer, await submitDraft(analyst, laid)).expect(200)
    await publishTest(steward, entered)
    expect((await readAnalysis(analyst, laid.id)).options).toMatchObject({ match })
    expect(JSON.stringify(await readAnalysis(reader, laid.id))).not.toContain(`:${well.code}"`)
    expect(JSON.stringify(await readAnalysis(analyst, draft.id))).toContain(well.code)
    expect(JSON.stringify(await readAnalysis(reader, draft.id))).not.toContain(`"${well.code}"`)
    expect(JSON.stringify(await readAnalysis(reader, draft.id))).not.toContain(`:${well.code}"`)
    expect((await inputsOf(reader, id)).inputs.otherWells).toBeUndefined()
    expect((await correctionsOf(reader, id)).otherWells).toEqual([])

    const moved = makeWellInput({ code: well.code, x: islandMiddle[0] + 0.005, y: well.originalY })
    await analyst
      .put(`/api/wells/${wellId}`)
      .send({ ...moved, rowVersion: well.rowVersion })
      .expect(200)
    expect((await readAnalysis(analyst, draft.id)).inputsChanged).toBe(true)
  })

  it('is counted from the mean of the readings before pumping, where the static level is that mean', async () => {
    const { id } = await enterWeatherTest(analyst, unitId)
    const zero = async () => (await inputsOf(analyst, id)).inputs.series[0]!.zero
    expect(await zero()).toBeUndefined()
    await list(analyst, id, makeOther()).expect(201)
    expect(await zero()).toBe('mean-before')
    const saved = await saveAnalysis(analyst, id, 'theis')
    expect(saved.status).toBe(201)
  })

  it('that is private stands in no test that others see, so that all who analyse have the same inputs', async () => {
    const { id } = await enterTest(analyst, { unitId })
    const wellId = await createWell(analyst, { x: islandMiddle[0] + 0.004 })
    const hide = async () => {
      const { rowVersion } = (await steward.get(`/api/wells/${wellId}`).expect(200)).body as Well
      const hidden = { rowVersion, visibility: 'private', embargoUntil: null }
      return steward.put(`/api/wells/${wellId}/visibility`).send(hidden)
    }
    const wanted = makeOther({ label: null, place: { kind: 'well', wellId } })
    const { id: otherId } = (await list(analyst, id, wanted).expect(201)).body as OtherWellRecord
    expect(codeOf(await hide())).toBe('visibility/tests-more-visible')
    await analyst.delete(`/api/other-wells/${otherId}?rowVersion=1`).expect(200)
    expect((await hide()).status).toBe(200)
    expect(codeOf(await list(analyst, id, wanted))).toBe('correction/other-well-private')
  })

  it('is one of sixty at most', async () => {
    const { id } = await enterTest(analyst, { unitId })
    const { place, rateSteps, fitted } = makeOther()
    const set = { createdAt: new Date(), changedAt: new Date() }
    const row = { pumpingTestId: id, place, rateSteps, fitted, active: false, ...set }
    const rows = Array.from({ length: 59 }, (_, i) => ({ ...row, label: `Field ${i}` }))
    await tested.deps.connection.db.insert(otherWells).values(rows)
    await list(analyst, id, makeOther()).expect(201)
    expect(codeOf(await list(analyst, id, makeOther({ label: 'One more' })))).toBe('correction/other-wells-many')
  })

  it('has a name and a place of its own, a rate above zero, and is listed once', async () => {
    const { id, observation } = await enterTest(analyst, { unitId })
    expect(codeOf(await list(analyst, id, makeOther({ label: null })))).toBe('correction/other-well-name')
    const place = { kind: 'well' as const, wellId: observation }
    expect(codeOf(await list(analyst, id, makeOther({ place })))).toBe('correction/other-well-in-test')
    const none = [{ startS: 0, rate: { value: 0, unit: 'L/s' } }]
    expect(codeOf(await list(analyst, id, makeOther({ rateSteps: none })))).toBe('pumping-test/no-pumping')
    await list(analyst, id, makeOther()).expect(201)
    expect(codeOf(await list(analyst, id, makeOther()))).toBe('correction/other-well-twice')
  })
})
