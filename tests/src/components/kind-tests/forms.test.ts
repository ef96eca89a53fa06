import { describe, expect, it } from 'vitest'
import { pumpingTestInput, type PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { Well } from '#shared/contracts/wells.ts'
import {
  emptyForm,
  formOf,
  inputOf,
  suggest,
  suggestionsOf,
  type TestForm,
} from '../../../../src/components/pumping-tests/test-form.ts'
import { slugDetailsOf } from '../../../../src/components/slug-tests/slug-form.ts'
import { kindFacts } from '../../../../src/components/pumping-tests/test-facts.ts'

const makeTest = (overrides: Partial<PumpingTest> = {}) =>
  ({
    startLocal: '2019-03-14T09:30:00',
    startPrecision: 'instant',
    zone: 'Etc/GMT+1',
    units: [],
    wells: [],
    series: [],
    rateSteps: [],
    details: null,
    ...overrides,
  }) as unknown as PumpingTest

const makeForm = (overrides: Partial<TestForm>): TestForm => ({
  ...emptyForm('Etc/GMT+1', 'L/s'),
  wellId: 4,
  date: '2019-03-14',
  time: '09:30',
  units: [{ unitId: 2, share: 1, basis: 'single-unit' }],
  ...overrides,
})

const well = {
  id: 4,
  visibility: 'internal',
  casingRadiusM: 0.05,
  wellRadiusM: 0.1,
  staticDepthM: 6.4,
  measuringPointM: 0.4,
  screens: [{ topM: 10, bottomM: 13, validFrom: null, validTo: null }],
  picks: [],
} as unknown as Well

const slugForm = () => {
  const { slug } = suggestionsOf(well, [], false, 'L/s')
  return makeForm({ kind: 'slug', slug: slug! })
}

describe('A slug test as it is typed', () => {
  it('takes radii and screen from its well, the screen counted from the static level', () => {
    expect(slugForm().slug).toMatchObject({
      casingRadiusM: 0.05,
      wellRadiusM: 0.1,
      screenRadiusM: 0.05,
      screenLengthM: 3,
      screenTopM: 4,
    })
  })

  it('is what the contract asks for, without rates and observation wells', () => {
    const observed = { wellId: 5, distanceBasis: 'map' as const, distanceM: null, reason: '', staticLevelM: null }
    const parsed = pumpingTestInput.parse(inputOf({ ...slugForm(), observationWells: [observed] }))
    expect(parsed).toMatchObject({ rateSteps: [], observationWells: [], details: { kind: 'slug', filterPack: null } })
  })

  it('sends a filter pack only where there is one', () => {
    const form = slugForm()
    Object.assign(form.slug, { hasPack: true, packRadiusM: 0.12 })
    expect(pumpingTestInput.parse(inputOf(form)).details).toMatchObject({
      filterPack: { radiusM: 0.12, porosity: 0.25 },
    })
  })

  it('names every field that is missing under its own path', () => {
    const parsed = pumpingTestInput.safeParse(inputOf(makeForm({ kind: 'slug' })))
    expect(parsed.error!.issues.map(({ path }) => path.join('.'))).toEqual([
      'details.casingRadiusM',
      'details.wellRadiusM',
      'details.screenRadiusM',
      'details.screenLengthM',
      'details.screenTopM',
    ])
  })

  it('comes back from the server with a line for each log', () => {
    const repeats = [{ seriesId: 8, label: 'Second', initialM: 0.4, startS: null }]
    const details = { ...slugDetailsOf(slugForm().slug), repeats }
    const series = [7, 8].map((id) => ({ id, fileName: `${id}.csv` }))
    const form = formOf(makeTest({ kind: 'slug', details, series: series as PumpingTest['series'] }))
    expect(form.slug.repeats).toEqual([
      { seriesId: 7, label: '', initialM: null, startS: null },
      { seriesId: 8, label: 'Second', initialM: 0.4, startS: null },
    ])
    expect(inputOf(form).details).toMatchObject({ repeats })
  })

  it('keeps a radius that was typed when another well is chosen', () => {
    const form = makeForm({ kind: 'slug' })
    const first = suggest(form, emptyForm('', 'L/s'), suggestionsOf(well, [], false, 'L/s'))
    expect(form.slug.casingRadiusM).toBe(0.05)
    form.slug.casingRadiusM = 0.04
    suggest(form, first, suggestionsOf({ ...well, casingRadiusM: 0.2 }, [], false, 'L/s'))
    expect(form.slug.casingRadiusM).toBe(0.04)
  })
})

describe('A specific capacity as it is typed', () => {
  const capacity = {
    ...emptyForm('', 'L/s').capacity,
    rate: 6,
    durationS: 28_800,
    drawdownM: 4,
    wellRadiusM: 0.15,
  }

  it('is one rate that stops when the level was read', () => {
    const parsed = pumpingTestInput.parse(inputOf(makeForm({ kind: 'specific-capacity', capacity })))
    expect(parsed.rateSteps).toEqual([
      { startS: 0, rate: { value: 6, unit: 'L/s' } },
      { startS: 28_800, rate: { value: 0, unit: 'L/s' } },
    ])
    expect(parsed.details).toMatchObject({ kind: 'specific-capacity', drawdownM: 4, drawdownSdM: 0.05 })
  })

  it('is the same after it was saved', () => {
    const { details } = pumpingTestInput.parse(inputOf(makeForm({ kind: 'specific-capacity', capacity })))
    const rateSteps = [
      { startS: 0, rateM3S: 0.006, enteredValue: 6, enteredUnit: 'L/s' },
      { startS: 28_800, rateM3S: 0, enteredValue: 0, enteredUnit: 'L/s' },
    ]
    expect(formOf(makeTest({ kind: 'specific-capacity', details: details!, rateSteps })).capacity).toEqual(capacity)
  })
})

describe('What is said of a test', () => {
  it('is its rates, or how often the level was moved', () => {
    const step = { startS: 0, rateM3S: 0.01, enteredValue: 10, enteredUnit: 'L/s' }
    expect(kindFacts(makeTest({ kind: 'step', rateSteps: [step, { ...step, startS: 60, enteredValue: 20 }] }))).toEqual(
      ['2 rates'],
    )
    const series = [{ id: 1 }, { id: 2 }] as PumpingTest['series']
    expect(kindFacts(makeTest({ kind: 'slug', rateSteps: [], series }))).toEqual(['2 repeats'])
    expect(kindFacts(makeTest({ kind: 'reported' }))).toEqual([])
  })
})
