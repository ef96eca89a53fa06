import { describe, expect, it } from 'vitest'
import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { analyse, fittedCurve, methodIds, methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { shiftedMatch, type CurveMatch } from '#shared/hydraulics/laid-curve.ts'
import type { OptionSpec } from '#shared/hydraulics/method.ts'
import {
  makeInputs,
  makeOptions,
  makeSeries,
  makeTheisSeries,
  publishedSeries,
  relative,
  valueOf,
} from './make-inputs.ts'

const noise = Array.from({ length: 40 }, (_, i) => 0.01 * [1, -1, 0.5, -0.5][i % 4]!)
const inputs = makeInputs({ series: [makeTheisSeries({ T: 0.005, S: 2e-4 }, { noise })] })

/** A test that has all that any curve method asks for. */
const known = makeInputs({
  series: [
    makeSeries({ distance_m: 30, screen: { top_m: 5, bottom_m: 9 } }),
    makeSeries({ wellId: 'p', role: 'pumped', distance_m: 0, wellRadius_m: 0.15, screen: { top_m: 2, bottom_m: 12 } }),
  ],
  thickness_m: 20,
})
const shapes: CurveMatch = { T: 3e-3, S: 4e-4, Sy: 0.1, B: 90, r_beta: 120, anisotropy: 0.3, Kz_Kr: 0.2 }

const matchOf = (id: MethodId) =>
  (methods[id].options as readonly OptionSpec[]).find((option) => option.kind === 'match')
const laid = methodIds.filter((id) => matchOf(id))

/** Drawdown of the model with these parameters. */
function curveAt(id: MethodId, match: CurveMatch, times_s: number[], given: AnalysisInputs = known): number[] {
  const extras = Object.fromEntries(Object.entries(match).map(([name, value]) => [`fitted_${name}`, value]))
  const result = { ...analyse('theis', inputs, makeOptions()), extras }
  return fittedCurve(id, given, makeOptions(), result, times_s)[0]!.drawdown_m as number[]
}

describe('A curve laid by hand', () => {
  it('is offered where a move along both axes leaves its shape as it is, and moves exactly then', () => {
    expect(laid).toEqual([
      'theis',
      'leaky',
      'leaky-storage',
      'unconfined',
      'partial-penetration',
      'partial-penetration-isotropic',
      'leaky-partial-penetration',
    ])
    const [time, drawdown] = [2.5, 0.6]
    const times_s = [300, 3_000, 30_000]
    for (const id of laid) {
      const spec = matchOf(id)!
      if (spec.kind !== 'match') continue
      const moved = shiftedMatch(shapes, spec.shift, { time, drawdown })
      const before = curveAt(id, shapes, times_s)
      const after = curveAt(
        id,
        moved,
        times_s.map((t) => t * time),
      )
      after.forEach((value, i) => expect(relative(value, drawdown * before[i]!), id).toBeLessThan(1e-7))
    }
  })

  it('gives at the least squares what the search gives, but no criterion for choosing among fits', () => {
    const found = analyse('theis', inputs, makeOptions())
    const match = { T: found.extras.fitted_T!, S: found.extras.fitted_S! }
    const byHand = analyse('theis', inputs, makeOptions({ match }))
    for (const quantity of ['T', 'S'] as const)
      for (const part of ['value', 'low', 'high'] as const)
        expect(relative(byHand[quantity]![part], found[quantity]![part])).toBeLessThan(1e-9)
    expect([byHand.fit.aicc, byHand.fit.iterations]).toEqual([null, 0])
    expect(byHand.findings.map(({ code }) => code)).toContain('hand-curve')
  })

  it('keeps the values it is given, and claims a wider interval the worse it lies', () => {
    const widths = [0.7, 1, 1.2, 1.5].map((off) => {
      const { T } = analyse('theis', inputs, makeOptions({ match: { T: 0.005 * off, S: 2e-4 } }))
      expect(T!.value).toBeCloseTo(0.005 * off, 12)
      expect([T!.low < 0.005, T!.high > 0.005]).toEqual([true, true])
      return T!.logSd
    })
    expect(Math.min(...widths)).toBe(widths[1])
    expect(widths[3]! / widths[2]!).toBeGreaterThan(1.5)
  })

  // Kruseman & de Ridder, ILRI Publication 47 (from memory): 392 m²/d and S 1.7e-4 by type curve at 30 m.
  it('lies at the handbook match of Oude Korendijk within 3 cm of the readings of the first 20 min', () => {
    const korendijk = makeInputs({
      rates: [{ start_s: 0, rate_m3_s: 788 / 86_400 }],
      series: [publishedSeries('oude-korendijk.csv', 1, 30)],
    })
    const window = { from_s: 0, to_s: 1_200 }
    const match = { T: 392 / 86_400, S: 1.7e-4 }
    const { fit, residuals } = analyse('theis', korendijk, makeOptions({ window, match }))
    expect(Math.max(...residuals.map(({ residual_m }) => Math.abs(residual_m)))).toBeLessThan(0.03)
    expect(fit.objective).toBeGreaterThan(analyse('theis', korendijk, makeOptions({ window })).fit.objective)
  })

  it('is refused with a value that is missing or impossible, and by a method whose curve cannot be moved', () => {
    const attempt =
      (id: MethodId, match: CurveMatch, given = inputs) =>
      () =>
        analyse(id, given, makeOptions({ match }))
    expect(attempt('leaky', { T: 0.005, S: 2e-4 })).toThrow(/match-incomplete.*"B"/)
    expect(attempt('theis', { T: 0, S: 2e-4 })).toThrow(/match-outside.*"T"/)
    expect(attempt('theis', { T: Number.NaN, S: 2e-4 })).toThrow(/match-outside/)
    const large = makeInputs({ series: [makeSeries({ role: 'pumped', wellRadius_m: 0.15, casingRadius_m: 0.12 })] })
    expect(attempt('large-diameter', { T: 0.005, S: 2e-4 }, large)).toThrow(/bad-option/)
    expect(valueOf(analyse('theis', inputs, makeOptions({ match: null })).T)).toBeCloseTo(0.005, 4)
  })
})
