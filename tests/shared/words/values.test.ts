import { describe, expect, it } from 'vitest'
import { methods } from '#shared/hydraulics/catalogue.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import { cautions, estimateCautions } from '#shared/words/cautions.ts'
import { methodLabel } from '#shared/words/methods.ts'
import { coverageText, scatterText, variogramText } from '#shared/words/models.ts'
import { quantityDimension, quantityName, quantitySymbol, storageClasses } from '#shared/words/values.ts'

describe('names of values', () => {
  it('tell storage by its class', () => {
    const names = Object.keys(storageClasses).map((storageClass) =>
      quantityName({ quantity: 'S', storageClass: storageClass as keyof typeof storageClasses }),
    )
    expect(new Set(names).size).toBe(4)
    expect(quantitySymbol({ quantity: 'S', storageClass: 'specific-yield' })).toBe('Sy')
  })

  it('are the parameter’s own for T and K', () => {
    expect(quantityName({ quantity: 'T', storageClass: null })).toBe('Transmissivity')
    expect(quantitySymbol({ quantity: 'K', storageClass: null })).toBe('K')
    expect(quantityDimension({ quantity: 'K' })).toBe('conductivity')
  })

  it('call storage of unknown class unclassified', () => {
    expect(quantityName({ quantity: 'S', storageClass: null })).toBe('Storativity, unclassified')
  })
})

describe('names of methods', () => {
  it('are those of the catalogue', () => {
    for (const { id, label } of Object.values(methods)) expect(methodLabel(id)).toBe(label)
    expect(methodLabel('reported')).toBe('Reported value')
  })
})

describe('how a model fared', () => {
  it('is a share of many values and a count of few', () => {
    expect(coverageText(95, { inside: 57, n: 61, meanWidth: Math.log10(5.2) })).toBe(
      'The 95 % interval covered 93 % of 61 left-out tests; its mean width is a factor of 5.2.',
    )
    expect(coverageText(95, { inside: 11, n: 12, meanWidth: 1 })).toBe(
      'The 95 % interval covered 11 of 12 left-out tests; its mean width is a factor of 10.',
    )
  })

  it('names bias by its direction: estimates above the tests are high', () => {
    // The error is observed less predicted.
    expect(scatterText({ meanError: -0.1, rmse: 0.3 })).toContain('high by a factor of 1.3 on average')
    expect(scatterText({ meanError: 0.1, rmse: 0.3 })).toContain('low by a factor of 1.3 on average')
    expect(scatterText({ meanError: 0.002, rmse: 0.3 })).toContain('neither high nor low')
  })

  it('tells the variogram with its whole sill, in the reader’s lengths', () => {
    const variogram = { model: 'spherical', nugget: 0.01, partialSill: 0.05, rangeM: 4_100 }
    expect(variogramText(variogram, unitSystemById('metric'))).toBe(
      'Spherical variogram: nugget 0.01, sill 0.06 (squared log10), practical range 4.1 km.',
    )
    expect(variogramText(variogram, unitSystemById('us'))).toMatch(/range 13.000 ft\.$/)
  })
})

describe('cautions', () => {
  it('all stand beside an estimate, as whole plain sentences', () => {
    expect([...estimateCautions].sort()).toEqual(Object.keys(cautions).sort())
    for (const sentence of Object.values(cautions)) expect(sentence).toMatch(/^[A-Z][^!]*\.$/)
  })
})
