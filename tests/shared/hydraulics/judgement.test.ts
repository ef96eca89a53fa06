import { describe, expect, it } from 'vitest'
import { agreementOf, agreements, recoveryConfirms, type ComparedAnalysis } from '#shared/hydraulics/agreement.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { evidenceFacts } from '#shared/hydraulics/evidence-facts.ts'
import { defaultEvidenceErrors, evidenceOf, type EvidenceFacts } from '#shared/hydraulics/evidence.ts'
import { isRefused, limitFindings } from '#shared/hydraulics/limits.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeTheisSeries } from './make-inputs.ts'

const verdicts = (values: Parameters<typeof limitFindings>[0]) =>
  limitFindings(values).map(({ code, severity }) => `${severity} ${code}`)

describe('limits', () => {
  it.each([
    [{ T: 11 }, ['bad limit-transmissivity']],
    [{ T: 9e-11 }, ['bad limit-transmissivity']],
    [{ T: NaN }, ['bad limit-transmissivity']],
    [{ T: 0.6 }, ['caution unusual-transmissivity']],
    [{ T: 9e-8 }, ['caution unusual-transmissivity']],
    [{ T: 5e-3 }, []],
    [{ S: 0 }, ['bad limit-storage']],
    [{ S: 0.5 }, ['bad limit-storage']],
    [{ S: 6e-3, storageClass: 'elastic' as const }, ['caution unusual-elastic-storage']],
    [{ S: 9e-7, storageClass: 'elastic' as const }, ['caution unusual-elastic-storage']],
    [{ S: 6e-3, storageClass: 'specific-yield' as const }, ['caution unusual-specific-yield']],
    [{ S: 0.2, storageClass: 'specific-yield' as const }, []],
    [{ S: 6e-3, storageClass: 'apparent' as const }, []],
    [{ T: null, S: null }, []],
  ])('judge %j as %j', (values, expected) => {
    expect(verdicts(values)).toEqual(expected)
  })

  it('make a result refused, as when the rate was typed in the wrong unit', () => {
    const series = makeTheisSeries({ T: 5e-3, S: 2e-4 })
    const wrong = makeInputs({ series: [series], rates: [{ start_s: 0, rate_m3_s: 0.01 * 86_400 }] })
    expect(isRefused(analyse('theis', wrong, makeOptions()))).toBe(true)
    expect(isRefused(analyse('theis', makeInputs({ series: [series] }), makeOptions()))).toBe(false)
  })
})

function makeFacts(overrides: Partial<EvidenceFacts> = {}): EvidenceFacts {
  return {
    origin: 'pumping-test',
    aquifer: 'confined',
    observationWell: true,
    recoveryAgrees: false,
    radialFlowShown: true,
    conditionsHold: true,
    storageClass: 'elastic',
    distanceError: 0.01,
    ownLogSdT: 0.01,
    ownLogSdS: 0.02,
    ...overrides,
  }
}

describe('evidence', () => {
  it.each<[Partial<EvidenceFacts>, string, number]>([
    [{}, 'firm', 0.1],
    [{ radialFlowShown: false }, 'fair', 0.2],
    [{ conditionsHold: false }, 'fair', 0.2],
    [{ observationWell: false, recoveryAgrees: true }, 'fair', 0.2],
    [{ observationWell: false }, 'fair', 0.25],
    [{ observationWell: false, aquifer: 'unconfined' }, 'slight', 0.35],
    [{ origin: 'legacy-reviewed' }, 'fair', 0.25],
    [{ origin: 'legacy-number' }, 'slight', 0.4],
    [{ origin: 'specific-capacity' }, 'slight', 0.35],
    [{ origin: 'slug-test' }, 'slight', 0.4],
  ])('of %j is %s with an error of %d', (facts, evidence, error) => {
    expect(evidenceOf(makeFacts(facts))).toMatchObject({ evidence, logErrorT: error })
  })

  it('has the own error of the analysis where that is larger, and the errors an administrator sets', () => {
    expect(evidenceOf(makeFacts({ ownLogSdT: 0.3 })).logErrorT).toBe(0.3)
    expect(evidenceOf(makeFacts(), { ...defaultEvidenceErrors, observationFirm: 0.15 }).logErrorT).toBe(0.15)
  })

  it.each<[Partial<EvidenceFacts>, object]>([
    [{}, { evidence: 'firm', logError: 0.2, usable: true }],
    [{ radialFlowShown: false }, { evidence: 'fair', logError: 0.35, usable: true }],
    [{ storageClass: 'specific-yield' }, { evidence: 'firm', logError: 0.15, usable: true }],
    [
      { storageClass: 'specific-yield', radialFlowShown: false },
      { evidence: 'fair', logError: 0.25, usable: true },
    ],
    [{ distanceError: 0.16 }, { evidence: 'slight', logError: 0.35, usable: true }],
    [{ storageClass: 'apparent' }, { usable: false, reason: 'storage-apparent' }],
    [{ storageClass: 'unclassified' }, { usable: false, reason: 'storage-unclassified' }],
    [{ observationWell: false }, { usable: false, reason: 'storage-pumped-well' }],
    [{ origin: 'slug-test' }, { usable: false, reason: 'storage-slug' }],
  ])('of the storage of %j is %j', (facts, expected) => {
    expect(evidenceOf(makeFacts(facts)).storage).toMatchObject(expected)
  })

  it('says nothing of storage where there is none', () => {
    expect(evidenceOf(makeFacts({ storageClass: null })).storage).toBeNull()
  })

  it('is firm for a clean observation well and fair where the readings end before radial flow', () => {
    const evidence = (to: number) => {
      const inputs = makeInputs({
        series: [makeTheisSeries({ T: 5e-3, S: 2e-4 }, { elapsed_s: logSpaced(80, 10, to) })],
      })
      const result = analyse('theis', inputs, makeOptions())
      return evidenceOf(evidenceFacts(inputs, makeOptions(), result, { recoveryAgrees: false })).evidence
    }
    expect(evidence(DAY)).toBe('firm')
    expect(evidence(150)).toBe('fair')
  })

  it('is fair at best for a leaky aquifer', () => {
    const inputs = makeInputs({ aquifer: 'leaky', series: [makeTheisSeries({ T: 5e-3, S: 2e-4 })] })
    const result = analyse('theis', inputs, makeOptions())
    expect(evidenceFacts(inputs, makeOptions(), result, { recoveryAgrees: true })).toMatchObject({
      conditionsHold: false,
      recoveryAgrees: true,
      observationWell: true,
    })
  })
})

function makeCompared(overrides: Partial<ComparedAnalysis> = {}): ComparedAnalysis {
  const T = { value: 5e-3, low: 4e-3, high: 6e-3, logSd: 0.05, determined: true }
  return { id: '1', label: 'Theis at OB-1', T, wellIds: ['o1'], phase: 'pumping', usesDistances: false, ...overrides }
}

describe('agreement', () => {
  it('is a ratio of T that does not depend on the order of the pair', () => {
    const a = makeCompared()
    const b = makeCompared({ id: '2', T: { ...makeCompared().T, value: 8e-3, low: 7e-3, high: 9e-3 } })
    expect(agreementOf(a, b)).toMatchObject({ ratio: 1.6, code: 'agree-roughly', intervalsMeet: false })
    expect(agreementOf(b, a).ratio).toBe(1.6)
  })

  it('says what a pair shares', () => {
    const a = makeCompared({ usesDistances: true })
    expect(agreementOf(a, makeCompared()).shared).toEqual(['rate', 'same-readings'])
    expect(agreementOf(a, makeCompared({ phase: 'recovery' })).shared).toEqual(['rate', 'same-well'])
    expect(agreementOf(a, makeCompared({ wellIds: ['x'], usesDistances: true })).shared).toEqual([
      'rate',
      'other-well',
      'distances',
    ])
  })

  it('confirms a value by the recovery, unless both look at the same readings of it', () => {
    const pumping = makeCompared()
    const recovery = makeCompared({ phase: 'recovery' })
    const far = makeCompared({ phase: 'recovery', T: { ...pumping.T, value: 2e-2 } })
    expect(recoveryConfirms(pumping, recovery)).toBe(true)
    expect(recoveryConfirms(recovery, pumping)).toBe(false)
    expect(recoveryConfirms(recovery, recovery)).toBe(false)
    expect(recoveryConfirms(pumping, far)).toBe(false)
  })

  it('looks at every pair once', () => {
    const four = ['1', '2', '3', '4'].map((id) => makeCompared({ id }))
    expect(agreements(four).map(({ a, b }) => a + b)).toEqual(['12', '13', '14', '23', '24', '34'])
    expect(agreements([makeCompared()])).toEqual([])
  })
})
