import { describe, expect, it } from 'vitest'
import { agreementOf } from '#shared/hydraulics/agreement.ts'
import { agreementText } from '#shared/words/agreement.ts'

const estimate = (value: number) => ({ value, low: 0.9 * value, high: 1.1 * value, logSd: 0.02, determined: true })

describe('sentence of agreement', () => {
  it('gives the ratio, whether intervals meet, and what the pair shares', () => {
    const theis = {
      id: '1',
      label: 'Theis at OB-1',
      T: estimate(5e-3),
      wellIds: ['o1'],
      phase: 'pumping' as const,
      usesDistances: false,
    }
    const recovery = { ...theis, id: '2', label: 'Recovery at OB-1', T: estimate(5.5e-3), phase: 'recovery' as const }
    expect(agreementText(agreementOf(theis, recovery))).toBe(
      'Theis at OB-1 and Recovery at OB-1 agree: transmissivity differs by a factor of 1.10, and their intervals meet. ' +
        'Both use the same well and rate but different readings, so they test the drawdowns, not the rate.',
    )
    const far = { ...theis, id: '3', label: 'Line at OB-2', T: estimate(2e-2), wellIds: ['o2'] }
    expect(agreementText(agreementOf(theis, far))).toMatch(
      /disagree: .* factor of 4\.00, and their intervals do not meet/,
    )
  })
})
