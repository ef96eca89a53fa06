import { describe, expect, it } from 'vitest'
import type { HandLine, ParameterEstimate } from '#shared/hydraulics/analysis.ts'
import { analyseKind } from '#shared/hydraulics/kinds.ts'
import { analyse, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { DAY, makeInputs, makeOptions, makeTheisSeries } from './make-inputs.ts'
import { makeSlugInputs, makeSlugOptions } from './make-slug.ts'

const noise = Array.from({ length: 40 }, (_, i) => 0.004 * [1, -1, 0.5, -0.5][i % 4]!)
const truth = { T: 5e-3, S: 2e-4 }
const wellIds = ['a', 'b', 'c']
const stopped = [
  { start_s: 0, rate_m3_s: 0.01 },
  { start_s: DAY, rate_m3_s: 0 },
]
const wells = [10, 25, 60].map((distance_m, i) =>
  makeTheisSeries(truth, { wellId: wellIds[i]!, distance_m, noise: noise.map((value) => value * (i - 1)) }),
)
const [a, b] = [wells[0]!.wellId, wells[1]!.wellId]
const recovering = makeInputs({
  rates: stopped,
  series: [
    makeTheisSeries(truth, {
      wellId: a,
      rates: stopped,
      elapsed_s: noise.map((_, i) => DAY + 600 * 1.1 ** i),
      noise,
    }),
  ],
})
const pumping = makeInputs({ series: [makeTheisSeries(truth, { wellId: a, noise })] })

/** T by a method, with a line of its own where one is given. */
type Run = (line: HandLine | null) => { T: ParameterEstimate; line: HandLine }

const run =
  (method: MethodId, inputs = pumping, ids = [a]): Run =>
  (line) => {
    const { T, extras } = analyse(method, inputs, makeOptions({ wellIds: ids, line }))
    return { T: T!, line: { slope: extras.slope_m as number, intercept: extras.intercept_m as number } }
  }

const runs: Record<string, Run> = {
  'time–drawdown': run('cooper-jacob'),
  recovery: run('recovery', recovering),
  'distance–drawdown': run('distance-drawdown', makeInputs({ series: wells }), wellIds),
  'steady state of two wells': run('steady-state', makeInputs({ series: wells.slice(0, 2) }), [a, b]),
}

/** The same line turned about the height that it has at the abscissa 2. */
const turned = ({ slope, intercept }: HandLine, by: number): HandLine => ({
  slope: slope * by,
  intercept: intercept + 2 * slope * (1 - by),
})

describe('A line drawn by hand', () => {
  it.each(Object.entries(runs))('of %s claims more the better it lies, and reaches the least squares', (_, draw) => {
    const found = draw(null)
    const widths = [1, 1.2, 1.5].map((by) => {
      const { T } = draw(turned(found.line, by))
      expect(T.value).toBeCloseTo(found.T.value / by, 12)
      expect([T.low < found.T.value, T.high > found.T.value]).toEqual([true, true])
      return Math.log(T.high / T.low)
    })
    expect(widths[0]! / Math.log(found.T.high / found.T.low)).toBeCloseTo(1, 6)
    expect(widths[1]).toBeGreaterThan(widths[0]!)
    expect(widths[2]).toBeGreaterThan(widths[1]!)
  })

  it('of a slug test reaches the least squares', () => {
    const inputs = makeSlugInputs()
    const all = makeSlugOptions({ heads: { from: 0.01, to: 1 } })
    const found = analyseKind('slug', 'hvorslev', inputs, all).K!
    const { K } = analyseKind('slug', 'hvorslev', inputs, {
      ...all,
      line: { slope: 1.5 / (30 * Math.LN10), intercept: 0 },
    })
    expect(K!.value).toBeCloseTo(1.5 * found.value, 9)
    expect(K!.low).toBeLessThan(found.value)
  })

  it('counts the errors of distances like a line by least squares', () => {
    const near = makeInputs({ series: wells })
    const far = makeInputs({ series: wells.map((well) => ({ ...well, distanceSd_m: 3 })) })
    const [sure, unsure] = [near, far].map((inputs) => {
      const draw = run('distance-drawdown', inputs, wellIds)
      return draw(draw(null).line).T.logSd
    })
    expect(unsure).toBeGreaterThan(1.2 * sure!)
  })
})
