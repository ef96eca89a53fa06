import { describe, expect, it } from 'vitest'
import { analysisResult } from '#shared/contracts/analysis-result.ts'
import type { Residual } from '#shared/hydraulics/analysis.ts'
import { analyse, methods } from '#shared/hydraulics/catalogue.ts'
import { keptResiduals, MOST_RESIDUALS } from '#shared/hydraulics/kept-residuals.ts'
import { makeInputs, makeOptions, makeTheisSeries } from './make-inputs.ts'

const COUNT = 300_000

/** A logger that reads every second for three and a half days, with a scatter that repeats every seven readings. */
const elapsed_s = Array.from({ length: COUNT }, (_, i) => i + 1)
const scatter = (i: number) => 0.002 * ([3, -1, 0, -3, 1, 2, -2][i % 7] ?? 0)
/** One reading far off, in the middle of the night when nothing else happened. */
const OUTLIER = 123_456

const longLog = makeTheisSeries(
  { T: 0.005, S: 2e-4 },
  {
    elapsed_s,
    included: elapsed_s.map(() => true),
    noise: elapsed_s.map((_, i) => (i === OUTLIER ? 0.5 : scatter(i))),
  },
)
const inputs = makeInputs({ series: [longLog] })
const options = makeOptions({ window: { from_s: 1, to_s: COUNT }, readingsPerCycle: null })
const whole = methods['cooper-jacob'].run(inputs, options)
const result = analyse('cooper-jacob', inputs, options)

describe('Residuals of 300,000 readings', () => {
  it('are kept to two thousand, and the result says of how many', () => {
    expect(whole.residuals).toHaveLength(COUNT)
    expect(result.residuals.length).toBeLessThanOrEqual(MOST_RESIDUALS)
    expect(result.residuals.length).toBeGreaterThan(0.8 * MOST_RESIDUALS)
    expect(result.residualsShown).toEqual([{ wellId: 'o1', residualsShown: result.residuals.length, of: COUNT }])
    expect(JSON.stringify(result).length).toBeLessThan(300_000)
  })

  it('are all in the summary of the fit', () => {
    expect(result.fit).toEqual(whole.fit)
    expect(result.fit.n).toBe(COUNT)
    expect([result.T, result.S]).toEqual([whole.T, whole.S])
  })

  it('keep the first, the last and the largest, as they were', () => {
    const times = result.residuals.map(({ elapsed_s: time }) => time)
    expect([times[0], times.at(-1)]).toEqual([1, COUNT])
    expect(times).toContain(elapsed_s[OUTLIER])
    const byTime = new Map(whole.residuals.map((residual) => [residual.elapsed_s, residual.residual_m]))
    for (const { elapsed_s: time, residual_m } of result.residuals) expect(residual_m).toBe(byTime.get(time))
  })

  it('lie evenly in the logarithm of time where there are readings enough', () => {
    const counts = [3, 4].map(
      (cycle) =>
        result.residuals.filter(({ elapsed_s: time }) => time >= 10 ** cycle && time < 10 ** (cycle + 1)).length,
    )
    expect(counts[0]! / counts[1]!).toBeGreaterThan(0.7)
    expect(counts[0]! / counts[1]!).toBeLessThan(1.4)
  })

  it('stand for every reading between them', () => {
    expect(result.residuals.reduce((sum, { standsFor }) => sum + (standsFor ?? 0), 0)).toBe(COUNT)
  })
})

describe('Kept residuals', () => {
  const make = (wellId: string, count: number): Residual[] =>
    Array.from({ length: count }, (_, i) => ({ wellId, elapsed_s: 100 + i, residual_m: Math.sin(i) }))

  it('are all of them up to two thousand a well, and say nothing of thinning', () => {
    const all = make('a', MOST_RESIDUALS)
    expect(keptResiduals(all, 0)).toEqual({ residuals: all })
  })

  it('are thinned well by well', () => {
    const few = make('few', 30)
    const { residuals, residualsShown } = keptResiduals([...make('many', 5_000), ...few], 99)
    expect(residuals.filter(({ wellId }) => wellId === 'few')).toEqual(few)
    expect(residualsShown).toMatchObject([{ wellId: 'many', of: 5_000 }])
  })

  it('of one size and one moment are kept too', () => {
    const flat = make('a', 4_000).map((residual) => ({ ...residual, elapsed_s: 60, residual_m: 0 }))
    const { residuals } = keptResiduals(flat, 0)
    expect(residuals.length).toBeLessThanOrEqual(MOST_RESIDUALS)
    expect(residuals.reduce((sum, { standsFor }) => sum + (standsFor ?? 0), 0)).toBe(4_000)
  })
})

describe('A stored result', () => {
  it('is read back with and without what thinning adds', () => {
    expect(analysisResult.parse(result)).toEqual(result)
    const { residualsShown: _, ...older } = result
    const unthinned = { ...older, residuals: result.residuals.map(({ standsFor: _count, ...rest }) => rest) }
    expect(analysisResult.parse(unthinned)).toEqual(unthinned)
  })
})
