import { describe, expect, it } from 'vitest'
import { curveMethod } from '#shared/hydraulics/curve-method.ts'
import { leaky } from '#shared/hydraulics/solutions/leaky.ts'
import { theis } from '#shared/hydraulics/theis.ts'
import reference from '../../reference/robust-fits.json'
import { makeNoise } from '../numerics/make-noise.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeSeries, makeTheisSeries, relative } from './make-inputs.ts'

const cases = [
  ['theis', theis, reference.theis],
  ['theis of logarithms', theis, reference['theis-log']],
  ['leaky', leaky, reference.leaky],
] as const

describe('A fit that weighs readings far off less', () => {
  it.each(cases)(
    "equals scipy's least_squares with Huber's loss: %s (fixtures: robust-fits.py)",
    (_, solution, fit) => {
      const inputs = makeInputs({
        rates: [{ start_s: 0, rate_m3_s: reference.rate }],
        series: [
          makeSeries({
            distance_m: reference.distance,
            elapsed_s: fit.t,
            drawdown_m: fit.s,
            included: fit.t.map(() => true),
          }),
        ],
      })
      const objective = fit.logarithmic ? 'log-drawdown' : 'drawdown'
      const run = (weighting: 'equal' | 'huber') =>
        curveMethod(solution).run(inputs, makeOptions({ objective, weighting }))
      const [plain, robust] = [run('equal'), run('huber')]
      solution.unknowns.forEach(({ id }, k) => {
        expect(relative(plain.extras[`fitted_${id}`] ?? NaN, fit.plain[k] as number)).toBeLessThan(1e-5)
        expect(relative(robust.extras[`fitted_${id}`] ?? NaN, fit.parameters[k] as number)).toBeLessThan(1e-5)
      })
      expect(relative(robust.fit.objective, fit.objective)).toBeLessThan(1e-6)
      expect(robust.fit.weighedLess).toBe(fit.beyond)
      expect(robust.findings).toContainEqual({
        code: 'readings-weighed-less',
        severity: 'note',
        params: { count: fit.beyond, n: fit.t.length },
      })
      expect(plain.findings.map(({ code }) => code)).not.toContain('readings-weighed-less')
    },
  )

  it('keeps its interval about the truth where six readings in sixty are a tenth of a metre off', () => {
    const truth = { T: 5e-3, S: 2e-4 }
    const elapsed_s = logSpaced(60, 60, DAY)
    const held = (weighting: 'equal' | 'huber') =>
      Array.from({ length: 60 }, (_, seed) => {
        const noise = makeNoise(seed + 1, elapsed_s.length).map((value, i) => 0.005 * value + (i % 10 === 7 ? 0.1 : 0))
        const inputs = makeInputs({ series: [makeTheisSeries(truth, { elapsed_s, noise })] })
        const { T } = curveMethod(theis).run(inputs, makeOptions({ weighting }))
        return { holds: T !== null && T.low <= truth.T && truth.T <= T.high, width: Math.log((T?.high ?? NaN) / (T?.low ?? NaN)) } // prettier-ignore
      })
    const [equal, huber] = [held('equal'), held('huber')]
    expect(huber.filter(({ holds }) => holds).length).toBeGreaterThanOrEqual(54)
    const total = (found: { width: number }[]) => found.reduce((sum, { width }) => sum + width, 0)
    expect(total(huber)).toBeLessThan(0.5 * total(equal))
  })

  it('is the plain fit where readings are exact', () => {
    const inputs = makeInputs({ series: [makeTheisSeries({ T: 5e-3, S: 2e-4 })] })
    const { T } = curveMethod(theis).run(inputs, makeOptions({ weighting: 'huber' }))
    expect(relative(T?.value ?? NaN, 5e-3)).toBeLessThan(1e-9)
  })
})
