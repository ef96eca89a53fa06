import { describe, expect, it, vi } from 'vitest'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { analyse, fittedCurve, methodIds, methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { obstacle } from '#shared/hydraulics/requirements.ts'
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
/** Skin shows in the pumped well alone. */
const showsSkin = (id: MethodId) => methods[id].unknowns.some((unknown) => unknown.id === 'skin')
const wellIdsOf = (id: MethodId) => [
  ...['a', 'b', 'c'].slice(0, methods[id].needs.wells.least),
  ...(showsSkin(id) ? ['p'] : []),
]

/** What readings of the curves are made with beside T and S. */
const others: Record<string, number> = { B: 200, r_beta: 100, Kz_Kr: 0.3, Sy: 0.05, anisotropy: 0.1, skin: 1 }

/** The test as the method sees it: exactly its own curve where it fits one, else the confined one. */
function inputsOf(id: MethodId): AnalysisInputs {
  const { family, unknowns } = methods[id]
  if (family !== 'curve') return full
  const pumpedWell = { wellRadius_m: 0.2, casingRadius_m: 0.15, screen: { top_m: 1, bottom_m: 7 } }
  const pumped = makeSeries({ wellId: 'p', role: 'pumped', ...pumpedWell, elapsed_s })
  const known = { ...full, series: [...full.series, pumped], thickness_m: 12, pumpedWell }
  const values = unknowns.map((unknown) => [`fitted_${unknown.id}`, { ...truth, ...others }[unknown.id]])
  const made = { extras: Object.fromEntries(values) } as Parameters<typeof fittedCurve>[3]
  const curves = fittedCurve(id, known, makeOptions({ wellIds: ['a', 'b', 'c', 'p'] }), made, elapsed_s)
  // A micrometre of scatter: residuals of an exact fit would be zeros with signs, which storage does not keep.
  const series = known.series.map((one, i) => ({
    ...one,
    drawdown_m: (curves[i]?.drawdown_m as number[]).map((value, k) => value + (k % 2 === 0 ? 1e-6 : -1e-6)),
  }))
  return { ...known, series }
}

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
  const inputs = inputsOf(id)

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
    const { T, K, method, methodVersion } = analyse(id, inputs, options)
    expect(Math.abs((T?.value ?? NaN) / truth.T - 1)).toBeLessThan(0.03)
    expect(T?.low).toBeLessThanOrEqual(T?.value ?? NaN)
    expect(T?.high).toBeGreaterThanOrEqual(T?.value ?? NaN)
    expect(K?.value ?? null).toBe(inputs.thickness_m === null ? null : (T?.value ?? NaN) / inputs.thickness_m)
    expect({ method, methodVersion }).toEqual({ method: id, methodVersion: methods[id].version })
  })

  it('survives storage as JSON unchanged, so that numbers are all finite', () => {
    const result = analyse(id, { ...inputs, rateError: 0.05, thickness_m: 12 }, options)
    expect(JSON.parse(JSON.stringify(result))).toEqual(result)
  })

  it('gives the same result twice, and a curve through the readings it used', () => {
    const result = analyse(id, inputs, options)
    expect(analyse(id, inputs, options)).toEqual(result)
    const used = result.residuals.filter(({ wellId }) => wellId === 'a')
    const [curve] = fittedCurve(
      id,
      inputs,
      options,
      result,
      used.map((one) => one.elapsed_s),
    )
    const measured = new Map(inputs.series[0]?.elapsed_s.map((time, i) => [time, inputs.series[0]?.drawdown_m[i]]))
    // Steady state compares means of the window, which are no readings.
    if (methods[id].family === 'steady') return expect(used.length).toBe(1)
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
    [
      'a distance of zero',
      'analysis/zero-distance',
      { series: inputs.series.map((one) => ({ ...one, distance_m: 0 })) },
    ],
    ['a well that is not there', 'analysis/unknown-well', { series: [] }],
    [
      'columns of unequal length',
      'analysis/uneven-series',
      { series: inputs.series.map((one) => ({ ...one, included: [true] })) },
    ],
  ]
  it.each(broken)('refuses %s as %s', (_, code, change) => {
    expect(codeOf(() => analyse(id, { ...inputs, ...change }, options))).toBe(code)
  })

  it('refuses no wells, a window that ends before it begins, and no readings', () => {
    expect(codeOf(() => analyse(id, inputs, { ...options, wellIds: [] }))).toBe('analysis/no-wells')
    const window = { from_s: 100, to_s: 50 }
    expect(codeOf(() => analyse(id, inputs, { ...options, window }))).toBe('analysis/bad-option')
    const nothing = inputs.series.map((one) => ({ ...one, included: one.included.map(() => false) }))
    expect(codeOf(() => analyse(id, { ...inputs, series: nothing }, options))).toMatch(
      /^analysis\/(too-few-|no-stop-drawdown)/,
    )
  })

  it('has no obstacle on the test it is made for, and one on a test without wells', () => {
    expect(obstacle(methods[id], inputs)).toBeNull()
    expect(obstacle(methods[id], { ...inputs, series: [] })?.code).toMatch(/^analysis\/(too-few-wells|no-recovery)$/)
  })

  it('refuses drawdowns that are all zero, or of the wrong sign', () => {
    for (const factor of [0, -1]) {
      const series = inputs.series.map((one) => ({ ...one, drawdown_m: one.drawdown_m.map((value) => value * factor) }))
      expect(codeOf(() => analyse(id, { ...inputs, series }, options))).toMatch(
        /^analysis\/(slope-not-positive|no-drawdown)$/,
      )
    }
  })
})

describe('An obstacle', () => {
  const codeOn = (id: MethodId, change: Partial<AnalysisInputs>) =>
    obstacle(methods[id], { ...inputsOf(id), ...change })?.code ?? null

  it('is what the solution itself would refuse', () => {
    for (const [id, change] of [
      ['partial-penetration', { thickness_m: null }],
      ['unconfined', { thickness_m: null }],
      ['large-diameter', { pumpedWell: { wellRadius_m: null, casingRadius_m: 0.1 } }],
      ['large-diameter', { pumpedWell: { wellRadius_m: 0.1, casingRadius_m: null } }],
      ['partial-penetration', { pumpedWell: { wellRadius_m: 0.1, casingRadius_m: 0.1, screen: null } }],
    ] as [MethodId, Partial<AnalysisInputs>][]) {
      const code = codeOn(id, { ...change, series: full.series })
      expect(code).toMatch(/^analysis\//)
      expect(codeOf(() => analyse(id, { ...inputsOf(id), ...change }, makeOptions({ wellIds: ['a'] })))).toBe(code)
    }
  })

  it('is a test that was not stopped, for methods that look at its recovery', () => {
    expect(codeOn('recovery', { rates: [{ start_s: 0, rate_m3_s: 0.01 }] })).toBe('analysis/no-recovery')
    expect(codeOn('theis', { rates: [{ start_s: 0, rate_m3_s: 0.01 }] })).toBeNull()
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
