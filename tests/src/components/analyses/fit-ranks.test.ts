import { describe, expect, it } from 'vitest'
import type { AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import type { MethodId } from '#shared/hydraulics/catalogue.ts'
import { fitRanks } from '../../../../src/components/analyses/fit-ranks.ts'
import { makeFit, makeTestInputs } from '../../../shared/charts/make-plot.ts'

const inputs = makeTestInputs({ noise: 0.004 })
const makeItem = (key: string, method: MethodId, options: Partial<AnalysisOptions> = {}) => {
  const fit = makeFit(method, options, inputs)
  return { key, method, options: fit.options, result: fit.result }
}

describe('AICc of analyses', () => {
  it('prefers the simpler of two curves that fit alike, by what an unknown costs', () => {
    const ranks = fitRanks([makeItem('confined', 'theis'), makeItem('leaky', 'leaky')])
    expect(ranks.get('confined')).toEqual({ difference: 0, of: 2 })
    const { difference } = ranks.get('leaky')!
    expect(difference).toBeGreaterThan(1)
    expect(difference).toBeLessThan(4)
  })

  it('does not depend on the unit of the residuals', () => {
    const items = [makeItem('confined', 'theis'), makeItem('leaky', 'leaky')]
    const scaled = items.map((item) => ({
      ...item,
      result: { ...item.result, fit: { ...item.result.fit, objective: item.result.fit.objective * 1e6 } },
    }))
    expect(fitRanks(scaled).get('leaky')!.difference).toBeCloseTo(fitRanks(items).get('leaky')!.difference, 9)
  })

  it('compares nothing with other readings, another objective, or a straight line', () => {
    const ranks = fitRanks([
      makeItem('all', 'theis'),
      makeItem('late', 'theis', { window: { from_s: 600, to_s: 86_400 } }),
      makeItem('logarithms', 'theis', { objective: 'log-drawdown' }),
      makeItem('line', 'cooper-jacob'),
    ])
    expect([...ranks].map(([key, { of }]) => [key, of])).toEqual([
      ['all', 1],
      ['late', 1],
      ['logarithms', 1],
    ])
  })
})
