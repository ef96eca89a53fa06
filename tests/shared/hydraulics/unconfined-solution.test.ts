import fc from 'fast-check'
import { describe, expect, it, vi } from 'vitest'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import { curveMethod } from '#shared/hydraulics/curve-method.ts'
import type { ResponsePlace } from '#shared/hydraulics/place.ts'
import { unconfined, unconfinedRespond } from '#shared/hydraulics/solutions/unconfined.ts'
import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import type { OpenInterval } from '#shared/hydraulics/water-table-layer.ts'
import { isWhole, waterTableTransform, type WaterTableAquifer } from '#shared/hydraulics/water-table-transform.ts'
import { besselK0 } from '#shared/numerics/bessel.ts'
import reference from '../../reference/laplace-solutions.json'
import { logSpaced, makeInputs, makeOptions, makeSeries, relative, valueOf } from './make-inputs.ts'

vi.setConfig({ testTimeout: 120_000 })

const WHOLE: OpenInterval = { low: 0, high: 1 }
const makeAquifer = (overrides: Partial<WaterTableAquifer> = {}): WaterTableAquifer => ({
  T: 5e-3,
  S: 1e-3,
  Sy: 0.15,
  anisotropy: 0.2,
  thickness_m: 20,
  ...overrides,
})
const makePlace = (overrides: Partial<ResponsePlace> = {}): ResponsePlace => ({
  pumped: false,
  distance_m: 15,
  bearing_deg: null,
  wellRadius_m: 0.1,
  casingRadius_m: null,
  thickness_m: 20,
  pumpedScreen: null,
  observedScreen: null,
  ...overrides,
})

const evaluate = (
  aquifer: WaterTableAquifer,
  time_s: number,
  {
    distance_m = 15,
    source = WHOLE,
    place = WHOLE,
  }: { distance_m?: number; source?: OpenInterval; place?: OpenInterval } = {},
) => {
  const out = new Float64Array(5)
  unconfinedRespond(aquifer, { distance_m, source, place })(time_s, out)
  return out
}
const drawdown = (...parameters: Parameters<typeof evaluate>) => evaluate(...parameters)[0] as number

/** Σ K0(ρ√(σp + ε²))·(means of cos εz)/(½ + sin 2ε/4ε) over the roots of ε·tan ε = p. Source: Moench 1997. */
function rootSeries(p: number, sigma: number, beta: number, source: OpenInterval, place: OpenInterval): number {
  const mean = (e: number, { low, high }: OpenInterval) =>
    high > low ? (Math.sin(e * high) - Math.sin(e * low)) / (e * (high - low)) : Math.cos(e * low)
  let sum = 0
  for (let n = 0; ; n++) {
    let e = n === 0 ? Math.sqrt(p / (1 + p / 2.4674)) : n * Math.PI + Math.atan(p / (n * Math.PI))
    for (let i = 0; i < 30; i++) e -= (e - n * Math.PI - Math.atan(p / e)) / (1 + p / (e * e + p * p))
    const argument = Math.sqrt(beta * (sigma * p + e * e))
    if (argument > 40) return sum
    sum += (besselK0(argument) * mean(e, source) * mean(e, place)) / (0.5 + Math.sin(2 * e) / (4 * e))
  }
}

const logBetween = (low: number, high: number) =>
  fc.double({ min: Math.log(low), max: Math.log(high), noNaN: true }).map(Math.exp)
const share = fc.double({ min: 0, max: 1, noNaN: true })
/** Open intervals of at least a twentieth of the thickness. */
const interval = fc.tuple(share, share).map(([a, b]) => {
  const low = Math.min(a, b, 0.95)
  return { low, high: Math.max(a, b, low + 0.05) }
})

describe('Drawdown in an unconfined aquifer', () => {
  it('equals the summed series of roots to 1e-6, whatever is open (mpmath and Stehfest, laplace-solutions.py)', () => {
    expect(reference.waterTable.length).toBe(17)
    for (const { time, sigma, beta, source, place, value, uncertainty } of reference.waterTable) {
      // r = b = T = Sy = 1, so that Tt/(Sy·r²) is t and β is the anisotropy.
      const aquifer = makeAquifer({ T: 1, Sy: 1, S: sigma, anisotropy: beta, thickness_m: 1 })
      const interval = ([low = NaN, high = NaN]: number[]) => ({ low, high })
      const at = { distance_m: 1, source: interval(source), place: interval(place) }
      const found = 4 * Math.PI * drawdown(aquifer, time, at)
      expect(uncertainty).toBeLessThan(1e-6 * value + 1e-9)
      expect(Math.abs(found - value)).toBeLessThan(1e-6 * value + 1e-9)
    }
  })

  it('has the transform that the series of real roots gives at real p, for β from 1e-4 to 10 and S/Sy from 1e-5 to 0.1', () => {
    const places: [OpenInterval, OpenInterval][] = [
      [WHOLE, WHOLE],
      [WHOLE, { low: 0.4, high: 0.4 }],
      [
        { low: 0.1, high: 0.5 },
        { low: 0.3, high: 0.9 },
      ],
      [
        { low: 0, high: 0.4 },
        { low: 0.7, high: 0.7 },
      ],
    ]
    for (const beta of [1e-4, 1e-2, 0.3, 10])
      for (const sigma of [1e-5, 1e-3, 0.1])
        for (const p of [1e-4, 0.1, 3, 100])
          for (const [source, place] of places) {
            const expected = rootSeries(p, sigma, beta, source, place)
            const values = new Float64Array(8)
            const aquifer = { T: 1, Sy: 1, S: sigma, anisotropy: beta, thickness_m: 1 }
            waterTableTransform(aquifer, { distance_m: 1, source, place })(p * beta, 0, values)
            const confined = isWhole(source) ? besselK0(Math.sqrt(beta * sigma * p)) : 0
            const scaled = 2 * Math.PI * p * beta * (values[0] as number)
            expect(Math.abs((isWhole(source) ? confined - scaled : scaled) - expected)).toBeLessThan(
              2e-9 * (1 + confined),
            )
          }
  })

  it('follows the confined curve with S early and with S + Sy late', () => {
    const aquifer = makeAquifer({ Sy: 0.1 })
    const { T, S, Sy } = aquifer
    // Far below the table its fall is not felt yet.
    const deep = { distance_m: 4, place: { low: 0, high: 0 } }
    for (const time of [0.5, 1, 3])
      expect(relative(drawdown(aquifer, time, deep), theisDrawdown(1, T, S, 4, time))).toBeLessThan(1e-4)
    for (const time of [1e7, 1e8])
      expect(relative(drawdown(aquifer, time), theisDrawdown(1, T, S + Sy, 15, time))).toBeLessThan(1e-4)
  })

  it('is the confined curve at every time when nothing drains', () => {
    const dry = makeAquifer({ Sy: 1e-12 })
    for (const time of [10, 1e3, 1e5, 1e7])
      expect(relative(drawdown(dry, time), theisDrawdown(1, dry.T, dry.S, 15, time))).toBeLessThan(1e-7)
  })

  it('has two routes to one answer: the whole thickness, and all but a millionth of it', () => {
    const nearly = { low: 0, high: 1 - 1e-9 }
    for (const time of [5, 100, 1e4, 1e6]) {
      for (const place of [{ low: 0.3, high: 0.3 }, { low: 0.2, high: 0.7 }, nearly]) {
        const one = drawdown(makeAquifer(), time, { place })
        const other = drawdown(makeAquifer(), time, { source: nearly, place })
        expect(Math.abs(one - other) * 4 * Math.PI * 5e-3).toBeLessThan(1e-7)
      }
    }
  })

  it('is the mean over the screen of what points along it show', () => {
    const source = { low: 0.1, high: 0.6 }
    // Gauss's rule of three points on each of two parts, one inside and one above the pumped interval.
    const nodes = [-Math.sqrt(0.6), 0, Math.sqrt(0.6)]
    const weights = [5 / 18, 8 / 18, 5 / 18]
    const mean = (low: number, high: number, time: number) =>
      nodes.reduce((sum, node, i) => {
        const z = (low + high) / 2 + (node * (high - low)) / 2
        return sum + (weights[i] as number) * drawdown(makeAquifer(), time, { source, place: { low: z, high: z } })
      }, 0)
    for (const time of [100, 1e4, 1e6]) {
      const whole = drawdown(makeAquifer(), time, { source, place: { low: 0.5, high: 0.7 } })
      expect(relative((mean(0.5, 0.6, time) + mean(0.6, 0.7, time)) / 2, whole)).toBeLessThan(1e-6)
    }
  })

  it('is the same with pumped and observed screens exchanged', () => {
    fc.assert(
      fc.property(interval, interval, logBetween(10, 1e7), (source, place, time) => {
        const one = drawdown(makeAquifer(), time, { source, place })
        const other = drawdown(makeAquifer(), time, { source: place, place: source })
        expect(Math.abs(one - other) * 4 * Math.PI * 5e-3).toBeLessThan(1e-9)
      }),
      { numRuns: 30 },
    )
  })

  it('grows with time and lies between the confined curves of S + Sy and of S over the whole thickness', () => {
    fc.assert(
      fc.property(
        logBetween(1e-4, 0.1),
        logBetween(1e-5, 1e-3),
        logBetween(0.01, 0.3),
        logBetween(0.01, 2),
        logBetween(1, 1e8),
        (T, S, Sy, anisotropy, time) => {
          const aquifer = makeAquifer({ T, S, Sy, anisotropy })
          const noise = 1e-8 / T
          const here = drawdown(aquifer, time)
          expect(drawdown(aquifer, 1.1 * time)).toBeGreaterThan(here - noise)
          expect(here).toBeLessThan(theisDrawdown(1, T, S, 15, time) + noise)
          expect(here).toBeGreaterThan(theisDrawdown(1, T, S + Sy, 15, time) - noise)
        },
      ),
      { numRuns: 40 },
    )
  })

  it('has the derivatives by the logarithms of T, S, Sy and Kz/Kr that central differences show', () => {
    fc.assert(
      fc.property(interval, interval, fc.boolean(), logBetween(3, 1e7), (source, place, full, time) => {
        const aquifer = makeAquifer()
        const at = { source: full ? WHOLE : source, place }
        const out = evaluate(aquifer, time, at)
        const h = 3e-4
        for (const [k, name] of (['T', 'S', 'Sy', 'anisotropy'] as const).entries()) {
          const moved = (step: number) => drawdown({ ...aquifer, [name]: aquifer[name] * Math.exp(step) }, time, at)
          const slope = (moved(h) - moved(-h)) / (2 * h)
          expect(Math.abs(slope - (out[k + 1] as number)) * 4 * Math.PI * aquifer.T).toBeLessThan(2e-6)
        }
      }),
      { numRuns: 25 },
    )
  })

  it('stays positive and finite at the ends of the practical range', () => {
    for (const time of [1, 1e4, 1e8])
      for (const S of [2e-6, 0.02])
        for (const distance_m of [0.2 / Math.sqrt(0.2), 63 / Math.sqrt(0.2)])
          for (const place of [WHOLE, { low: 1, high: 1 }, { low: 0, high: 0 }]) {
            const value = drawdown(makeAquifer({ S, Sy: 0.2 }), time, {
              distance_m,
              place,
              source: { low: 0.2, high: 0.5 },
            })
            expect(value).toBeGreaterThan(0)
            expect(value).toBeLessThan(1e6)
          }
  })

  it('needs the thickness, and screens inside the aquifer', () => {
    const parameters = [5e-3, 1e-3, 0.15, 0.2]
    expect(() => unconfined.respond(parameters, makePlace({ thickness_m: null }))).toThrow(
      new AnalysisError('analysis/water-table-thickness'),
    )
    expect(() => unconfined.respond(parameters, makePlace({ observedScreen: { top_m: 25, bottom_m: 30 } }))).toThrow(
      AnalysisError,
    )
  })

  it('takes depths below the top, and in the pumped well the mean over its own screen', () => {
    const out = new Float64Array(5)
    const pumpedScreen = { top_m: 10, bottom_m: 18 }
    unconfined.respond([5e-3, 1e-3, 0.15, 0.2], makePlace({ pumped: true, distance_m: 0.1, pumpedScreen }))(3600, out)
    const own = { low: 1 - 18 / 20, high: 0.5 }
    expect(out[0]).toBe(drawdown(makeAquifer(), 3600, { distance_m: 0.1, source: own, place: own }))
  })
})

describe('Fit of an unconfined aquifer', () => {
  const elapsed_s = logSpaced(60, 10, 5e5)
  const makeReadings = (truth: WaterTableAquifer, distance_m: number, wellId: string) =>
    makeSeries({
      wellId,
      distance_m,
      elapsed_s,
      drawdown_m: elapsed_s.map((time) => 0.02 * drawdown(truth, time, { distance_m })),
    })

  it.each([
    { T: 5e-3, S: 1e-3, Sy: 0.15, anisotropy: 0.2 },
    { T: 2e-2, S: 3e-4, Sy: 0.25, anisotropy: 0.05 },
    { T: 1e-3, S: 2e-3, Sy: 0.05, anisotropy: 0.8 },
  ])('finds T $T, S $S, Sy $Sy and Kz/Kr $anisotropy of exact readings in two wells', (truth) => {
    const aquifer = makeAquifer(truth)
    const inputs = makeInputs({
      aquifer: 'unconfined',
      thickness_m: 20,
      series: [makeReadings(aquifer, 8, 'o1'), makeReadings(aquifer, 25, 'o2')],
    })
    const rated = { ...inputs, rates: [{ start_s: 0, rate_m3_s: 0.02 }] }
    const result = curveMethod(unconfined).run(rated, makeOptions({ wellIds: ['o1', 'o2'] }))
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(1e-4)
    expect(relative(valueOf(result.S), truth.Sy)).toBeLessThan(1e-3)
    expect(result.storageClass).toBe('specific-yield')
    const others = Object.fromEntries((result.others ?? []).map(({ id, value }) => [id, value]))
    expect(relative(others.S as number, truth.S)).toBeLessThan(1e-3)
    expect(relative(others.anisotropy as number, truth.anisotropy)).toBeLessThan(1e-3)
    expect(result.findings.map(({ code }) => code)).toContain('drainage-limb-reached')
  })

  it('says which limb the readings miss', () => {
    const aquifer = makeAquifer({ Sy: 0.3 })
    const late = logSpaced(30, 1000, 5000)
    const series = makeSeries({
      distance_m: 25,
      elapsed_s: late,
      drawdown_m: late.map((time) => 0.02 * drawdown(aquifer, time, { distance_m: 25 })),
    })
    const found = unconfined.judge([5e-3, 1e-4, 0.3, 0.2], {
      inputs: makeInputs({ series: [series] }),
      wells: [{ series, time_s: late, elapsed_s: late, measured_m: series.drawdown_m, drawdown_m: series.drawdown_m }],
      history: { increments: [], start_s: 0, stop_s: null, lastRate_m3_s: 0.02, steps: [] },
    })
    expect(found.map(({ code }) => code)).toEqual(['elastic-limb-missed', 'drainage-limb-missed'])
  })
})
