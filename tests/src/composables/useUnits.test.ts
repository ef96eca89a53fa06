import { describe, expect, it } from 'vitest'
import { computed } from 'vue'
import { defaultPreferences } from '#shared/contracts/account.ts'
import { useUnits } from '../../../src/composables/useUnits.ts'
import { usePreferences } from '../../../src/stores/preferences.ts'
import { fakeServer } from '../support/fake-server.ts'
import { runWith } from '../support/mount.ts'
import { makeRegion, makeSession } from '../support/session.ts'

const T = 640 / 86_400

describe('a quantity', () => {
  it('is written in the units of the region until the reader chooses', () => {
    const ofRegion = makeSession({}, { region: makeRegion({ unitSystem: 'us' }) })
    expect(runWith(() => useUnits().quantity(T, 'transmissivity'), ofRegion)).toMatch(/ ft²\/d$/)
  })

  it('is written in the units that the reader chose', () => {
    const session = makeSession({}, { preferences: { ...defaultPreferences, unitSystem: 'metric' } })
    expect(runWith(() => useUnits().quantity(T, 'transmissivity'), session)).toBe('640 m²/d')
  })

  it('follows a switch of units at once', async () => {
    fakeServer({ 'PUT /api/account/preferences': ({ body }) => ({ body }) })
    const { text, preferences } = runWith(() => {
      const units = useUnits()
      return { text: computed(() => units.label('discharge')), preferences: usePreferences() }
    })
    expect(text.value).toBe('L/s')
    await preferences.choose({ unitSystem: 'metric-hourly' })
    expect(text.value).toBe('m³/h')
  })

  it('that is missing is a dash', () => {
    const units = runWith(useUnits)
    expect(units.quantity(null, 'length')).toBe('–')
    expect(units.number(undefined, 'length')).toBe('–')
  })

  it('comes back to SI unchanged', () => {
    const units = runWith(useUnits)
    expect(units.to(units.from(T, 'transmissivity'), 'transmissivity')).toBeCloseTo(T, 15)
  })
})
