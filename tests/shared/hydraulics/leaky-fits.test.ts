import { describe, expect, it } from 'vitest'
import type { Interval } from '#shared/hydraulics/analysis.ts'
import { curveMethod } from '#shared/hydraulics/curve-method.ts'
import { leakyStorage } from '#shared/hydraulics/solutions/leaky-storage.ts'
import { curveProblem } from '#shared/hydraulics/curve-problem.ts'
import { leaky, leakyDrawdown } from '#shared/hydraulics/solutions/leaky.ts'
import { partialPenetration } from '#shared/hydraulics/solutions/partial-penetration.ts'
import { levenbergMarquardt } from '#shared/numerics/levenberg-marquardt.ts'
import reference from '../../reference/leaky-fits.json'
import { makePlace } from '../../support/place.ts'
import { makeNoise } from '../numerics/make-noise.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeSeries, relative, valueOf } from './make-inputs.ts'

const interval = ([top_m = NaN, bottom_m = NaN]: number[]): Interval => ({ top_m, bottom_m })

describe('A search for leakage from one start', () => {
  const truth = [5e-3, 2e-4, 200] as const
  const elapsed_s = logSpaced(40, 60, DAY)
  const noise = makeNoise(1, elapsed_s.length)
  const drawdown_m = elapsed_s.map((t, i) => leakyDrawdown(0.01, truth, 50, t) + 0.005 * (noise[i] as number))
  const readings = [{ place: makePlace({ distance_m: 50 }), elapsed_s, drawdown_m }]
  const problem = curveProblem(leaky, readings, [{ start_s: 0, change_m3_s: 0.01 }], false)
  const factors = [0.1, 1, 10]
  const starts = factors.flatMap((T) => factors.flatMap((S) => factors.map((B) => [T, S, B])))

  it('ends at the least squares from ten times off in T, S and B, up or down', () => {
    const best = levenbergMarquardt(problem, { starts: [[...truth]] })
    expect(relative(best.parameters[0] as number, truth[0])).toBeLessThan(0.05)
    for (const start of starts) {
      const { objective } = levenbergMarquardt(problem, { starts: [start.map((factor, k) => factor * truth[k]!)] })
      expect(relative(objective, best.objective)).toBeLessThan(1e-9)
    }
  })
})

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
