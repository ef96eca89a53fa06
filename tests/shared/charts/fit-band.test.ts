import { describe, expect, it } from 'vitest'
import { studentQuantile } from '#shared/numerics/student.ts'
import { bandOf } from '#shared/charts/fit-band.ts'
import { methods } from '#shared/hydraulics/catalogue.ts'
import { makeInputs, makeTheisSeries } from '../hydraulics/make-inputs.ts'
import { makeFit, makeTestInputs, truth } from './make-plot.ts'

const noisy = makeTestInputs({ noise: 0.004 })

describe('The band of a fitted curve', () => {
  it('is that of a regression line where the curve is one', () => {
    const fit = makeFit('cooper-jacob', { window: { from_s: 3_000, to_s: 80_000 }, readingsPerCycle: null }, noisy)
    const { residuals, fit: summary } = fit.result
    const x = residuals.map(({ elapsed_s }) => Math.log10(elapsed_s))
    const mean = x.reduce((sum, value) => sum + value, 0) / x.length
    const sxx = x.reduce((sum, value) => sum + (value - mean) ** 2, 0)
    const squares = residuals.reduce((sum, { residual_m }) => sum + residual_m ** 2, 0)
    const variance = (squares / (x.length - 2)) * (x.length / summary.effectiveN)
    const quantile = studentQuantile(0.975, summary.effectiveN - 2)
    const [times] = [[3_500, 16_000, 79_000]]
    // Source: confidence band of simple regression, any textbook of statistics (from memory).
    const expected = times!.map(
      (time) => quantile * Math.sqrt(variance * (1 / x.length + (Math.log10(time) - mean) ** 2 / sxx)),
    )
    const found = bandOf(fit)!('o1', times!)
    found.forEach((half, i) => expect(half / expected[i]!).toBeCloseTo(1, 6))
  })

  it('is narrow beside the scatter of many readings, and widens towards the ends', () => {
    const fit = makeFit('theis', { readingsPerCycle: null }, noisy)
    const [early, middle, late] = bandOf(fit)!('o1', [600, 8_000, 86_000])
    expect(middle!).toBeLessThan(fit.result.fit.rmse_m)
    expect(late!).toBeGreaterThan(middle!)
    expect(early!).toBeGreaterThan(0)
  })

  it('is as wide from thinned residuals as from all of them', () => {
    const elapsed_s = Array.from({ length: 20_000 }, (_, i) => 10 * (i + 1))
    const noise = elapsed_s.map((_, i) => 0.004 * [1, -1, 0.5, -0.5, -1, 1][i % 6]!)
    const series = makeTheisSeries(truth, { elapsed_s, included: elapsed_s.map(() => true), noise })
    const inputs = makeInputs({ series: [series] })
    const fit = makeFit('cooper-jacob', { window: { from_s: 3_000, to_s: 2e5 }, readingsPerCycle: null }, inputs)
    const { residuals } = methods['cooper-jacob'].run(inputs, fit.options)
    expect(fit.result.residuals.length).toBeLessThan(residuals.length / 5)
    const times = [3_500, 16_000, 190_000]
    const whole = bandOf({ ...fit, result: { ...fit.result, residuals } })!('o1', times)
    bandOf(fit)!('o1', times).forEach((half, i) => expect(half / whole[i]!).toBeCloseTo(1, 2))
  })

  it('vanishes with the scatter', () => {
    const exact = bandOf(makeFit('theis', { readingsPerCycle: null }))!('o1', [600, 86_000])
    exact.forEach((half) => expect(half).toBeLessThan(1e-8))
  })

  it('is not given for a line drawn by hand or for a fit of logarithms', () => {
    expect(bandOf(makeFit('cooper-jacob', { line: { slope: 0.4, intercept: -1 } }))).toBeNull()
    expect(bandOf(makeFit('theis', { objective: 'log-drawdown' }))).toBeNull()
  })
})
