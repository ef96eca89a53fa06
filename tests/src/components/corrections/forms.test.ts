import { describe, expect, it } from 'vitest'
import { correctionInput, type CorrectionRecord } from '#shared/contracts/corrections.ts'
import { otherWellInput, type OtherWellRecord } from '#shared/contracts/other-wells.ts'
import { inspectLog } from '#shared/readings/inspect.ts'
import { causesOf, formOf, newForm, settingsOf } from '../../../../src/components/corrections/correction-form.ts'
import {
  newOtherWell,
  otherWellForm,
  otherWellInputOf,
} from '../../../../src/components/corrections/other-well-form.ts'
import { outsideFormOf, outsideMappingOf } from '../../../../src/components/corrections/outside-form.ts'
import { makeOutside, makeRecord } from './make.ts'

function inspected(text: string) {
  const found = inspectLog(text)
  if (!found.ok) throw new Error(found.code)
  return found
}

describe('the form of a correction', () => {
  it('begins with what the series at hand can correct, and with the trend where there is none', () => {
    const river = makeOutside({ id: 4, quantity: 'river-stage' })
    expect(newForm([river])).toMatchObject({ kind: 'river', seriesId: 4, given: false })
    expect(newForm([])).toMatchObject({ kind: 'trend', seriesId: null })
    expect(causesOf('barometric', [river])).toEqual([])
  })

  it.each<[string, CorrectionRecord['settings']]>([
    ['a learned trend', { version: 1, kind: 'trend', slopeMPerS: null }],
    ['a given trend', { version: 1, kind: 'trend', slopeMPerS: 1e-8 }],
    ['tides', { version: 1, kind: 'tides' }],
    [
      'a learned efficiency',
      {
        version: 1,
        kind: 'barometric',
        seriesId: 2,
        efficiency: { from: 'readings', longestLagS: 7200, lagStepS: 600 },
      },
    ],
    [
      'a given efficiency',
      { version: 1, kind: 'gauge', seriesId: 2, efficiency: { from: 'given', value: 0.4, lagS: 0 } },
    ],
  ])('gives %s back as it was, as the server takes it', (_, settings) => {
    const sent = settingsOf(formOf(makeRecord({ settings })))
    expect(sent).toEqual(settings)
    expect(correctionInput.safeParse({ settings: sent, wellIds: null }).success).toBe(true)
  })

  it('waits for figures that are to be given, and for the series', () => {
    const form = newForm([makeOutside()])
    expect(settingsOf({ ...form, given: true })).toBeNull()
    expect(settingsOf({ ...form, given: true, efficiency: 0.3 })).not.toBeNull()
    expect(settingsOf({ ...form, seriesId: null })).toBeNull()
    expect(settingsOf({ ...form, kind: 'trend', given: true })).toBeNull()
  })
})

describe('how a series from outside is to be read', () => {
  it('is found in a file of many columns by name and unit', () => {
    const found = inspected(
      'time (min),temp (°C),baro (hPa),batt\n0,9.1,1013.2,3.6\n10,9.2,1013.1,3.6\n20,9.3,1013.0,3.6',
    )
    const form = outsideFormOf(found, 'air-pressure')
    expect(form).toMatchObject({ valueColumn: 2, valueUnit: 'hPa' })
    expect(outsideMappingOf(form, 'air-pressure', found)).toMatchObject({
      value: { column: 2, quantity: 'air-pressure', unit: 'hPa' },
    })
  })

  it('waits for the column and the unit that the file does not name', () => {
    const found = inspected('t;a;b\n0;1;2\n1;2;3\n2;4;5')
    const form = outsideFormOf(found, 'river-stage')
    expect([form.valueColumn, form.valueUnit]).toEqual([null, null])
    expect(outsideMappingOf(form, 'river-stage', found)).toBeNull()
    const answered = { ...form, timeUnit: 'h' as const, valueColumn: 2, valueUnit: 'cm', decimalMark: '.' as const }
    expect(outsideMappingOf(answered, 'river-stage', found)).toMatchObject({ value: { unit: 'cm' } })
    expect(outsideMappingOf({ ...answered, valueUnit: 'kPa' }, 'river-stage', found)).toBeNull()
  })

  it('takes the only column of numbers that is no time', () => {
    const found = inspected('date,time,x\n2019-03-14,10:00,12.1\n2019-03-14,11:00,12.2\n2019-03-14,12:00,12.4')
    expect(outsideFormOf(found, 'tide-gauge').valueColumn).toBe(2)
  })
})

describe('the form of another pumping well', () => {
  const made: OtherWellRecord = {
    id: 1,
    label: 'Dairy',
    place: { kind: 'distance', distanceM: 400, bearingDeg: 90 },
    rateSteps: [{ startS: -3600, rate: { value: 18, unit: 'm3/h' } }],
    fitted: true,
    active: false,
    distanceM: 400,
    bearingDeg: 90,
    by: 'Analyst',
    changedAt: '2026-01-01T00:00:00.000Z',
    rowVersion: 1,
  }

  it('gives a well back as it was, as the server takes it', () => {
    const sent = otherWellInputOf(otherWellForm(made), made.active)
    const { label, place, rateSteps, fitted, active } = made
    expect(sent).toEqual({ label, place, rateSteps, fitted, active })
    expect(otherWellInput.safeParse(sent).success).toBe(true)
  })

  it('waits for place and rates', () => {
    const form = newOtherWell('L/s')
    expect(otherWellInputOf({ ...form, wellId: 3 })).toBeNull()
    const rates = [{ startS: 0, value: 5, unit: 'L/s' }]
    expect(otherWellInputOf({ ...form, rates })).toBeNull()
    expect(otherWellInputOf({ ...form, wellId: 3, rates })).toMatchObject({
      label: null,
      place: { kind: 'well', wellId: 3 },
    })
  })
})
