import { describe, expect, it } from 'vitest'
import { unitSystemById } from '#shared/quantities/systems.ts'
import { formFields, formShow } from '../../../../src/components/pumping-tests/form-differences.ts'
import { emptyForm, type TestForm } from '../../../../src/components/pumping-tests/test-form.ts'

const reader = {
  units: unitSystemById('us'),
  wellName: (id: number) => ({ 4: 'V-0004', 5: 'V-0005' })[id] ?? 'another well',
  unitName: () => 'Fennick Limestone',
}
const form: TestForm = {
  ...emptyForm('Etc/GMT+1', 'gpm'),
  wellId: 4,
  thicknessM: 30.48,
  units: [{ unitId: 2, share: 1, basis: 'single-unit' }],
  observationWells: [
    { wellId: 5, distanceBasis: 'measured', distanceM: 15.24, reason: '', staticLevelM: null },
    { wellId: 9, distanceBasis: 'map', distanceM: null, reason: '', staticLevelM: null },
  ],
}
const said = <Field extends keyof TestForm>(field: Field) => {
  const [label, text] = formShow(reader)[field]
  return `${label}: ${text(form[field])}`
}

describe('Two versions of a test beside each other', () => {
  it('name wells and aquifer units, and tell lengths in the unit of the reader', () => {
    expect(said('wellId')).toBe('Pumped well: V-0004')
    expect(said('thicknessM')).toBe('Thickness: 100 ft')
    expect(said('units')).toBe('Aquifer units: Fennick Limestone 1')
    expect(said('observationWells')).toBe('Observation wells: V-0005, measured 50 ft; another well, from the map')
  })

  it('are told apart in every field of the form', () => {
    const show = formShow(reader)
    expect([...formFields].sort()).toEqual(Object.keys(show).sort())
    for (const field of formFields) expect(said(field)).toMatch(/^[A-Z].*: /)
  })
})
