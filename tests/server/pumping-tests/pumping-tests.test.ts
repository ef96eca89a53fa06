import { beforeAll, describe, expect, it } from 'vitest'
import type { PumpingTest, PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { createWell, islandMiddle, makeRegion, makeUnit, publish } from '../../support/domain.ts'
import { createTest, fieldsOf, makeSite, siteInput, type Site } from './support.ts'

const tested = useApp()
let analyst: SignedIn
let other: SignedIn
let steward: SignedIn
let site: Site

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst')
  other = await tested.signIn('analyst')
  steward = await tested.signIn('steward')
  site = await makeSite(tested, analyst)
})

const refused = async (overrides: Partial<PumpingTestInput>) =>
  fieldsOf((await analyst.post('/api/pumping-tests').send(siteInput(site, overrides)).expect(400)).body)

const observed = (overrides: Partial<PumpingTestInput['observationWells'][number]>) => ({
  observationWells: [
    {
      wellId: site.observation,
      distanceBasis: 'measured' as const,
      distanceM: 90,
      reason: null,
      staticLevelM: null,
      ...overrides,
    },
  ],
})
const rate = (value: number, startS = 0, unit = 'L/s') => ({ startS, rate: { value, unit } })

describe('A pumping test that cannot be right is refused under the field that is wrong', () => {
  it('refuses a negative rate', async () => {
    expect(await refused({ rateSteps: [rate(-12)] })).toEqual({
      'rateSteps.0.rate.value': 'pumping-test/negative-rate',
    })
  })

  it('refuses a unit that fits two gallons', async () => {
    expect(await refused({ rateSteps: [rate(12, 0, 'gpm')] })).toEqual({ 'rateSteps.0.rate.unit': 'field/choice' })
  })

  it('refuses steps out of order and a history without pumping', async () => {
    expect(await refused({ rateSteps: [rate(12, 600), rate(0, 600)] })).toEqual({
      rateSteps: 'pumping-test/steps-order',
    })
    expect(await refused({ rateSteps: [rate(0)] })).toEqual({ rateSteps: 'pumping-test/no-pumping' })
  })

  it('refuses a distance of zero, a missing one, and another one without a reason', async () => {
    expect(await refused(observed({ distanceM: 0 }))).toEqual({
      'observationWells.0.distanceM': 'pumping-test/zero-distance',
    })
    expect(await refused(observed({ distanceM: null }))).toEqual({
      'observationWells.0.distanceM': 'pumping-test/distance-needed',
    })
    expect(await refused(observed({ distanceBasis: 'override', reason: ' ' }))).toEqual({
      'observationWells.0.reason': 'pumping-test/reason-needed',
    })
  })

  it('refuses a distance from the map between wells at one place, and the pumped well as its own observation well', async () => {
    const beside = await createWell(analyst)
    expect(await refused(observed({ wellId: beside, distanceBasis: 'map', distanceM: null }))).toEqual({
      'observationWells.0.distanceM': 'pumping-test/same-place',
    })
    expect(await refused(observed({ wellId: site.pumped }))).toEqual({
      'observationWells.0.wellId': 'pumping-test/same-well',
    })
  })

  it('refuses shares that do not add up, and a unit that does not exist', async () => {
    const second = await makeUnit(tested)
    const units = [site.unitId, second].map((unitId) => ({ unitId, share: 0.4, basis: 'flow-log' as const }))
    expect(await refused({ units })).toEqual({ units: 'pumping-test/shares' })
    expect(await refused({ units: [{ unitId: 999_999, share: 1, basis: 'single-unit' }] })).toEqual({
      units: 'pumping-test/unknown-unit',
    })
  })

  it('refuses a start in the future, one that is no date, and an unknown zone', async () => {
    expect(await refused({ startLocal: '2099-01-01' })).toEqual({ startLocal: 'pumping-test/start-in-future' })
    expect(await refused({ startLocal: '2019-02-30' })).toEqual({ startLocal: 'pumping-test/start-format' })
    expect(await refused({ zone: 'Atlantis/Middle' })).toEqual({ zone: 'pumping-test/unknown-zone' })
  })

  it('refuses an interval below the well, upside down, or from screens that it does not have', async () => {
    const packers = { intervalBasis: 'packers' as const }
    expect(await refused({ ...packers, intervalTopM: 30, intervalBottomM: 90 })).toEqual({
      intervalBottomM: 'pumping-test/interval-too-deep',
    })
    expect(await refused({ ...packers, intervalTopM: 50, intervalBottomM: 40 })).toEqual({
      intervalBottomM: 'pumping-test/interval-order',
    })
    const bare = await createWell(analyst, { screens: [], x: islandMiddle[0] + 0.02 })
    expect(await refused({ wellId: bare })).toEqual({ intervalBasis: 'pumping-test/no-screens' })
  })

  it('refuses to publish for an analyst, who may enter it as internal or private', async () => {
    expect(await refused({ visibility: 'published' })).toEqual({
      visibility: 'visibility/publishing-is-for-stewards',
    })
    for (const visibility of ['internal', 'private'] as const)
      expect((await createTest(analyst, siteInput(site, { visibility }))).visibility).toBe(visibility)
  })

  it('names every missing field at once', async () => {
    const answer = await analyst
      .post('/api/pumping-tests')
      .send({
        ...siteInput(site),
        wellId: null,
        thicknessError: null,
        rateSteps: [{ startS: null, rate: { value: null, unit: null } }],
      })
      .expect(400)
    expect(Object.keys(fieldsOf(answer.body)).sort()).toEqual([
      'rateSteps.0.rate.unit',
      'rateSteps.0.rate.value',
      'rateSteps.0.startS',
      'thicknessError',
      'wellId',
    ])
  })
})

describe('A pumping test keeps what was typed', () => {
  it('keeps HTML and SQL in its conditions as text, and finds nothing by a pattern in the search', async () => {
    const conditions = `<script>alert(1)</script> '); DROP TABLE wells; --`
    const test = await createTest(analyst, siteInput(site, { conditions }))
    expect(test.conditions).toBe(conditions)
    const found = await analyst.get('/api/pumping-tests').query({ text: `%' or '1'='1` }).expect(200)
    expect((found.body as { total: number }).total).toBe(0)
  })

  it('keeps the rate as typed and calculates with SI', async () => {
    const { rateSteps } = await createTest(
      analyst,
      siteInput(site, { rateSteps: [rate(220, 0, 'gpm-us'), rate(0, 3600, 'gpm-us')] }),
    )
    expect(rateSteps.map(({ enteredValue, enteredUnit }) => [enteredValue, enteredUnit])).toEqual([
      [220, 'gpm-us'],
      [0, 'gpm-us'],
    ])
    // NIST SP 811: 1 US gpm = 6.309 020e-5 m³/s.
    expect(rateSteps[0]!.rateM3S / (220 * 6.30902e-5)).toBeCloseTo(1, 6)
  })

  it('takes the interval from the screens that were open at its date', async () => {
    const screens = [
      { topM: 10, bottomM: 20, validFrom: null, validTo: '2010-01-01T00:00:00.000Z' },
      { topM: 30, bottomM: 50, validFrom: '2010-01-01T00:00:00.000Z', validTo: null },
    ]
    const wellId = await createWell(analyst, { screens, x: islandMiddle[0] + 0.03 })
    const old = await createTest(analyst, siteInput(site, { wellId, startLocal: '2005', observationWells: [] }))
    const young = await createTest(analyst, siteInput(site, { wellId, observationWells: [] }))
    expect([old.intervalTopM, old.intervalBottomM, old.startPrecision]).toEqual([10, 20, 'year'])
    expect([young.intervalTopM, young.intervalBottomM]).toEqual([30, 50])
  })

  it('gives a distance from the map the position errors of both wells', async () => {
    const { wells } = await createTest(analyst, siteInput(site, observed({ distanceBasis: 'map', distanceM: null })))
    const well = wells.find(({ role }) => role === 'observation')!
    // 0.001° of longitude at 38.4° S is 87.3 m (WGS 84 radius of the parallel times the angle).
    expect(well.distanceM).toBeCloseTo(87.3, 0)
    expect(well.distanceSdM).toBeCloseTo(Math.hypot(3, 3), 9)
  })
})

describe('Two people edit one test', () => {
  const change = (person: SignedIn, test: PumpingTest, conditions: string) =>
    person
      .put(`/api/pumping-tests/${test.id}`)
      .send({ ...siteInput(site, { conditions }), rowVersion: test.rowVersion })

  it('tells the second one that the first was faster, and changes nothing for the second', async () => {
    const test = await createTest(analyst, siteInput(site))
    await change(analyst, test, 'the first').expect(200)
    const second = await change(steward, test, 'the second').expect(409)
    expect((second.body as Problem).code).toBe('edit/conflict')
    const now = (await analyst.get(`/api/pumping-tests/${test.id}`).expect(200)).body as PumpingTest
    expect(now.conditions).toBe('the first')
    await change(steward, now, 'the second').expect(200)
  })

  it('lets one of two simultaneous edits through', async () => {
    const test = await createTest(analyst, siteInput(site))
    const answers = await Promise.all([change(analyst, test, 'one'), change(steward, test, 'two')])
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409])
  })

  it('refuses the edit of somebody who neither entered it nor is a steward', async () => {
    const test = await createTest(analyst, siteInput(site))
    const answer = await change(other, test, 'not mine').expect(403)
    expect((answer.body as Problem).code).toBe('pumping-test/not-editable')
  })
})

describe('The list of tests', () => {
  it('pages, filters by state and unit, and hides internal tests from readers', async () => {
    const own = await makeSite(tested, analyst)
    await publish(steward, 'wells', own.pumped)
    const ids: number[] = []
    for (const visibility of ['published', 'internal', 'published'] as const)
      ids.push((await createTest(steward, siteInput(own, { visibility }))).id)
    const list = async (person: SignedIn, query: object) =>
      (
        await person
          .get('/api/pumping-tests')
          .query({ unitId: own.unitId, ...query })
          .expect(200)
      ).body as {
        items: { id: number; state: string }[]
        total: number
        next: number | null
      }
    expect(await list(analyst, { limit: 2 })).toMatchObject({ total: 3, next: 2 })
    expect((await list(analyst, { state: 'no-readings' })).total).toBe(3)
    expect((await list(analyst, { state: 'accepted' })).total).toBe(0)
    const reader = await tested.signIn('reader')
    expect((await list(reader, {})).items.map(({ id }) => id).sort()).toEqual([ids[0], ids[2]].sort())
    await reader.get(`/api/pumping-tests/${ids[1]}`).expect(404)
  })
})
