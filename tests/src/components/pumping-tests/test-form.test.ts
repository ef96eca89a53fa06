import { describe, expect, it } from 'vitest'
import { pumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import type { Well } from '#shared/contracts/wells.ts'
import {
  emptyForm,
  inputOf,
  suggest,
  suggestionsOf,
  type TestForm,
} from '../../../../src/components/pumping-tests/test-form.ts'
import { pumpingText, testDate } from '../../../../src/components/pumping-tests/test-facts.ts'

const makeForm = (overrides: Partial<TestForm> = {}): TestForm => ({
  ...emptyForm('Etc/GMT+1', 'L/s'),
  wellId: 4,
  date: '2019-03-14',
  time: '09:30',
  units: [{ unitId: 2, share: 1, basis: 'single-unit' }],
  rateSteps: [{ startS: 0, value: 12, unit: 'L/s' }],
  ...overrides,
})

describe('A test as it is typed', () => {
  it('is what the contract asks for once it is complete', () => {
    const parsed = pumpingTestInput.parse(inputOf(makeForm({ conditions: '  rain  ' })))
    expect(parsed).toMatchObject({ startLocal: '2019-03-14T09:30', conditions: 'rain', thicknessError: 0.1 })
  })

  it('says its start in the precision that is known', () => {
    expect(inputOf(makeForm({ precision: 'day' })).startLocal).toBe('2019-03-14')
    expect(inputOf(makeForm({ precision: 'year', year: '1987' })).startLocal).toBe('1987')
  })

  it('sends no distance for a well whose distance the map gives', () => {
    const well = { wellId: 5, distanceBasis: 'map' as const, distanceM: 30, reason: '', staticLevelM: null }
    expect(inputOf(makeForm({ observationWells: [well] })).observationWells[0]).toMatchObject({
      distanceM: null,
      reason: null,
    })
  })

  it('sends no depths of an interval that follows from the well', () => {
    const typed = { intervalTopM: 30, intervalBottomM: 50 }
    expect(inputOf(makeForm({ ...typed, intervalBasis: 'packers' }))).toMatchObject(typed)
    expect(inputOf(makeForm({ ...typed, intervalBasis: 'screens' }))).toMatchObject({
      intervalTopM: null,
      intervalBottomM: null,
    })
  })

  it('gives a single unit the whole transmissivity', () => {
    expect(inputOf(makeForm({ units: [{ unitId: 2, share: 0.4, basis: 'judgement' }] })).units[0]!.share).toBe(1)
  })
})

describe('What the pumped well suggests', () => {
  const well = {
    visibility: 'published',
    screens: [{ topM: 30, bottomM: 50, validFrom: null, validTo: null }],
    picks: [
      { unitId: 1, unitName: 'Pellow Clay', topM: 5, bottomM: 28, source: 'log' },
      { unitId: 2, unitName: 'Fennick Limestone', topM: 28, bottomM: 62, source: 'log' },
    ],
  } as unknown as Well
  const units = [
    { id: 1, kind: 'aquitard' },
    { id: 2, kind: 'leaky' },
  ]

  it('is the unit that its screens are open to, with its kind and thickness', () => {
    expect(suggestionsOf(well, units, true)).toMatchObject({
      aquifer: 'leaky',
      thicknessM: 34,
      units: [{ unitId: 2, share: 1, basis: 'single-unit' }],
      visibility: 'published',
    })
  })

  it('is nothing about the unit where none is picked, and an unknown interval without screens', () => {
    const {
      slug: _slug,
      capacity: _capacity,
      ...bare
    } = suggestionsOf({ ...well, screens: [], picks: [] }, units, true)
    expect(bare).toEqual({ intervalBasis: 'unknown', visibility: 'published' })
  })

  it('is an internal test of a published well for those who do not publish', () => {
    const seenBy = (visibility: Well['visibility']) => suggestionsOf({ ...well, visibility }, units, false).visibility
    expect(['published', 'internal', 'private'].map((each) => seenBy(each as Well['visibility']))).toEqual([
      'internal',
      'internal',
      'private',
    ])
  })
})

describe('A form that a pumped well fills in', () => {
  const limestone = { thicknessM: 34, aquifer: 'leaky' as const, visibility: 'published' as const }

  it('takes what the well suggests', () => {
    const form = emptyForm('UTC', 'L/s')
    suggest(form, emptyForm('UTC', 'L/s'), limestone)
    expect(form).toMatchObject(limestone)
  })

  it('loses what another well suggested, so that its thickness does not stand in the test of this one', () => {
    const form = emptyForm('UTC', 'L/s')
    const before = suggest(form, emptyForm('UTC', 'L/s'), limestone)
    suggest(form, before, { visibility: 'internal' })
    expect(form).toMatchObject({ thicknessM: null, aquifer: 'confined', visibility: 'internal' })
  })

  it('keeps what somebody chose before the well', () => {
    const form = { ...emptyForm('UTC', 'L/s'), visibility: 'private' as const, thicknessM: 20 }
    suggest(form, emptyForm('UTC', 'L/s'), limestone)
    expect(form).toMatchObject({ visibility: 'private', thicknessM: 20, aquifer: 'leaky' })
  })
})

describe('A test in one line', () => {
  it('names rate and time of pumping', () => {
    const step = (startS: number, value: number) => ({
      startS,
      rateM3S: value / 1000,
      enteredValue: value,
      enteredUnit: 'L/s',
    })
    expect(pumpingText([step(0, 12), step(86_400, 0)])).toBe('12 L/s for 1\u202f440 min')
    expect(pumpingText([step(0, 12)])).toBe('12 L/s')
    expect(pumpingText([step(0, 12), step(600, 14), step(1_200, 0)])).toBe('2 rates for 20 min')
  })

  it('says the date as its own place counts it, in the precision it is known', () => {
    expect(testDate({ startLocal: '2019-03-14T23:30:00', startPrecision: 'instant' })).toBe('14 March 2019')
    expect(testDate({ startLocal: '1987', startPrecision: 'year' })).toBe('1987')
  })
})
