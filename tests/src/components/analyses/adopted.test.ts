import { describe, expect, it } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import { whatWasAdopted } from '../../../../src/components/analyses/adopted.ts'

const adoption: Analysis['adoption'] = {
  evidence: 'fair',
  log10ErrorT: 0.25,
  log10ErrorS: null,
  storageUsable: false,
  reasons: [{ code: 'single-well', severity: 'note', params: {} }],
}
const makeAnalysis = (state: Analysis['state']) => ({ state, adoption }) as Analysis

describe('What was adopted', () => {
  it.each(['accepted', 'withdrawn'] as const)('is told of an analysis that is %s', (state) => {
    expect(whatWasAdopted(makeAnalysis(state))).toBe(adoption)
  })

  it.each(['draft', 'submitted', 'returned'] as const)('is nothing yet of one that is %s', (state) => {
    expect(whatWasAdopted(makeAnalysis(state))).toBeNull()
  })

  it('is nothing where no analysis is open', () => {
    expect(whatWasAdopted(null)).toBeNull()
  })
})
