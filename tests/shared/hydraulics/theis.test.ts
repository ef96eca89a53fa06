import fc from 'fast-check'
import { describe, expect, it, vi } from 'vitest'
import { analyse, fittedCurve } from '#shared/hydraulics/catalogue.ts'
import { theisDrawdown, theisRespond } from '#shared/hydraulics/theis.ts'
import reference from '../../reference/hydraulics-fits.json'
import {
  DAY,
  logSpaced,
  makeInputs,
  makeOptions,
  makeSeries,
  makeTheisSeries,
  relative,
  valueOf,
} from './make-inputs.ts'

vi.setConfig({ testTimeout: 60_000 })

const T = fc.double({ min: Math.log(1e-5), max: Math.log(0.1), noNaN: true }).map(Math.exp)
const S = fc.double({ min: Math.log(1e-5), max: Math.log(0.2), noNaN: true }).map(Math.exp)
const distance = fc.double({ min: 5, max: 300, noNaN: true })
const moment = fc.double({ min: Math.log(60), max: Math.log(1e6), noNaN: true }).map(Math.exp)

describe('Theis response', () => {
  it('is Q·W(u)/(4πT): 0.5446 m for Q 1000 m³/d, T 500 m²/d, S 1e-4, r 100 m, t 1 h (W(0.012) = 3.8576, Wenzel, from memory)', () => {
    expect(theisDrawdown(1000 / DAY, 500 / DAY, 1e-4, 100, 3600)).toBeCloseTo((3.8576 * 1000) / (4 * Math.PI * 500), 4)
  })

  it('has the derivatives by ln T and ln S that central differences show', () => {
    fc.assert(
      fc.property(T, S, distance, moment, (t, s, r, time) => {
        const out = new Float64Array(3)
        theisRespond([t, s], { distance_m: r })(time, out)
        // Far out on the flank the drawdown itself vanishes and differences are all rounding.
        fc.pre((r * r * s) / (4 * t * time) < 20)
        const h = 1e-5
        const at = (lnT: number, lnS: number) => theisDrawdown(1, t * Math.exp(lnT), s * Math.exp(lnS), r, time)
        const scale = Math.abs(out[0] as number) + Math.abs(out[1] as number)
        expect(Math.abs((at(h, 0) - at(-h, 0)) / (2 * h) - (out[1] as number))).toBeLessThan(1e-7 * scale)
        expect(Math.abs((at(0, h) - at(0, -h)) / (2 * h) - (out[2] as number))).toBeLessThan(1e-7 * scale)
      }),
    )
  })

  it('scales with the rate, depends on r²/t only, and grows with time', () => {
    fc.assert(
      fc.property(T, S, distance, moment, (t, s, r, time) => {
        const here = theisDrawdown(0.01, t, s, r, time)
        fc.pre(here > 1e-200)
        expect(relative(theisDrawdown(0.03, t, s, r, time), 3 * here)).toBeLessThan(1e-12)
        expect(relative(theisDrawdown(0.01, t, s, 2 * r, 4 * time), here)).toBeLessThan(1e-11)
        expect(theisDrawdown(0.01, t, s, r, 1.01 * time)).toBeGreaterThan(here)
      }),
    )
  })
})

describe('Theis fit', () => {
  it('finds T and S of exact readings, whatever they are', () => {
    fc.assert(
      fc.property(T, S, distance, (t, s, r) => {
        // Readings from u = 3 to u = 0.003, where the curve shows both.
        const late = (r * r * s) / (4 * t * 0.003)
        const series = makeTheisSeries({ T: t, S: s }, { distance_m: r, elapsed_s: logSpaced(25, late / 1000, late) })
        const result = analyse('theis', makeInputs({ series: [series] }), makeOptions())
        expect(relative(valueOf(result.T), t)).toBeLessThan(1e-8)
        expect(relative(valueOf(result.S), s)).toBeLessThan(1e-8)
        expect(result.fit).toMatchObject({ converged: true, singular: false })
      }),
      { numRuns: 60 },
    )
  })

  it('equals scipy curve_fit on noisy synthetic readings, covariance included (fixtures: hydraulics-fits.py)', () => {
    const { t, s, rate, distance: r, drawdown } = reference.synthetic
    const series = makeSeries({ elapsed_s: t, drawdown_m: s, included: t.map(() => true), distance_m: r })
    const result = analyse(
      'theis',
      makeInputs({ rates: [{ start_s: 0, rate_m3_s: rate }], series: [series] }),
      makeOptions(),
    )
    expect(relative(valueOf(result.T), drawdown.T)).toBeLessThan(1e-7)
    expect(relative(valueOf(result.S), drawdown.S)).toBeLessThan(1e-7)
    expect(relative(result.fit.objective, drawdown.objective)).toBeLessThan(1e-10)
    const [[tt = 0] = []] = drawdown.lnCovariance
    // White noise: the interval may widen for what cannot be excluded, by no more than half.
    expect((result.T?.logSd ?? 0) * Math.LN10).toBeGreaterThan(0.99 * Math.sqrt(tt))
    expect((result.T?.logSd ?? 0) * Math.LN10).toBeLessThan(1.5 * Math.sqrt(tt))
  })

  it('does not depend on the units of the readings', () => {
    const series = makeTheisSeries(
      { T: 4e-3, S: 2e-4 },
      { noise: Array.from({ length: 40 }, (_, i) => 0.01 * Math.sin(7 * i)) },
    )
    const base = analyse('theis', makeInputs({ series: [series] }), makeOptions())
    // Lengths in feet and times in minutes, as if those were the coherent units.
    const [foot, minute] = [0.3048, 60]
    const other = makeInputs({
      rates: [{ start_s: 0, rate_m3_s: (0.01 / foot ** 3) * minute }],
      series: [
        {
          ...series,
          distance_m: series.distance_m / foot,
          elapsed_s: series.elapsed_s.map((time) => time / minute),
          drawdown_m: series.drawdown_m.map((value) => value / foot),
        },
      ],
    })
    const result = analyse('theis', other, makeOptions({ readingsPerCycle: null }))
    const same = analyse('theis', makeInputs({ series: [series] }), makeOptions({ readingsPerCycle: null }))
    expect(relative((valueOf(result.T) * foot ** 2) / minute, valueOf(same.T))).toBeLessThan(1e-9)
    expect(relative(valueOf(result.S), valueOf(same.S))).toBeLessThan(1e-9)
    expect(relative(valueOf(base.T), valueOf(same.T))).toBeLessThan(0.05)
  })

  it('scales T and S with the rate', () => {
    const series = makeTheisSeries({ T: 4e-3, S: 2e-4 })
    const double = makeInputs({ series: [series], rates: [{ start_s: 0, rate_m3_s: 0.02 }] })
    const result = analyse('theis', double, makeOptions())
    expect(relative(valueOf(result.T), 8e-3)).toBeLessThan(1e-8)
    expect(relative(valueOf(result.S), 4e-4)).toBeLessThan(1e-8)
  })

  it('fits several wells at once, and a rate history with recovery', () => {
    const rates = [
      { start_s: 0, rate_m3_s: 0.01 },
      { start_s: 7200, rate_m3_s: 0.016 },
      { start_s: 36_000, rate_m3_s: 0 },
    ]
    const elapsed_s = logSpaced(60, 60, DAY)
    const wells = [20, 60, 150].map((distance_m, i) =>
      makeTheisSeries({ T: 3e-3, S: 4e-4 }, { rates, distance_m, elapsed_s, wellId: `w${i}` }),
    )
    const options = makeOptions({ wellIds: ['w0', 'w1', 'w2'], phase: 'all' })
    const inputs = makeInputs({ rates, series: wells })
    const result = analyse('theis', inputs, options)
    expect(relative(valueOf(result.T), 3e-3)).toBeLessThan(1e-8)
    expect(relative(valueOf(result.S), 4e-4)).toBeLessThan(1e-8)
    const used = result.residuals.filter(({ wellId }) => wellId === 'w1')
    expect(used.length).toBe(60)
    const curve = fittedCurve('theis', inputs, options, result, elapsed_s)[1]
    curve?.drawdown_m.forEach((value, i) => expect(value).toBeCloseTo(wells[1]?.drawdown_m[i] as number, 7))
  })

  it('gives T from the pumped well alone but no S', () => {
    const pumped = makeTheisSeries({ T: 2e-3, S: 1e-4 }, { role: 'pumped', wellRadius_m: 0.15, casingRadius_m: 0.12 })
    const result = analyse('theis', makeInputs({ series: [pumped] }), makeOptions())
    expect(relative(valueOf(result.T), 2e-3)).toBeLessThan(1e-6)
    expect(result.S).toBeNull()
    expect(result.storageClass).toBeNull()
    expect(result.findings.map(({ code }) => code)).toContain('no-storage-from-pumped-well')
  })

  it('says that S is not determined by readings that only begin late', () => {
    const noise = Array.from({ length: 12 }, (_, i) => 0.02 * Math.sin(40 * i * i))
    const series = makeTheisSeries({ T: 5e-2, S: 1e-4 }, { distance_m: 10, elapsed_s: logSpaced(12, 4e4, DAY), noise })
    const result = analyse('theis', makeInputs({ series: [series] }), makeOptions())
    expect(result.S?.determined).toBe(false)
    const finding = result.findings.find(({ code, params }) => code === 'not-determined' && params.parameter === 'S')
    expect(finding?.params.factor).toBeGreaterThan(30)
  })

  it('carries the error of the rate into T and S, and of the distance into S alone, twofold', () => {
    const exact = makeTheisSeries({ T: 4e-3, S: 2e-4 }, { distanceSd_m: 5 })
    const result = analyse('theis', makeInputs({ series: [exact], rateError: 0.05 }), makeOptions())
    expect((result.T?.logSd ?? 0) * Math.LN10).toBeCloseTo(0.05, 4)
    expect((result.S?.logSd ?? 0) * Math.LN10).toBeCloseTo(Math.hypot(0.05, 2 * 0.1), 3)
    expect((result.T?.high ?? 0) / valueOf(result.T)).toBeCloseTo(Math.exp(1.96 * 0.05), 3)
  })

  it('counts every reading it leaves out, with the reason', () => {
    const elapsed_s = [-60, 0, ...logSpaced(30, 60, DAY), NaN]
    const series = makeTheisSeries({ T: 4e-3, S: 2e-4 }, { elapsed_s })
    series.included[5] = false
    const result = analyse(
      'theis',
      makeInputs({ series: [series] }),
      makeOptions({ window: { from_s: 100, to_s: DAY } }),
    )
    const count = (reason: string) => result.leftOut.find((one) => one.reason === reason)?.count
    expect([count('excluded'), count('outside-phase'), count('not-finite'), count('outside-window')]).toEqual([
      1, 2, 1, 3,
    ])
    expect(result.fit.n + result.leftOut.reduce((sum, one) => sum + one.count, 0)).toBe(elapsed_s.length)
  })
})
