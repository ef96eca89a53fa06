import { describe, expect, it } from 'vitest'
import type { AdoptedValue } from '#shared/contracts/adopted-values.ts'
import { yearOf } from '../../../../src/components/adopted-values/filter-items.ts'
import { factorText, intervalText, marksOf, valueText } from '../../../../src/components/adopted-values/value-texts.ts'
import { useUnits } from '../../../../src/composables/useUnits.ts'
import { runWith } from '../../support/mount.ts'
import { makeAdoptedValue } from './make.ts'

const texts = (value: AdoptedValue) =>
  runWith(() =>
    [valueText(useUnits(), value), intervalText(useUnits(), value)].map((text) => text.replaceAll('\u202f', ' ')),
  )

describe('a value in words', () => {
  it('carries the unit of its quantity, and none for storage', () => {
    expect(texts(makeAdoptedValue())).toEqual(['86.4 m²/d', '34.4 to 217 m²/d'])
    expect(texts(makeAdoptedValue({ quantity: 'K', value: 1e-4, low: 5e-5, high: 2e-4 }))[0]).toBe('8.64 m/d')
    expect(texts(makeAdoptedValue({ quantity: 'S', storageClass: 'specific-yield', value: 0.15 }))[0]).toBe('0.150')
  })

  it('tells the error of the logarithm as the factor it stands for', () => {
    expect(factorText({ log10Error: Math.log10(2.5) })).toBe('×\u202f2.5')
  })
})

describe('marks beside a value', () => {
  const words = (overrides: Partial<AdoptedValue>) => marksOf(makeAdoptedValue(overrides)).map(({ word }) => word)

  it('are none for a plain current value', () => {
    expect(words({})).toEqual([])
  })

  it('say what a reader must know, the gravest first', () => {
    expect(words({ validTo: '2026-01-01T00:00:00.000Z', inputsChanged: true, composite: true, usable: false })).toEqual(
      ['Not current', 'Inputs changed', 'Composite', 'Not used'],
    )
  })
})

describe('a typed year', () => {
  it.each([
    ['1987', 1987],
    [' 2024 ', 2024],
    ['87', null],
    ['1700', null],
    ['year', null],
    ['', null],
  ])('%j is %s', (text, year) => {
    expect(yearOf(text)).toBe(year)
  })
})
