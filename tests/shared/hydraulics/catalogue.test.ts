import { describe, expect, it, vi } from 'vitest'
import { AnalysisError, type AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { analyse, fittedCurve, methodIds, methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeSeries, makeTheisSeries } from './make-inputs.ts'

vi.setConfig({ testTimeout: 60_000 })

const rates = [
  { start_s: 0, rate_m3_s: 0.01 },
  { start_s: DAY, rate_m3_s: 0 },
]
const elapsed_s = [...logSpaced(40, 60, DAY), ...logSpaced(40, 60, DAY).map((since) => DAY + since)]
const truth = { T: 4e-3, S: 2e-4 }
const full = makeInputs({
  rates,
  series: ['a', 'b', 'c'].map((wellId, i) =>
    makeTheisSeries(truth, { wellId, rates, elapsed_s, distance_m: 20 + 20 * i }),
  ),
})
const wellIdsOf = (id: MethodId) => ['a', 'b', 'c'].slice(0, methods[id].needs.wells.least)

function codeOf(run: () => unknown): string | null {
  try {
    run()
    return null
  } catch (error) {
    return error instanceof AnalysisError ? error.code : `thrown ${String(error)}`
  }
}

describe.each(methodIds)('method %s', (id) => {
  const options = makeOptions({ wellIds: wellIdsOf(id) })

  it('describes itself by its own id and keeps unknowns, options and validity documented', () => {
    const method = methods[id]
    expect(method.id).toBe(id)
    expect(method.version).toBeGreaterThanOrEqual(1)
    for (const { low, high, scale } of method.unknowns) expect(scale === 'log' ? low : high).toBeGreaterThan(0)
    for (const { name, label } of method.options) expect(label.length, name).toBeGreaterThan(3)
    for (const { statement, source } of method.validity) expect(statement.length * source.length).toBeGreaterThan(0)
    expect(method.source).toMatch(/\d{4}/)
  })

  it('finds the T that the readings were made with, in an interval around it', () => {
    const { T, K, method, methodVersion } = analyse(id, full, options)
    expect(Math.abs((T?.value ?? NaN) / truth.T - 1)).toBeLessThan(0.03)
    expect(T?.low).toBeLessThanOrEqual(T?.value ?? NaN)
    expect(T?.high).toBeGreaterThanOrEqual(T?.value ?? NaN)
    expect({ K, method, methodVersion }).toEqual({ K: null, method: id, methodVersion: methods[id].version })
  })

  it('survives storage as JSON unchanged, so that numbers are all finite', () => {
    const result = analyse(id, { ...full, rateError: 0.05, thickness_m: 12 }, options)
    expect(JSON.parse(JSON.stringify(result))).toEqual(result)
  })

  it('gives the same result twice, and a curve through the readings it used', () => {
    const result = analyse(id, full, options)
    expect(analyse(id, full, options)).toEqual(result)
    const used = result.residuals.filter(({ wellId }) => wellId === 'a')
    const [curve] = fittedCurve(
      id,
      full,
      options,
      result,
      used.map((one) => one.elapsed_s),
    )
    const measured = new Map(full.series[0]?.elapsed_s.map((time, i) => [time, full.series[0]?.drawdown_m[i]]))
    used.forEach(({ elapsed_s: time, residual_m }, i) => {
      expect((measured.get(time) as number) - (curve?.drawdown_m[i] as number)).toBeCloseTo(residual_m, 9)
    })
  })

  const broken: [name: string, code: string, change: Partial<AnalysisInputs>][] = [
    ['a negative rate', 'analysis/negative-rate', { rates: [{ start_s: 0, rate_m3_s: -0.01 }] }],
    ['a rate that is no number', 'analysis/bad-rate', { rates: [{ start_s: 0, rate_m3_s: NaN }] }],
    ['no rate', 'analysis/no-rate', { rates: [] }],
    ['rates of zero', 'analysis/no-rate', { rates: [{ start_s: 0, rate_m3_s: 0 }] }],
    ['steps out of order', 'analysis/rates-out-of-order', { rates: [...rates].reverse() }],
    ['a distance of zero', 'analysis/zero-distance', { series: full.series.map((one) => ({ ...one, distance_m: 0 })) }],
    ['a well that is not there', 'analysis/unknown-well', { series: [] }],
    [
      'columns of unequal length',
      'analysis/uneven-series',
      { series: full.series.map((one) => ({ ...one, included: [true] })) },
    ],
  ]
  it.each(broken)('refuses %s as %s', (_, code, change) => {
    expect(codeOf(() => analyse(id, { ...full, ...change }, options))).toBe(code)
  })

  it('refuses no wells, a window that ends before it begins, and no readings', () => {
    expect(codeOf(() => analyse(id, full, { ...options, wellIds: [] }))).toBe('analysis/no-wells')
    const window = { from_s: 100, to_s: 50 }
    expect(codeOf(() => analyse(id, full, { ...options, window }))).toBe('analysis/bad-option')
    const nothing = full.series.map((one) => ({ ...one, included: one.included.map(() => false) }))
    expect(codeOf(() => analyse(id, { ...full, series: nothing }, options))).toMatch(/^analysis\/too-few-/)
  })

  it('refuses drawdowns that are all zero, or of the wrong sign', () => {
    for (const factor of [0, -1]) {
      const series = full.series.map((one) => ({ ...one, drawdown_m: one.drawdown_m.map((value) => value * factor) }))
      expect(codeOf(() => analyse(id, { ...full, series }, options))).toMatch(
        /^analysis\/(slope-not-positive|no-drawdown)$/,
      )
    }
  })
})

describe('catalogue', () => {
  it('refuses a method it does not know, even one named like a property of every object', () => {
    for (const id of ['unheard-of', 'toString']) {
      expect(codeOf(() => analyse(id as MethodId, full, makeOptions()))).toBe('analysis/unknown-method')
    }
  })

  it('refuses two wells where a method takes one, and all times equal', () => {
    expect(codeOf(() => analyse('cooper-jacob', full, makeOptions({ wellIds: ['a', 'b'] })))).toBe(
      'analysis/wrong-wells',
    )
    const still = makeSeries({ elapsed_s: [600, 600, 600, 600] })
    const inputs = makeInputs({ series: [still] })
    expect(codeOf(() => analyse('cooper-jacob', inputs, makeOptions({ window: { from_s: 1, to_s: 1e4 } })))).toBe(
      'analysis/times-equal',
    )
  })

  it('fits a million readings thinned, counting those left out', () => {
    const many = Array.from({ length: 1_000_000 }, (_, i) => i + 1)
    const series = makeTheisSeries(truth, { elapsed_s: many })
    const { T, fit, leftOut } = analyse('theis', makeInputs({ series: [series] }), makeOptions())
    expect(Math.abs((T?.value ?? NaN) / truth.T - 1)).toBeLessThan(1e-6)
    expect(fit.n + (leftOut[0]?.count ?? 0)).toBe(1_000_000)
  })

  it('stays finite, and calls S undetermined, where readings leave it open', () => {
    const flat = makeTheisSeries({ T: 4e-3, S: 1e-12 }, { elapsed_s: logSpaced(10, 4e4, DAY) })
    const noisy = { ...flat, drawdown_m: flat.drawdown_m.map((value, i) => value + 0.05 * Math.sin(40 * i * i)) }
    const result = analyse('theis', makeInputs({ series: [noisy] }), makeOptions())
    expect(JSON.parse(JSON.stringify(result))).toEqual(result)
    expect(result.S?.determined).toBe(false)
  })
})
