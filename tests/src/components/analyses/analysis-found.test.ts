import { describe, expect, it } from 'vitest'
import type { OtherEstimate } from '#shared/hydraulics/analysis.ts'
import AnalysisFound from '../../../../src/components/analyses/AnalysisFound.vue'
import { makeFit } from '../../../shared/charts/make-plot.ts'
import { mountWith } from '../../support/mount.ts'

async function rowsOf(others: OtherEstimate[]) {
  const found = await mountWith(AnalysisFound, {
    props: {
      method: 'leaky',
      options: { wellIds: ['o1'], window: null, boundaries: [{ kind: 'barrier', distance_m: null, bearing_deg: 0 }] },
      result: { ...makeFit('theis').result, others },
    },
  })
  return found
    .findAll('dl > div')
    .map((row) => ['dt', 'strong', '.interval'].map((part) => row.find(part).text().replace(/\s/g, ' ')))
}

describe('What an analysis found', () => {
  it('shows what was found beside T and S, in the figures that its interval leaves', async () => {
    const rows = await rowsOf([
      { id: 'B', value: 212.34, low: 120, high: 360, determined: true },
      { id: 'boundary_1', value: 431.2, low: 420, high: 443, determined: true },
    ])
    expect(rows).toContainEqual(['B', '210 m', '120 to 360'])
    expect(rows).toContainEqual(['barrier', '431 m', '420 to 443'])
  })

  it('says of what the readings leave open that it is not determined', async () => {
    const rows = await rowsOf([
      { id: 'B', value: 2000, low: 1e-20, high: 1e20, determined: false },
      { id: 'boundary_1', value: 400, low: 50, high: 3200, determined: false },
    ])
    expect(rows).toContainEqual(['B', '2 000 m', 'not determined'])
    expect(rows).toContainEqual(['barrier', '400 m', 'not determined: 50 to 3 000'])
  })
})
