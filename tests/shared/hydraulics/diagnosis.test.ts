import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { AnalysisInputs, ChosenBoundary } from '#shared/hydraulics/analysis.ts'
import { boundedSolution } from '#shared/hydraulics/boundaries/bounded-solution.ts'
import { diagnose, type Regime, type RegimeSpan } from '#shared/hydraulics/diagnosis.ts'
import { logDerivative } from '#shared/hydraulics/derivative.ts'
import { radialFlowSpan } from '#shared/hydraulics/radial-flow.ts'
import type { Solution } from '#shared/hydraulics/solution.ts'
import { largeDiameter } from '#shared/hydraulics/solutions/large-diameter.ts'
import { leaky } from '#shared/hydraulics/solutions/leaky.ts'
import { unconfined } from '#shared/hydraulics/solutions/unconfined.ts'
import { theis } from '#shared/hydraulics/theis.ts'
import { makeNoise } from '../numerics/make-noise.ts'
import { DAY, logSpaced, makeInputs, makeSeries } from './make-inputs.ts'
import { withDrawdown } from './make-readings.ts'

const [T, S] = [5e-3, 2e-4]
const confined = { aquifer: 'confined', role: 'observation' } as const

interface Asked {
  inputs?: Partial<AnalysisInputs>
  from_s?: number
  to_s?: number
  pumped?: boolean
}

/** Exact readings of a solution in one well, forty in each factor of ten. */
function readings(
  solution: Solution,
  parameters: number[],
  { inputs = {}, from_s = 1, to_s = 30 * DAY, pumped = false }: Asked = {},
) {
  const elapsed_s = logSpaced(Math.round(40 * Math.log10(to_s / from_s)), from_s, to_s)
  const construction = { wellRadius_m: 0.5, casingRadius_m: 0.5 }
  const series = makeSeries({ elapsed_s, bearing_deg: 90, ...(pumped ? { role: 'pumped', ...construction } : {}) })
  const made = withDrawdown(solution, parameters, makeInputs({ series: [series], pumpedWell: construction, ...inputs }))
  return { time_s: elapsed_s, drawdown_m: made.series[0]!.drawdown_m, aquifer: made.aquifer, role: series.role }
}

function spansOf(...asked: Parameters<typeof readings>): RegimeSpan[] {
  const { time_s, drawdown_m, ...rest } = readings(...asked)
  return diagnose(time_s, drawdown_m, rest)
}

const names = (spans: RegimeSpan[]) => spans.map(({ regime }) => regime)
const spanOf = (spans: RegimeSpan[], regime: Regime) => spans.find((span) => span.regime === regime)!
const bounded = (...boundaries: ChosenBoundary[]) => boundedSolution(theis, boundaries)
const barrier = (distance_m: number, bearing_deg = 0): ChosenBoundary => ({ kind: 'barrier', distance_m, bearing_deg })

describe('The diagnosis of a test', () => {
  it('finds in a confined response radial flow alone, by the rule that evidence is judged by', () => {
    const { time_s, drawdown_m } = readings(theis, [T, S])
    const spans = diagnose(time_s, drawdown_m, confined)
    expect(spans).toEqual([{ regime: 'radial-flow', ...radialFlowSpan(logDerivative(time_s, drawdown_m)) }])
  })

  it('finds recharge after radial flow where the aquifer leaks, to the end of the readings', () => {
    const spans = spansOf(leaky, [T, S, 1500])
    expect(names(spans)).toEqual(['radial-flow', 'recharge'])
    // Leakage shows in the derivative, whose factor is exp(-T t / (S B²)), once that has fallen by a few per cent.
    const factor = Math.exp((-T * spanOf(spans, 'recharge').from_s) / (S * 1500 ** 2))
    expect(factor).toBeGreaterThan(0.5)
    expect(factor).toBeLessThan(0.98)
    expect(spanOf(spans, 'recharge').to_s).toBeGreaterThan(15 * DAY)
  })

  it('takes the crest of a response that leaks at once for no radial flow', () => {
    for (const B of [60, 150]) expect(names(spansOf(leaky, [T, S, B]))).toEqual(['recharge'])
  })

  it('finds recharge after radial flow where a stream is near', () => {
    const stream: ChosenBoundary = { kind: 'recharge', distance_m: 1000, bearing_deg: 0 }
    expect(names(spansOf(bounded(stream), [T, S]))).toEqual(['radial-flow', 'recharge'])
  })

  it('finds a barrier, with the doubled level that it leads to, after radial flow', () => {
    const spans = spansOf(bounded(barrier(3000)), [T, S], { to_s: 1000 * DAY })
    expect(names(spans)).toEqual(['radial-flow', 'barrier'])
    // The image's u at the beginning of the rise: its derivative, e^-u of the real one, begins to count.
    const u = (S * (4 * 3000 ** 2 + 50 ** 2)) / (4 * T * spanOf(spans, 'barrier').from_s)
    expect(u).toBeGreaterThan(0.5)
    expect(u).toBeLessThan(4)
    expect(spanOf(spans, 'barrier').to_s).toBeGreaterThan(500 * DAY)
  })

  it('finds linear flow late between two parallel barriers', () => {
    const spans = spansOf(bounded(barrier(500), barrier(500, 180)), [T, S], { to_s: 300 * DAY })
    expect(names(spans)).toContain('linear-flow')
    expect(names(spans)[0]).toBe('radial-flow')
  })

  it('finds casing storage before radial flow in a well of large diameter, over well before 250 r_c²/T', () => {
    const spans = spansOf(largeDiameter, [T, S], { pumped: true, from_s: 0.1, to_s: 10 * DAY })
    expect(names(spans)).toEqual(['casing-storage', 'radial-flow'])
    const unit_s = 0.5 ** 2 / T
    expect(spanOf(spans, 'casing-storage').from_s).toBeLessThan(unit_s)
    expect(spanOf(spans, 'casing-storage').to_s).toBeLessThan(250 * unit_s)
    expect(spanOf(spans, 'radial-flow').from_s).toBeGreaterThan(5 * unit_s)
  })

  it('finds delayed drainage in an unconfined aquifer before the late radial flow', () => {
    const inputs = { aquifer: 'unconfined' as const, thickness_m: 20, thicknessBasis: 'saturated' as const }
    const spans = spansOf(unconfined, [T, S, 0.2, 0.02], { inputs, to_s: 3000 * DAY })
    expect(names(spans)).toContain('drainage')
    expect(names(spans).at(-1)).toBe('radial-flow')
    expect(spanOf(spans, 'drainage').to_s).toBeLessThanOrEqual(spans.at(-1)!.from_s)
  })

  it('does not change its mind with the units of time and drawdown', () => {
    const { time_s, drawdown_m } = readings(bounded(barrier(3000)), [T, S], { to_s: 1000 * DAY })
    const spans = diagnose(time_s, drawdown_m, confined)
    const factor = fc.double({ min: 0.01, max: 100, noNaN: true })
    fc.assert(
      fc.property(factor, factor, (a, b) => {
        const scaled = diagnose(
          time_s.map((time) => a * time),
          drawdown_m.map((drawdown) => b * drawdown),
          confined,
        )
        expect(names(scaled)).toEqual(names(spans))
        scaled.forEach(({ from_s }, i) => {
          // Rounding may move an edge from one reading to the next.
          const shift = Math.abs(Math.log10(from_s / a / spans[i]!.from_s))
          expect(shift).toBeLessThan(2.5 / 40)
        })
      }),
      { numRuns: 20 },
    )
  })

  it('names spans in order that do not overlap, and never more than noise allows', () => {
    const times = logSpaced(200, 10, 10 * DAY)
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 1000 }), (seed) => {
        const noise = makeNoise(seed, times.length)
        const spans = diagnose(
          times,
          times.map((time, i) => Math.log(time) + (noise[i] as number)),
          confined,
        )
        for (const [i, { from_s, to_s }] of spans.entries()) {
          expect(to_s).toBeGreaterThan(from_s)
          expect(from_s).toBeGreaterThanOrEqual(spans[i - 1]?.to_s ?? 0)
        }
      }),
      { numRuns: 50 },
    )
  })

  it('finds nothing in too few readings, or where the level does not fall', () => {
    expect(diagnose([], [], confined)).toEqual([])
    expect(diagnose([1, 2, 3], [0.1, 0.2, 0.3], confined)).toEqual([])
    const times = logSpaced(100, 10, DAY)
    const still = times.map(() => 0)
    expect(diagnose(times, still, confined)).toEqual([])
  })
})
