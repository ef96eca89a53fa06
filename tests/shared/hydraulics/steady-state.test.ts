import { describe, expect, it } from 'vitest'
import type { AnalysisInputs, AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { steadyState, thiemTransmissivity } from '#shared/hydraulics/steady-state.ts'
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

const truth = { T: 8e-3, S: 1.5e-4 }
const rate = 0.01
const run = (inputs: AnalysisInputs, options: AnalysisOptions) => steadyState.run(inputs, options)
const codes = ({ findings }: { findings: { code: string }[] }) => findings.map(({ code }) => code)

/** Levels that no longer change, by Thiem's formula with the drawdown zero at 500 m, plus noise where given. */
function steadyWell(wellId: string, distance_m: number, noise: (i: number) => number = () => 0, overrides = {}) {
  const level = (rate * Math.log(500 / distance_m)) / (2 * Math.PI * truth.T)
  const elapsed_s = logSpaced(60, 600, DAY)
  return makeSeries({
    wellId,
    distance_m,
    elapsed_s,
    drawdown_m: elapsed_s.map((_, i) => level + noise(i)),
    ...overrides,
  })
}

describe('steady state', () => {
  it('gives 370 m²/d for Oude Korendijk, 1.088 m at 30 m and 0.716 m at 90 m (ILRI 47, from memory)', () => {
    const T = thiemTransmissivity(
      788 / DAY,
      { distance_m: 30, drawdown_m: 1.088 },
      { distance_m: 90, drawdown_m: 0.716 },
    )
    expect(T * DAY).toBeCloseTo(370, -0.5)
  })

  it('gives T of two wells by the formula', () => {
    const inputs = makeInputs({ series: [steadyWell('a', 10), steadyWell('b', 60)] })
    const result = run(inputs, makeOptions({ wellIds: ['a', 'b'] }))
    const [near, far] = [10, 60].map((distance_m) => ({
      distance_m,
      drawdown_m: (rate * Math.log(500 / distance_m)) / (2 * Math.PI * truth.T),
    }))
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(1e-10)
    expect(relative(thiemTransmissivity(rate, near!, far!), truth.T)).toBeLessThan(1e-12)
    expect(result.extras.zero_m).toBeCloseTo(500, 6)
    expect(result.S).toBeNull()
    expect(codes(result)).toContain('slopes-equal')
  })

  it('gives T of levels that still fall alike, as distance–drawdown does', () => {
    const wellIds = ['a', 'b', 'c']
    const series = [10, 25, 60].map((distance_m, i) =>
      makeTheisSeries(truth, { wellId: wellIds[i] as string, distance_m, elapsed_s: logSpaced(60, 60, DAY) }),
    )
    const inputs = makeInputs({ series })
    const result = run(inputs, makeOptions({ wellIds }))
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(0.01)
    expect(
      relative(valueOf(result.T), valueOf(analyse('distance-drawdown', inputs, makeOptions({ wellIds })).T)),
    ).toBeLessThan(0.01)
    expect(codes(result)).toContain('slopes-equal')
  })

  it('says when the wells do not move alike', () => {
    const series = [10, 800].map((distance_m, i) =>
      makeTheisSeries(truth, { wellId: ['a', 'b'][i] as string, distance_m, elapsed_s: logSpaced(60, 60, 7200) }),
    )
    const result = run(makeInputs({ series }), makeOptions({ wellIds: ['a', 'b'] }))
    expect(result.findings).toContainEqual(expect.objectContaining({ code: 'slopes-differ', severity: 'caution' }))
  })

  it('widens its interval with the scatter of two wells, their distances and the rate', () => {
    const width = (inputs: AnalysisInputs) => run(inputs, makeOptions({ wellIds: ['a', 'b'] })).T?.logSd ?? NaN
    const still = [steadyWell('a', 10), steadyWell('b', 60)]
    expect(width(makeInputs({ series: still }))).toBeLessThan(1e-6)
    const noisy = [steadyWell('a', 10, (i) => 0.01 * Math.sin(5 * i)), steadyWell('b', 60)]
    expect(width(makeInputs({ series: noisy }))).toBeGreaterThan(1e-4)
    expect(width(makeInputs({ series: still, rateError: 0.05 })) * Math.LN10).toBeCloseTo(0.05, 6)
    // d ln T = σ_r/(r·ln(r2/r1)) for one uncertain distance of two.
    const displaced = [steadyWell('a', 10, undefined, { distanceSd_m: 1 }), steadyWell('b', 60)]
    expect(width(makeInputs({ series: displaced })) * Math.LN10).toBeCloseTo(0.1 / Math.log(6), 6)
  })

  it('leaves out the pumped well, and needs two others at different distances', () => {
    const pumped = steadyWell('p', 0, undefined, { role: 'pumped', drawdown_m: logSpaced(60, 1, 2) })
    const inputs = makeInputs({ series: [steadyWell('a', 10), steadyWell('b', 60), pumped] })
    const result = run(inputs, makeOptions({ wellIds: ['a', 'b', 'p'] }))
    expect(result.leftOut.find(({ reason }) => reason === 'pumped-well')?.wellId).toBe('p')
    expect(() => run(inputs, makeOptions({ wellIds: ['a', 'p'] }))).toThrow('analysis/too-few-wells')
    const same = makeInputs({ series: [steadyWell('a', 10), steadyWell('b', 10)] })
    expect(() => run(same, makeOptions({ wellIds: ['a', 'b'] }))).toThrow('analysis/distances-equal')
    const upside = makeInputs({
      series: [steadyWell('a', 60, undefined, { distance_m: 10 }), steadyWell('b', 10, undefined, { distance_m: 60 })],
    })
    expect(() => run(upside, makeOptions({ wellIds: ['a', 'b'] }))).toThrow('analysis/slope-not-positive')
  })

  it('draws the level within its window only, and notes leakage', () => {
    const inputs = makeInputs({ series: [steadyWell('a', 10), steadyWell('b', 60)], aquifer: 'leaky' })
    const options = makeOptions({ wellIds: ['a', 'b'] })
    const result = run(inputs, options)
    const [curve] = steadyState.curve(inputs, options, result, [60, 0.9 * DAY])
    expect(curve?.drawdown_m).toEqual([null, expect.closeTo(inputs.series[0]?.drawdown_m[0] as number, 9)])
    expect(codes(result)).toContain('steady-leaky')
  })

  it('does not depend on the order of the wells', () => {
    const series = ['a', 'b', 'c'].map((id, i) =>
      steadyWell(id, [10, 25, 60][i] as number, (k) => 0.003 * Math.sin(k + i)),
    )
    const forward = run(makeInputs({ series }), makeOptions({ wellIds: ['a', 'b', 'c'] }))
    const backward = run(makeInputs({ series }), makeOptions({ wellIds: ['c', 'a', 'b'] }))
    expect(relative(valueOf(forward.T), valueOf(backward.T))).toBeLessThan(1e-12)
  })
})
