import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { AnalysisInputs, AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { logEquivalentTime } from '#shared/hydraulics/equivalent-time.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { recoveryEquivalentTime } from '#shared/hydraulics/recovery-equivalent-time.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeTheisSeries, relative, valueOf } from './make-inputs.ts'

const truth = { T: 5e-3, S: 2e-4 }
const stop = DAY
const rates = [
  { start_s: 0, rate_m3_s: 0.01 },
  { start_s: stop, rate_m3_s: 0 },
]
const elapsed_s = [...logSpaced(60, 60, stop), ...logSpaced(50, 60, 2 * DAY).map((since) => stop + since)]
const run = (inputs: AnalysisInputs, options: AnalysisOptions = makeOptions()) =>
  recoveryEquivalentTime.run(inputs, options)
const codes = ({ findings }: { findings: { code: string }[] }) => findings.map(({ code }) => code)
const late = makeOptions({ window: { from_s: 3600, to_s: 2 * DAY } })

describe('recovery by equivalent time', () => {
  it('finds T and S, T as the recovery line does, S as the drawdown line does', () => {
    const inputs = makeInputs({ rates, series: [makeTheisSeries(truth, { rates, elapsed_s })] })
    const result = run(inputs)
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(0.02)
    expect(relative(valueOf(result.S), truth.S)).toBeLessThan(0.05)
    expect(relative(valueOf(result.T), valueOf(analyse('recovery', inputs, makeOptions()).T))).toBeLessThan(0.02)
    expect(relative(valueOf(result.S), valueOf(analyse('cooper-jacob', inputs, makeOptions()).S))).toBeLessThan(0.05)
    expect(codes(result)).toContain('u-small')
  })

  it('has te = tp·t′/(tp + t′) for one rate, by superposition and by equivalent rate alike', () => {
    const history = rateHistory(rates)
    fc.assert(
      fc.property(fc.double({ min: 1, max: 1e6, noNaN: true }), (since) => {
        const expected = Math.log10((stop * since) / (stop + since))
        for (const rateHistoryOption of ['superposition', 'equivalent'] as const) {
          const options = makeOptions({ rateHistory: rateHistoryOption })
          expect(logEquivalentTime(history, options, stop + since)).toBeCloseTo(expected, 9)
        }
      }),
    )
  })

  it('comes to the time since the stop while that is short, and to the pumping time in the end', () => {
    const at = (since: number) => 10 ** logEquivalentTime(rateHistory(rates), makeOptions(), stop + since)
    expect(relative(at(1), 1)).toBeLessThan(1e-4)
    expect(relative(at(1e10), stop)).toBeLessThan(1e-4)
  })

  it('keeps T and S after a rate that varied, better by superposition', () => {
    const varied = [
      { start_s: 0, rate_m3_s: 0.02 },
      { start_s: stop / 2, rate_m3_s: 0.01 },
      { start_s: stop, rate_m3_s: 0 },
    ]
    const inputs = makeInputs({ rates: varied, series: [makeTheisSeries(truth, { rates: varied, elapsed_s })] })
    const superposed = run(inputs, late)
    const equivalent = run(inputs, { ...late, rateHistory: 'equivalent' })
    expect(relative(valueOf(superposed.T), truth.T)).toBeLessThan(0.01)
    expect(relative(valueOf(superposed.S), truth.S)).toBeLessThan(0.03)
    expect(relative(valueOf(equivalent.S), truth.S)).toBeGreaterThan(relative(valueOf(superposed.S), truth.S))
    expect(codes(equivalent)).toContain('rate-varied')
  })

  it('gives no S from the pumped well', () => {
    const pumped = makeTheisSeries(truth, { rates, elapsed_s, role: 'pumped', wellRadius_m: 0.1, casingRadius_m: 0.1 })
    const result = run(makeInputs({ rates, series: [pumped] }))
    expect(result.S).toBeNull()
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(0.02)
    expect(codes(result)).toContain('no-storage-from-pumped-well')
  })

  it('takes a single reading for the drawdown at the stop, and says so', () => {
    const few = [stop * 0.999, ...elapsed_s.filter((time) => time > stop)]
    const series = makeTheisSeries(truth, { rates, elapsed_s: few })
    const result = run(makeInputs({ rates, series: [series] }), late)
    expect(codes(result)).toContain('stop-drawdown-single')
    expect(relative(valueOf(result.S), truth.S)).toBeLessThan(0.03)
  })

  it('widens S, not T, for a drawdown at the stop that scatters', () => {
    const noise = elapsed_s.map((time, i) => (time <= stop ? 0.01 * Math.sin(7 * i) : 0))
    const series = makeTheisSeries(truth, { rates, elapsed_s, noise })
    const still = makeTheisSeries(truth, { rates, elapsed_s })
    const [a, b] = [series, still].map((one) => run(makeInputs({ rates, series: [one] }), late))
    expect((a?.S?.logSd ?? 0) / (b?.S?.logSd ?? 1)).toBeGreaterThan(1.2)
    expect(relative(a?.T?.logSd ?? 0, b?.T?.logSd ?? 1)).toBeLessThan(0.01)
  })

  it('draws the residual drawdown that was measured, after the stop only', () => {
    const inputs = makeInputs({ rates, series: [makeTheisSeries(truth, { rates, elapsed_s })] })
    const outcome = run(inputs, late)
    const [curve] = recoveryEquivalentTime.curve(inputs, late, outcome, [stop, ...elapsed_s.slice(90)])
    expect(curve?.drawdown_m[0]).toBeNull()
    elapsed_s.slice(90).forEach((_, i) => {
      const measured = inputs.series[0]?.drawdown_m[90 + i] as number
      expect(curve?.drawdown_m[i + 1]).toBeCloseTo(measured, 2)
      const residual = outcome.residuals.find(({ elapsed_s: time }) => time === elapsed_s[90 + i])
      if (residual) expect(residual.residual_m).toBeCloseTo(measured - (curve?.drawdown_m[i + 1] as number), 9)
    })
  })

  it('refuses a test that never stopped, and one whose drawdown at the stop is not known', () => {
    expect(() => run(makeInputs())).toThrow('analysis/no-recovery')
    const series = makeTheisSeries(truth, { rates, elapsed_s: elapsed_s.filter((time) => time > stop) })
    expect(() => run(makeInputs({ rates, series: [series] }), late)).toThrow('analysis/no-stop-drawdown')
  })

  it('gives the same in feet and minutes', () => {
    const foot = 0.3048
    const series = makeTheisSeries(truth, { rates, elapsed_s })
    const imperial = {
      ...series,
      distance_m: series.distance_m / foot,
      elapsed_s: series.elapsed_s.map((time) => time / 60),
      drawdown_m: series.drawdown_m.map((value) => value / foot),
    }
    const scaledRates = rates.map((step) => ({
      start_s: step.start_s / 60,
      rate_m3_s: (step.rate_m3_s * 60) / foot ** 3,
    }))
    const a = run(makeInputs({ rates, series: [series] }), late)
    const b = run(
      makeInputs({ rates: scaledRates, series: [imperial] }),
      makeOptions({ window: { from_s: 60, to_s: 2 * 1440 } }),
    )
    expect(relative((valueOf(b.T) * foot ** 2) / 60, valueOf(a.T))).toBeLessThan(1e-9)
    expect(relative(valueOf(b.S), valueOf(a.S))).toBeLessThan(1e-9)
  })
})
