import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { curveMethod } from '#shared/hydraulics/curve-method.ts'
import {
  aquitardStorageProduct,
  leakyStorage,
  leakyStorageDrawdown,
  leakyStorageRespond,
} from '#shared/hydraulics/solutions/leaky-storage.ts'
import { leakanceOf, leaky, leakyDrawdown, leakyRespond } from '#shared/hydraulics/solutions/leaky.ts'
import { theis, theisDrawdown } from '#shared/hydraulics/theis.ts'
import { besselK0 } from '#shared/numerics/bessel.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeSeries, relative, valueOf } from './make-inputs.ts'
import { readingsOf, withDrawdown } from './make-readings.ts'

const logarithmic = (min: number, max: number) =>
  fc.double({ min: Math.log(min), max: Math.log(max), noNaN: true }).map(Math.exp)
const [T, S, distance, time] = [
  logarithmic(1e-4, 0.05),
  logarithmic(1e-5, 1e-2),
  logarithmic(5, 300),
  logarithmic(60, 1e6),
]
const ratio = logarithmic(0.01, 3)

const kinds = [
  { name: 'without storage', solution: leaky, respond: leakyRespond, drawdown: leakyDrawdown },
  { name: 'with storage', solution: leakyStorage, respond: leakyStorageRespond, drawdown: leakyStorageDrawdown },
] as const

describe.each(kinds)('leaky response, aquitard $name', ({ solution, respond, drawdown }) => {
  it('has the derivatives by ln T, ln S and the aquitard that central differences show', () => {
    fc.assert(
      fc.property(T, S, distance, time, ratio, (t, s, r, at, rho) => {
        fc.pre((r * r * s) / (4 * t * at) < 5)
        const parameters = [t, s, r / rho]
        const out = new Float64Array(4)
        respond(parameters, { distance_m: r })(at, out)
        const h = 1e-3
        const moved = (k: number, by: number) => {
          const [a = NaN, b = NaN, c = NaN] = parameters.map((value, i) => (i === k ? value * Math.exp(by) : value))
          return drawdown(1, [a, b, c], r, at)
        }
        const scale = [...out].reduce((sum, value) => sum + Math.abs(value), 0)
        expect(relative(out[0] as number, drawdown(1, [t, s, r / rho], r, at))).toBeLessThan(1e-14)
        for (const k of [0, 1, 2]) {
          const slope = (moved(k, h) - moved(k, -h)) / (2 * h)
          expect(Math.abs(slope - (out[k + 1] as number))).toBeLessThan(1e-5 * scale)
        }
      }),
    )
  })

  it('scales with the rate and 1/T at one S/T, and with lengths and times together', () => {
    fc.assert(
      fc.property(T, S, distance, time, ratio, (t, s, r, at, rho) => {
        const here = drawdown(0.01, [t, s, r / rho], r, at)
        fc.pre(here > 1e-100)
        expect(relative(drawdown(0.03, [3 * t, 3 * s, r / rho], r, at), here)).toBeLessThan(1e-9)
        expect(relative(drawdown(0.01, [t, s, (2 * r) / rho], 2 * r, 4 * at), here)).toBeLessThan(1e-9)
      }),
    )
  })

  it('is the confined one where the aquitard is far from mattering, and less where it is not', () => {
    fc.assert(
      fc.property(T, S, distance, time, (t, s, r, at) => {
        fc.pre((r * r * s) / (4 * t * at) < 20)
        const confined = theisDrawdown(0.01, t, s, r, at)
        expect(relative(drawdown(0.01, [t, s, 1e12], r, at), confined)).toBeLessThan(1e-6)
        expect(drawdown(0.01, [t, s, r], r, at)).toBeLessThan(confined)
      }),
    )
  })

  it('is fitted to exact readings of two wells, whatever the aquifer', () => {
    fc.assert(
      fc.property(T, S, logarithmic(0.1, 1.5), (t, s, rho) => {
        const late = (30 * 30 * s) / (4 * t * 1e-3)
        const truth = [t, s, 60 / rho]
        const wells = [30, 90].map((distance_m) =>
          makeSeries({ wellId: `w${distance_m}`, distance_m, elapsed_s: logSpaced(25, late / 3000, late) }),
        )
        const inputs = withDrawdown(solution, truth, makeInputs({ aquifer: 'leaky', series: wells }))
        const result = curveMethod(solution).run(inputs, makeOptions({ wellIds: ['w30', 'w90'] }))
        expect(relative(valueOf(result.T), t)).toBeLessThan(1e-6)
        expect(relative(valueOf(result.S), s)).toBeLessThan(1e-6)
        const third = solution.unknowns[2]?.id ?? ''
        expect(relative(result.extras[`fitted_${third}`] ?? NaN, truth[2] ?? NaN)).toBeLessThan(1e-5)
        expect(result.fit.converged).toBe(true)
      }),
      { numRuns: 15 },
    )
  })

  it('is fitted under a rate that varies and stops', () => {
    const rates = [
      { start_s: 0, rate_m3_s: 0.01 },
      { start_s: 7200, rate_m3_s: 0.015 },
      { start_s: 40_000, rate_m3_s: 0 },
    ]
    const truth = [3e-3, 4e-4, 80]
    const series = [makeSeries({ distance_m: 40, elapsed_s: logSpaced(60, 30, DAY) })]
    const inputs = withDrawdown(solution, truth, makeInputs({ aquifer: 'leaky', rates, series }))
    const result = curveMethod(solution).run(inputs, makeOptions({ phase: 'all' }))
    expect(relative(valueOf(result.T), 3e-3)).toBeLessThan(1e-6)
    expect(relative(valueOf(result.S), 4e-4)).toBeLessThan(1e-6)
  })

  it('begins near the truth', () => {
    const inputs = withDrawdown(solution, [3e-3, 4e-4, 80], makeInputs({ aquifer: 'leaky' }))
    const [start] = solution.guess(readingsOf(inputs))
    expect(relative(start?.[0] ?? NaN, 3e-3)).toBeLessThan(1)
    expect(Math.abs(Math.log((start?.[1] ?? NaN) / 4e-4))).toBeLessThan(Math.log(4))
  })

  it('has a start even where nothing moved', () => {
    const still = makeInputs({ series: [makeSeries({ drawdown_m: Array<number>(40).fill(0) })] })
    for (const start of solution.guess(readingsOf(still))) {
      expect(start).toHaveLength(3)
      expect(start.every((value) => value > 0 && Number.isFinite(value))).toBe(true)
    }
  })

  it('says that confined readings do not tell an aquitard from none', () => {
    const inputs = withDrawdown(theis, [3e-3, 4e-4], makeInputs(), (i) => 0.001 * Math.sin(7 * i * i))
    const result = curveMethod(solution).run(inputs, makeOptions())
    const codes = result.findings.map(({ code }) => code)
    expect(codes.some((code) => code.endsWith('-not-shown'))).toBe(true)
    expect(relative(valueOf(result.T), 3e-3)).toBeLessThan(0.05)
  })
})

describe('leaky findings', () => {
  it('give the leakance K′/b′ = T/B², and say when the steady state is reached', () => {
    const inputs = withDrawdown(leaky, [3e-3, 4e-4, 100], makeInputs({ aquifer: 'leaky' }))
    const found = leaky.judge([3e-3, 4e-4, 100], readingsOf(inputs))
    expect(found.map(({ code }) => code)).toEqual(['curve-covered', 'leakance', 'leakage-steady'])
    expect(found[1]?.params).toMatchObject({ ratio: 0.5, leakance_per_s: 3e-7 })
    expect(leakanceOf(3e-3, 100)).toBeCloseTo(3e-7, 15)
  })

  it('leave the steady state out while the curve still bends', () => {
    const series = [makeSeries({ elapsed_s: logSpaced(30, 10, 400) })]
    const inputs = withDrawdown(leaky, [3e-3, 4e-4, 100], makeInputs({ aquifer: 'leaky', series }))
    expect(leaky.judge([3e-3, 4e-4, 100], readingsOf(inputs)).map(({ code }) => code)).toEqual([
      'curve-covered',
      'leakance',
    ])
  })

  it('remind of the early time where storage of the aquitard matters, with its product K′S′/b′', () => {
    const inputs = withDrawdown(leakyStorage, [3e-3, 4e-4, 100], makeInputs({ aquifer: 'leaky' }))
    const finding = leakyStorage.judge([3e-3, 4e-4, 100], readingsOf(inputs)).at(-1)
    expect(finding?.code).toBe('aquitard-early-time')
    expect(finding?.params.product_per_s).toBeCloseTo(aquitardStorageProduct(3e-3, 4e-4, 100), 15)
    // β = (r/4)·√(K'S'/(b'·T·S)) for the product it gives (Hantush 1960).
    expect((50 / 4) * Math.sqrt((finding?.params.product_per_s as number) / (3e-3 * 4e-4))).toBeCloseTo(0.5, 12)
  })
})

describe('steady leaky drawdown', () => {
  it('is Q·K0(r/B)/(2πT) (Hantush & Jacob 1955)', () => {
    const late = leakyDrawdown(0.01, [3e-3, 4e-4, 100], 50, 1e9)
    expect(relative(late, (0.01 * besselK0(0.5)) / (2 * Math.PI * 3e-3))).toBeLessThan(1e-12)
  })
})
