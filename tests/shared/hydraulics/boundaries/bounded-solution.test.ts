import { describe, expect, it } from 'vitest'
import type { AnalysisInputs, AnalysisOptions, ChosenBoundary } from '#shared/hydraulics/analysis.ts'
import { boundedSolution } from '#shared/hydraulics/boundaries/bounded-solution.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import type { ResponsePlace } from '#shared/hydraulics/place.ts'
import { theis, theisDrawdown } from '#shared/hydraulics/theis.ts'
import { DAY, logSpaced, makeInputs, makeSeries, relative } from '../make-inputs.ts'

const T = 4e-3
const S = 3e-4
const stream = (distance_m: number | null = 200): ChosenBoundary => ({ kind: 'recharge', distance_m, bearing_deg: 90 })
const barrier = (distance_m: number | null = 120): ChosenBoundary => ({ kind: 'barrier', distance_m, bearing_deg: 0 })
const place = (east_m: number, north_m: number): ResponsePlace => ({
  pumped: false,
  distance_m: Math.hypot(east_m, north_m),
  bearing_deg: (Math.atan2(east_m, north_m) * 180) / Math.PI,
  wellRadius_m: 0.1,
  casingRadius_m: 0.1,
  thickness_m: 20,
  pumpedScreen: null,
  observedScreen: null,
})

/** Drawdown per unit rate with derivatives. */
function responseAt(boundaries: ChosenBoundary[], at: ResponsePlace, time_s: number, fitted: number[] = []) {
  const out = new Float64Array(3 + fitted.length)
  boundedSolution(theis, boundaries).respond([T, S, ...fitted], at)(time_s, out)
  return Array.from(out)
}
const drawdown = (...args: Parameters<typeof responseAt>) => responseAt(...args)[0] as number

describe('A solution with boundaries', () => {
  it('adds the image of a stream to the real well', () => {
    const expected = theisDrawdown(1, T, S, 30, 7200) - theisDrawdown(1, T, S, 370, 7200)
    expect(drawdown([stream()], place(30, 0), 7200)).toBeCloseTo(expected, 12)
  })

  it('keeps the level of the stream, and lets no slope cross the barrier', () => {
    expect(drawdown([stream(), barrier()], place(200, -75), 1e5)).toBeCloseTo(0, 10)
    const slope = (drawdown([barrier()], place(40, 120.5), 1e5) - drawdown([barrier()], place(40, 119.5), 1e5)) / 1
    expect(Math.abs(slope)).toBeLessThan(1e-8)
  })

  it('is the same when pumped and observed place change roles (reciprocity)', () => {
    // The second pumped well stands 60 m nearer the stream; both wells see each other 60 m away.
    const there = drawdown([stream(200)], place(60, 0), 5e4)
    const back = drawdown([stream(140)], place(-60, 0), 5e4)
    expect(there).toBeCloseTo(back, 12)
  })

  it('draws from the stream what Glover & Balmer 1954 say: Q·erfc(√(L²S/4Tt))', () => {
    // Flow through the stream line, T·∂s/∂x summed along it by the trapezoidal rule.
    const L = 200
    const time = 86_400
    const step = 4
    let flow = 0
    for (let north = -8000; north <= 8000; north += step) {
      const slope = (drawdown([stream(L)], place(L - 0.5, north), time) - 0) / 0.5
      flow += T * slope * step
    }
    // erfc(0.1·√(…)): argument √(200²·3e-4/(4·4e-3·86400)) = 0.093169; erfc from DLMF 7.2.2 by its series.
    const x = Math.sqrt((L * L * S) / (4 * T * time))
    const erfc = 1 - (2 / Math.sqrt(Math.PI)) * (x - x ** 3 / 3 + x ** 5 / 10 - x ** 7 / 42)
    expect(flow).toBeCloseTo(erfc, 4)
  })

  it('comes near the steady strip between two streams, which no longer changes', () => {
    const strip = [stream(100), { kind: 'recharge', distance_m: 100, bearing_deg: 270 } as const]
    expect(drawdown(strip, place(0, 10), 1e7)).toBeCloseTo(drawdown(strip, place(0, 10), 2e7), 10)
    // Steady drawdown in the middle of a strip of width W, by conformal mapping: ln coth(πy/2W)/(2πT).
    const steady = Math.log(1 / Math.tanh((Math.PI * 10) / (2 * 200))) / (2 * Math.PI * T)
    expect(drawdown(strip, place(0, 10), 1e7)).toBeCloseTo(steady, 6)
  })

  it('has the derivative by ln of a fitted distance that differences show', () => {
    const at = place(30, 20)
    const h = 1e-3
    const slope = responseAt([barrier(null)], at, 2e4, [120])[3] as number
    const expected =
      (drawdown([barrier(120 * Math.exp(h))], at, 2e4) - drawdown([barrier(120 * Math.exp(-h))], at, 2e4)) / (2 * h)
    expect(slope).toBeCloseTo(expected, 4)
    expect(slope).toBeLessThan(0)
  })
})

describe('A fit with a boundary', () => {
  const rates = [{ start_s: 0, rate_m3_s: 0.01 }]
  const observed = (bearing_deg: number | null): AnalysisInputs => {
    const series = makeSeries({ distance_m: 30, bearing_deg })
    const at = place(30 * Math.sin(1), 30 * Math.cos(1))
    return makeInputs({
      rates,
      series: [{ ...series, drawdown_m: series.elapsed_s.map((t) => 0.01 * drawdown([barrier()], at, t)) }],
    })
  }
  const options = (inputs: AnalysisInputs, boundaries: ChosenBoundary[]): AnalysisOptions => ({
    wellIds: inputs.series.map(({ wellId }) => wellId),
    window: null,
    boundaries,
  })

  it('finds T, S and the distance of a barrier from exact readings', () => {
    const inputs = observed((1 * 180) / Math.PI)
    const result = analyse('theis', inputs, options(inputs, [barrier(null)]))
    expect(result.T?.value).toBeCloseTo(T, 6)
    expect(result.S?.value).toBeCloseTo(S, 7)
    expect(result.others?.[0]?.value).toBeCloseTo(120, 1)
  })

  it('finds T, S and both distances of edges that face each other, from exact readings in two wells', () => {
    const facing = [barrier(150), { ...stream(300), bearing_deg: 180 }]
    const series = [place(20, 25), place(-30, 40)].map((at, i) => {
      const { distance_m, bearing_deg } = at
      const elapsed_s = logSpaced(40, 60, 5 * DAY)
      const drawdown_m = elapsed_s.map((time) => 0.01 * drawdown(facing, at, time))
      return makeSeries({ wellId: `o${i + 1}`, distance_m, bearing_deg, elapsed_s, drawdown_m })
    })
    const inputs = makeInputs({ rates, series })
    const free = facing.map((one) => ({ ...one, distance_m: null }))
    const result = analyse('theis', inputs, options(inputs, free))
    expect(relative(result.T?.value ?? NaN, T)).toBeLessThan(1e-6)
    expect(relative(result.S?.value ?? NaN, S)).toBeLessThan(1e-6)
    expect(relative(result.others?.[0]?.value ?? NaN, 150)).toBeLessThan(1e-6)
    expect(relative(result.others?.[1]?.value ?? NaN, 300)).toBeLessThan(1e-6)
  })

  it('refuses to fit the distances of edges that face each other in Laplace space, where it would take minutes', () => {
    const inputs = { ...observed(30), thickness_m: 20 }
    const facing = [barrier(null), { ...barrier(90), bearing_deg: 180 }]
    expect(() => analyse('unconfined', inputs, options(inputs, facing))).toThrow('analysis/boundaries-facing')
  })

  it('refuses a boundary while the direction of the well is not known', () => {
    const inputs = observed(null)
    expect(() => analyse('theis', inputs, options(inputs, [barrier(null)]))).toThrow('analysis/bearing-unknown')
  })
})
