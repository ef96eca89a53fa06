import { describe, expect, it } from 'vitest'
import type { Interval } from '#shared/hydraulics/analysis.ts'
import { curveMethod } from '#shared/hydraulics/curve-method.ts'
import { leakyStorage } from '#shared/hydraulics/solutions/leaky-storage.ts'
import { leaky } from '#shared/hydraulics/solutions/leaky.ts'
import { partialPenetration } from '#shared/hydraulics/solutions/partial-penetration.ts'
import reference from '../../reference/leaky-fits.json'
import { makeInputs, makeOptions, makeSeries, relative, valueOf } from './make-inputs.ts'

const interval = ([top_m = NaN, bottom_m = NaN]: number[]): Interval => ({ top_m, bottom_m })

describe.each([leaky, leakyStorage, partialPenetration])('fit of $id', (solution) => {
  const { t, s, parameters, objective, lnCovariance } =
    reference[solution.id as 'leaky' | 'leaky-storage' | 'partial-penetration']
  const included = t.map(() => true)
  const observed = makeSeries({
    distance_m: reference.distance,
    elapsed_s: t,
    drawdown_m: s,
    included,
    screen: interval(reference.observed),
  })
  const pumped = makeSeries({ wellId: 'p', role: 'pumped', elapsed_s: [], screen: interval(reference.pumped) })
  const inputs = makeInputs({
    rates: [{ start_s: 0, rate_m3_s: reference.rate }],
    series: [pumped, observed],
    thickness_m: reference.thickness,
  })

  it('equals scipy curve_fit on noisy synthetic readings, covariance included (fixtures: leaky-fits.py)', () => {
    const result = curveMethod(solution).run(inputs, makeOptions())
    const fitted = solution.unknowns.map(({ id }) => result.extras[`fitted_${id}`] ?? NaN)
    fitted.forEach((value, k) => expect(relative(value, parameters[k] as number)).toBeLessThan(1e-6))
    expect(relative(result.fit.objective, objective)).toBeLessThan(1e-9)
    const [[variance = 0] = []] = lnCovariance
    // White noise: the interval may widen for what cannot be excluded, by no more than half.
    expect((result.T?.logSd ?? 0) * Math.LN10).toBeGreaterThan(0.99 * Math.sqrt(variance))
    expect((result.T?.logSd ?? 0) * Math.LN10).toBeLessThan(1.5 * Math.sqrt(variance))
    expect(valueOf(result.T)).toBe(fitted[0])
  })
})
