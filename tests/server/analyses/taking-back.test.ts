import { and, asc, eq } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import { auditTrail, testUnits, testWells } from '../../../server/db/schema/index.ts'
import {
  accept,
  enterTest,
  readAnalysis,
  readTest,
  recalculate,
  submitAnalysis,
  submitDraft,
} from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { createWell, makeMapping, makeRegion, makeUnit, saveAnalysis, upload } from '../../support/domain.ts'
import { keepBooks, reportAt, wholly } from '../../support/values.ts'

const tested = useApp()
let analyst: SignedIn
let other: SignedIn
let steward: SignedIn
let reviewer: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  analyst = await tested.signIn('analyst')
  other = await tested.signIn('analyst')
  steward = await tested.signIn('steward')
  reviewer = await tested.signIn('analyst', { mayReview: true })
})

const takeBack = (person: SignedIn, { id, rowVersion }: Pick<Analysis, 'id' | 'rowVersion'>) =>
  person.delete(`/api/analyses/${id}/submission?rowVersion=${rowVersion}`)
const codeOf = ({ body }: { body: unknown }) => (body as Problem).code

async function submitted() {
  const entered = await enterTest(analyst, { unitId })
  return { ...entered, analysis: await submitAnalysis(analyst, entered.id) }
}

describe('a submitted analysis', () => {
  it('is a draft again once its author takes it back, calculates anew and submits it', async () => {
    const { id, input, test, analysis } = await submitted()
    const rateSteps = [{ startS: 0, rate: { value: 11, unit: 'L/s' } }]
    await analyst
      .put(`/api/pumping-tests/${id}`)
      .send({ ...input, rateSteps, rowVersion: test.rowVersion })
      .expect(200)
    expect(await readAnalysis(analyst, analysis.id)).toMatchObject({ inputsChanged: true, mayTakeBack: true })

    const back = (await takeBack(analyst, analysis).expect(200)).body as Analysis
    expect(back).toMatchObject({ state: 'draft', submittedAt: null, mayEdit: true, mayTakeBack: false })
    expect(back.rationale).toBe('The curve follows all readings.')
    expect(codeOf(await accept(reviewer, back).expect(409))).toBe('review/not-submitted')
    const again = await submitDraft(analyst, await recalculate(analyst, back))
    // Twelve became eleven litres a second, and T goes with the rate.
    expect(again.result.T!.value / analysis.result.T!.value).toBeCloseTo(11 / 12, 6)
    await accept(reviewer, again).expect(200)
  })

  it('keeps in the audit trail what had been submitted', async () => {
    const { analysis } = await submitted()
    await takeBack(analyst, analysis).expect(200)
    const [entry] = await tested.deps.connection.db
      .select()
      .from(auditTrail)
      .where(and(eq(auditTrail.action, 'analyses/take-back'), eq(auditTrail.subjectId, analysis.id)))
    expect(entry).toMatchObject({
      actorId: analyst.id,
      details: { method: 'theis', rationale: 'The curve follows all readings.', submittedAt: analysis.submittedAt },
    })
  })

  it('lets readings be deleted that it no longer holds', async () => {
    const { test, analysis } = await submitted()
    const gone = () => analyst.delete(`/api/reading-series/${test.series[0]!.id}?rowVersion=1`)
    expect(codeOf(await gone())).toBe('pumping-test/in-use')
    await takeBack(analyst, analysis).expect(200)
    await gone().expect(200)
  })

  it('is taken back by its author or a steward, and by nobody else', async () => {
    const { analysis } = await submitted()
    expect((await readAnalysis(other, analysis.id)).mayTakeBack).toBe(false)
    expect(codeOf(await takeBack(other, analysis).expect(403))).toBe('analysis/not-yours')
    expect((await readAnalysis(steward, analysis.id)).mayTakeBack).toBe(true)
    await takeBack(steward, analysis).expect(200)
  })

  it('is not taken back after it was decided about, nor at an older version', async () => {
    const { analysis } = await submitted()
    expect(codeOf(await takeBack(analyst, { ...analysis, rowVersion: 1 }).expect(409))).toBe('edit/conflict')
    await accept(reviewer, analysis).expect(200)
    expect(codeOf(await takeBack(analyst, analysis).expect(409))).toBe('review/not-submitted')
  })

  it('is either taken back or accepted when both happen at once', async () => {
    const { analysis } = await submitted()
    const answers = await Promise.all([takeBack(analyst, analysis), accept(reviewer, analysis)])
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409])
  })
})

describe('what cannot be taken back', () => {
  it('is a draft', async () => {
    const { id } = await enterTest(analyst, { unitId })
    const draft = (await saveAnalysis(analyst, id, 'theis')).body as Analysis
    expect(codeOf(await takeBack(analyst, draft).expect(409))).toBe('review/not-submitted')
  })

  it('is a reported value, which has no draft', async () => {
    const { analysisId } = await (await keepBooks(tested)).report({ units: wholly(unitId) })
    const reported = await readAnalysis(steward, analysisId)
    expect(codeOf(await takeBack(steward, reported).expect(409))).toBe('analysis/reported-stays')
  })
})

describe('a reported value that waits for review', () => {
  const remove = (person: SignedIn, id: number) => person.delete(`/api/analyses/${id}`)
  const entriesAbout = (subject: string, subjectId: number) =>
    tested.deps.connection.db
      .select()
      .from(auditTrail)
      .where(and(eq(auditTrail.subject, subject), eq(auditTrail.subjectId, subjectId)))
      .orderBy(asc(auditTrail.id))

  /** Entered by an analyst of old reports. */
  async function reported() {
    const { services } = await keepBooks(tested)
    const person: Viewer = { id: analyst.id, name: 'Analyst', role: 'analyst', mayReview: false }
    const wellId = await createWell(steward)
    const overrides = { units: wholly(unitId), visibility: 'internal' as const }
    return { wellId, person, services, ...(await reportAt(services, person, wellId, overrides)) }
  }

  it('is taken back by the person who entered it, with the test that is known for nothing else', async () => {
    const { testId, analysisId, wellId } = await reported()
    expect((await readAnalysis(other, analysisId)).mayTakeBack).toBe(false)
    expect(codeOf(await remove(other, analysisId).expect(403))).toBe('analysis/not-yours')
    expect((await readAnalysis(analyst, analysisId)).mayTakeBack).toBe(true)
    await remove(analyst, analysisId).expect(200)
    await analyst.get(`/api/analyses/${analysisId}`).expect(404)
    await analyst.get(`/api/pumping-tests/${testId}`).expect(404)
    const well = (await analyst.get(`/api/wells/${wellId}`).expect(200)).body as { tests: unknown[] }
    expect(well.tests).toEqual([])
    for (const table of [testWells, testUnits])
      expect(await tested.deps.connection.db.$count(table, eq(table.pumpingTestId, testId))).toBe(0)
    await remove(analyst, analysisId).expect(404)
  })

  it('stays in the audit trail with its value and source', async () => {
    const { testId, analysisId } = await reported()
    await remove(analyst, analysisId).expect(200)
    expect((await entriesAbout('analysis', analysisId)).at(-1)).toMatchObject({
      actorId: analyst.id,
      action: 'analyses/take-back',
      details: { method: 'reported', testId, rationale: 'Old report', result: { T: { value: 1e-3 } } },
    })
    expect((await entriesAbout('pumping-test', testId)).at(-1)).toMatchObject({
      actorId: analyst.id,
      action: 'pumping-tests/delete',
      details: { source: 'Old report' },
    })
  })

  it('leaves the test alone while another value of it is on record', async () => {
    const { testId, analysisId, services, person } = await reported()
    const value = { T: 2e-3, S: null, K: null, storageClass: null, origin: 'legacy-reviewed' as const }
    const facts = { observationWell: true, aquifer: 'confined' as const, source: 'A second report' }
    const second = await services.analyses.report(person, testId, { ...value, ...facts })
    await remove(analyst, analysisId).expect(200)
    await analyst.get(`/api/pumping-tests/${testId}`).expect(200)
    expect((await readAnalysis(analyst, second.id)).state).toBe('submitted')
  })

  it('leaves the test alone that somebody brought readings to', async () => {
    const { testId, analysisId } = await reported()
    const { wells } = await readTest(analyst, testId)
    await upload(analyst, testId, wells[0]!.id, 'minutes,drawdown\n1,0.1\n2,0.2', makeMapping()).expect(201)
    await remove(analyst, analysisId).expect(200)
    expect((await readTest(analyst, testId)).series).toHaveLength(1)
  })

  it('is a matter of record once it was decided about', async () => {
    const { analysisId } = await reported()
    await accept(reviewer, await readAnalysis(reviewer, analysisId)).expect(200)
    expect((await readAnalysis(analyst, analysisId)).mayTakeBack).toBe(false)
    expect(codeOf(await remove(analyst, analysisId).expect(409))).toBe('analysis/reported-decided')
    expect(codeOf(await remove(steward, analysisId).expect(409))).toBe('analysis/reported-decided')
  })

  it('is either taken back or accepted when both happen at once', async () => {
    const { analysisId } = await reported()
    const analysis = await readAnalysis(reviewer, analysisId)
    const answers = await Promise.all([remove(analyst, analysisId), accept(reviewer, analysis)])
    const [removed, accepted] = answers.map(({ status }) => status)
    expect([
      [200, 404],
      [409, 200],
    ]).toContainEqual([removed, accepted])
  })
})
