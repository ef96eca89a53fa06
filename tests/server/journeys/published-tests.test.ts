import { readFileSync } from 'node:fs'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { AdoptedValueList } from '#shared/contracts/adopted-values.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import { fromSI } from '#shared/quantities/units.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import {
  createWell,
  islandMiddle,
  makeMapping,
  makeRegion,
  makeTestInput,
  makeUnit,
  saveAnalysis,
  upload,
} from '../../support/domain.ts'

const file = (name: string) => readFileSync(new URL(`../../reference/${name}`, import.meta.url))
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

interface Published {
  rate: { value: number; unit: string }
  distanceM: number
  lengthUnit: string
  file: string
}

/** A handbook's test as a person would enter it: two wells, one test, one raw file. */
async function enter({ rate, distanceM, lengthUnit, file: name }: Published): Promise<PumpingTest> {
  const pumped = await createWell(analyst)
  const observation = await createWell(analyst, { x: islandMiddle[0] + 0.001, kind: 'piezometer' })
  const input = makeTestInput({
    wellId: pumped,
    units: [{ unitId, share: 1, basis: 'single-unit' }],
    rateSteps: [{ startS: 0, rate }],
    observationWells: [{ wellId: observation, distanceBasis: 'measured', distanceM, reason: null, staticLevelM: null }],
  })
  const { id } = (await analyst.post('/api/pumping-tests').send(input).expect(201)).body as { id: number }
  const test = (await analyst.get(`/api/pumping-tests/${id}`).expect(200)).body as PumpingTest
  const well = test.wells.find(({ role }) => role === 'observation')!
  const mapping = makeMapping({ firstDataRow: 4, value: { column: 1, quantity: 'drawdown', unit: lengthUnit } })
  await upload(analyst, id, well.id, file(name), mapping).expect(201)
  return test
}

const korendijk: Published = {
  rate: { value: 788, unit: 'm3/d' },
  distanceM: 30,
  lengthUnit: 'm',
  file: 'oude-korendijk.csv',
}
const gridley: Published = {
  rate: { value: 220, unit: 'gpm-us' },
  distanceM: 824 * 0.3048,
  lengthUnit: 'ft',
  file: 'gridley.csv',
}

describe('Oude Korendijk through the API (Kruseman & de Ridder, ILRI Publication 47; readings from memory)', () => {
  it('gives by least squares over all readings what scipy gives', async () => {
    const test = await enter(korendijk)
    const answer = await saveAnalysis(analyst, test.id, 'theis', { readingsPerCycle: null })
    expect(answer.status).toBe(201)
    const { result } = answer.body as Analysis
    expect(fromSI(result.T!.value, 'm2/d')).toBeCloseTo(480, 0)
    expect(result.S!.value).toBeCloseTo(1.13e-4, 6)
  })

  it('gives by a line from 1.4 to 18 minutes what the handbook reads by hand, though it begins at u about 0.1', async () => {
    const test = await enter(korendijk)
    const window = { from_s: 1.4 * 60 - 1, to_s: 18 * 60 + 1 }
    const answer = await saveAnalysis(analyst, test.id, 'cooper-jacob', { window, readingsPerCycle: null })
    const { result } = answer.body as Analysis
    expect(fromSI(result.T!.value, 'm2/d')).toBeCloseTo(391, 0)
    expect(result.S!.value).toBeCloseTo(1.64e-4, 6)
    expect(result.findings.map(({ code }) => code)).toContain('u-large')
  })
})

describe('Gridley through the API (Walton 1962, Illinois State Water Survey Bulletin 49; readings from memory)', () => {
  it('gives by least squares what scipy gives, 2 % below the published type-curve match', async () => {
    const test = await enter(gridley)
    const { result } = (await saveAnalysis(analyst, test.id, 'theis', { readingsPerCycle: null })).body as Analysis
    expect(fromSI(result.T!.value, 'gpd-us/ft')).toBeGreaterThan(9_900)
    expect(fromSI(result.T!.value, 'gpd-us/ft')).toBeLessThan(9_918)
    expect(result.S!.value).toBeCloseTo(2.1e-5, 6)
  })

  it('reaches the regional table through submission and review, and leads back to its readings', async () => {
    const test = await enter(gridley)
    const saved = (await saveAnalysis(analyst, test.id, 'theis')).body as Analysis
    const submission = { rowVersion: saved.rowVersion, rationale: 'The curve follows all readings.', confirmed: [] }
    const submitted = (await analyst.post(`/api/analyses/${saved.id}/submission`).send(submission).expect(200))
      .body as Analysis
    expect(submitted.state).toBe('submitted')

    const decision = { rowVersion: submitted.rowVersion, decision: 'accepted', comment: null }
    await reviewer.post(`/api/analyses/${saved.id}/review`).send(decision).expect(200)

    const table = (await reviewer.get(`/api/adopted-values?wellId=${test.wellId}`).expect(200)).body as AdoptedValueList
    const transmissivity = table.items.find(({ quantity }) => quantity === 'T')!
    expect(transmissivity.value).toBeCloseTo(saved.result.T!.value, 12)
    expect(transmissivity).toMatchObject({
      pumpingTestId: test.id,
      analysisId: saved.id,
      method: 'theis',
      thicknessBasis: 'aquifer',
    })
    expect(table.statistics.find(({ quantity }) => quantity === 'T')).toMatchObject({ n: 1 })
  })
})
