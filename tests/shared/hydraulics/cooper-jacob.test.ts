import fc from 'fast-check'
import { describe, expect, it, vi } from 'vitest'
import { EULER_GAMMA } from '#shared/numerics/exponential-integral.ts'
import { analyse, fittedCurve } from '#shared/hydraulics/catalogue.ts'
import { straightLineErrors } from '#shared/hydraulics/small-u.ts'
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

const truth = { T: 5e-3, S: 2e-4 }

/** Drawdowns that lie exactly on −γ − ln u. */
function onTheLine(rate: number, { T, S }: typeof truth, distance: number, times: number[]): number[] {
  return times.map((t) => (rate / (4 * Math.PI * T)) * (-EULER_GAMMA - Math.log((distance ** 2 * S) / (4 * T * t))))
}

describe('Cooper–Jacob time–drawdown', () => {
  it('finds T and S exactly where readings lie on the line', () => {
    const times = logSpaced(20, 600, DAY)
    const unit = fc.double({ min: -2, max: 2, noNaN: true }).map((x) => 10 ** x)
    fc.assert(
      fc.property(unit, unit, (a, b) => {
        const values = { T: 5e-3 * a, S: 2e-4 * b }
        const series = makeSeries({ elapsed_s: times, drawdown_m: onTheLine(0.01, values, 50, times) })
        const result = analyse(
          'cooper-jacob',
          makeInputs({ series: [series] }),
          makeOptions({ window: { from_s: 0, to_s: DAY } }),
        )
        expect(relative(valueOf(result.T), values.T)).toBeLessThan(1e-9)
        expect(relative(valueOf(result.S), values.S)).toBeLessThan(1e-8)
      }),
    )
  })

  it('agrees with the Theis fit on late readings within the error that it shows', () => {
    const series = makeTheisSeries(truth, { elapsed_s: logSpaced(60, 60, 3 * DAY), included: undefined })
    const inputs = makeInputs({ series: [makeTheisSeries(truth, { elapsed_s: logSpaced(60, 60, 3 * DAY) })] })
    expect(series.elapsed_s).toHaveLength(60)
    const line = analyse('cooper-jacob', inputs, makeOptions())
    const curve = analyse('theis', inputs, makeOptions())
    const shown = line.findings.find(({ code }) => code === 'u-small')
    expect(shown?.severity).toBe('good')
    expect(relative(valueOf(line.T), valueOf(curve.T))).toBeLessThan(Number(shown?.params.slopeError))
  })

  it('shows errors of 2.0 % and 4.9 % at u = 0.05, of 0.25 % and 1.0 % at 0.01', () => {
    expect(straightLineErrors(0.05)).toEqual({ drawdown: expect.closeTo(0.02, 3), slope: expect.closeTo(0.0488, 4) })
    expect(straightLineErrors(0.01)).toEqual({ drawdown: expect.closeTo(0.0025, 4), slope: expect.closeTo(0.00995, 5) })
  })

  it('proposes by itself a window in which u stays within the limit', () => {
    const series = makeTheisSeries(truth, { elapsed_s: logSpaced(80, 30, 2 * DAY) })
    const result = analyse('cooper-jacob', makeInputs({ series: [series] }), makeOptions())
    const u = Number(result.findings.find(({ code }) => code === 'u-small')?.params.u)
    expect(u).toBeLessThanOrEqual(0.05)
    expect(u).toBeGreaterThan(0.03)
    expect(result.extras.window_to_s).toBe(2 * DAY)
  })

  it('has the slope error of linregress on synthetic readings (fixtures: hydraulics-fits.py)', () => {
    const { t, s, rate, distance, line } = reference.synthetic
    const series = makeSeries({ elapsed_s: t, drawdown_m: s, included: t.map(() => true), distance_m: distance })
    const inputs = makeInputs({ rates: [{ start_s: 0, rate_m3_s: rate }], series: [series] })
    const result = analyse('cooper-jacob', inputs, makeOptions({ window: { from_s: line.from_s, to_s: line.to_s } }))
    expect(relative(valueOf(result.T), line.T)).toBeLessThan(1e-10)
    const relativeSd = (result.T?.logSd ?? 0) * Math.LN10
    expect(relativeSd).toBeGreaterThan((0.99 * line.slopeSd) / line.slope)
    expect(relativeSd).toBeLessThan((1.6 * line.slopeSd) / line.slope)
  })

  it('takes a line drawn by hand in place of the regression', () => {
    const series = makeTheisSeries(truth)
    const line = { slope: 0.4, intercept: -0.5 }
    const inputs = makeInputs({ series: [series] })
    const options = makeOptions({ line, window: { from_s: 3600, to_s: DAY } })
    const result = analyse('cooper-jacob', inputs, options)
    expect(relative(valueOf(result.T), (Math.LN10 * 0.01) / (4 * Math.PI * 0.4))).toBeLessThan(1e-12)
    expect(result.extras.zero_s).toBeCloseTo(10 ** 1.25, 8)
    expect(result.findings.map(({ code }) => code)).toContain('hand-line')
    const [curve] = fittedCurve('cooper-jacob', inputs, options, result, [-1, 0, 100])
    expect(curve?.drawdown_m).toEqual([null, null, expect.closeTo(0.3, 12)])
  })

  it('judges the pumped well by casing storage and gives no S', () => {
    const pumped = makeTheisSeries(truth, { role: 'pumped', wellRadius_m: 0.2, casingRadius_m: 0.2 })
    const inputs = makeInputs({ series: [pumped] })
    const early = analyse('cooper-jacob', inputs, makeOptions({ window: { from_s: 60, to_s: DAY } }))
    expect(early.findings.find(({ code }) => code === 'casing-storage')?.params.over_s).toBeCloseTo(
      (250 * 0.04) / 5e-3,
      -1,
    )
    const late = analyse('cooper-jacob', inputs, makeOptions())
    expect(late.findings.map(({ code }) => code)).toContain('casing-storage-over')
    expect(late.extras.window_from_s).toBeGreaterThan((250 * 0.04) / 5.1e-3)
    expect(late.S).toBeNull()
  })

  it('warns when the rate varied by more than a tenth, and uses the mean until the end of the window', () => {
    const rates = [
      { start_s: 0, rate_m3_s: 0.01 },
      { start_s: DAY / 2, rate_m3_s: 0.014 },
    ]
    const series = makeTheisSeries(truth, { rates })
    const result = analyse(
      'cooper-jacob',
      makeInputs({ series: [series], rates }),
      makeOptions({ window: { from_s: 60, to_s: DAY } }),
    )
    expect(result.extras.rate_m3_s).toBeCloseTo(0.012, 12)
    expect(result.findings.find(({ code }) => code === 'rate-varied')?.params.variation).toBeCloseTo(1 / 6, 10)
  })

  it('is exact where the line is so flat that u is below every number', () => {
    expect(straightLineErrors(0)).toEqual({ drawdown: 0, slope: 0 })
  })

  it('gives K only with a thickness, with both errors', () => {
    const series = makeTheisSeries(truth)
    const inputs = makeInputs({
      series: [series],
      rateError: 0.03,
      thickness_m: 20,
      thicknessBasis: 'aquifer',
      thicknessError: 0.1,
    })
    const { K, T } = analyse('cooper-jacob', inputs, makeOptions())
    expect(relative(valueOf(K), valueOf(T) / 20)).toBeLessThan(1e-12)
    expect(K?.logSd).toBeCloseTo(Math.hypot(T?.logSd ?? 0, 0.1 / Math.LN10), 10)
    expect(analyse('cooper-jacob', makeInputs({ series: [series] }), makeOptions()).K).toBeNull()
  })
})
