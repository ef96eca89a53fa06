import fc from 'fast-check'
import { describe, expect, it, vi } from 'vitest'
import type { AnalysisInputs, AnalysisOptions, MethodOutcome } from '#shared/hydraulics/analysis.ts'
import { boundedSolution } from '#shared/hydraulics/boundaries/bounded-solution.ts'
import { curveMethod } from '#shared/hydraulics/curve-method.ts'
import type { Method } from '#shared/hydraulics/method.ts'
import { theis } from '#shared/hydraulics/theis.ts'
import { makeNoise } from '../../numerics/make-noise.ts'
import { countsOf, readWells, withNoise } from '../intervals/curve-families.ts'
import { curveTests } from '../intervals/curve-tests.ts'
import { lineTests, lineTruth } from '../intervals/line-families.ts'
import { makeOptions, relative } from '../make-inputs.ts'
import { withDrawdown } from '../make-readings.ts'
import { factorOf, feetAndMinutes, rescaledInputs, rescaledOptions } from './rescaled.ts'

vi.setConfig({ testTimeout: 120_000 })

interface Case {
  id: string
  method: Method
  exact: AnalysisInputs
  options: AnalysisOptions
  laplace: boolean
}

const curves: Case[] = curveTests(false).map(
  ({ id, solution, parameters, inputs, boundaries = [], laplace = false }) => ({
    id: id ?? solution.id,
    method: curveMethod(solution),
    exact: withDrawdown(boundedSolution(solution, boundaries), parameters, inputs),
    options: makeOptions({ wellIds: readWells(inputs), boundaries }),
    laplace,
  }),
)
const lines: Case[] = lineTests.map(({ method, inputs, options }) => ({
  id: method.id,
  method,
  exact: withDrawdown(theis, [lineTruth.T, lineTruth.S], inputs),
  options: makeOptions({ wellIds: readWells(inputs), ...options }),
  laplace: false,
}))
const named = [...curves, ...lines].map((one) => [one.id, one] as const)

const seeds = fc.integer({ min: 1, max: 1e6 })
const noisy = ({ exact }: Case, seed: number) =>
  withNoise(
    exact,
    makeNoise(
      seed,
      countsOf(exact).reduce((sum, count) => sum + count, 0),
    ),
    0.002,
  )
/** A fit in Laplace space takes a third of a second, one of a line no time. The same cases at every run. */
const runs = ({ laplace }: Case) => ({ numRuns: laplace ? 2 : 8, seed: 1 })
/** Inversions begin at other times in other units, so that their own error, 1e-8, comes in. */
const allowed = ({ laplace }: Case) => (laplace ? 1e-6 : 1e-9)

const found = ({ T, S }: MethodOutcome) => [T, S].flatMap((one) => (one ? [one.value, one.low, one.high] : []))

/** The same in value and interval, T and S each times a factor. */
function expectAlike(one: Case, outcome: MethodOutcome, other: MethodOutcome, [ofT, ofS]: [number, number]) {
  const expected = found(outcome)
  found(other).forEach((value, k) => {
    expect(relative(value, (expected[k] as number) * (k < 3 ? ofT : ofS))).toBeLessThan(allowed(one))
  })
  expect(found(other)).toHaveLength(expected.length)
}

describe('Every solution and line method', () => {
  it.each(named)('finds in feet and minutes what it finds in metres and seconds: %s', (_, one) => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const inputs = noisy(one, seed)
        const again = one.method.run(
          rescaledInputs(inputs, feetAndMinutes),
          rescaledOptions(one.options, feetAndMinutes),
        )
        expectAlike(one, one.method.run(inputs, one.options), again, [factorOf('transmissivity', feetAndMinutes), 1])
      }),
      runs(one),
    )
  })

  it.each(named)('finds the same when rate and drawdown are both larger by a factor: %s', (_, one) => {
    fc.assert(
      fc.property(seeds, fc.double({ min: 0.1, max: 10, noNaN: true }), (seed, factor) => {
        const inputs = noisy(one, seed)
        const larger: AnalysisInputs = {
          ...inputs,
          rates: inputs.rates.map((step) => ({ ...step, rate_m3_s: step.rate_m3_s * factor })),
          series: inputs.series.map((series) => ({ ...series, drawdown_m: series.drawdown_m.map((s) => s * factor) })),
        }
        expectAlike(one, one.method.run(inputs, one.options), one.method.run(larger, one.options), [1, 1])
      }),
      runs(one),
    )
  })

  it.each(named)('does not mind in which order wells and readings come: %s', (_, one) => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const inputs = noisy(one, seed)
        const turned: AnalysisInputs = {
          ...inputs,
          series: [...inputs.series].reverse().map((series) => ({
            ...series,
            elapsed_s: [...series.elapsed_s].reverse(),
            drawdown_m: [...series.drawdown_m].reverse(),
          })),
        }
        const options = { ...one.options, wellIds: [...one.options.wellIds].reverse() }
        expectAlike(one, one.method.run(inputs, one.options), one.method.run(turned, options), [1, 1])
      }),
      runs(one),
    )
  })
})
