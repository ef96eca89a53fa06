import fc from 'fast-check'
import { describe, expect, it, vi } from 'vitest'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import type { ResponsePlace } from '#shared/hydraulics/place.ts'
import {
  largeDiameter,
  largeDiameterRespond,
  largeDiameterSkin,
  type StoringWell,
} from '#shared/hydraulics/solutions/large-diameter.ts'
import { curveMethod } from '#shared/hydraulics/curve-method.ts'
import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import reference from '../../reference/laplace-solutions.json'
import { logSpaced, makeInputs, makeOptions, makeSeries, relative, valueOf } from './make-inputs.ts'

vi.setConfig({ testTimeout: 60_000 })

const makeWell = (overrides: Partial<StoringWell> = {}): StoringWell => ({
  T: 1e-3,
  S: 1e-4,
  skin: 0,
  wellRadius_m: 0.5,
  casingRadius_m: 0.5,
  ...overrides,
})
const makePlace = (overrides: Partial<ResponsePlace> = {}): ResponsePlace => ({
  pumped: false,
  distance_m: 30,
  bearing_deg: null,
  wellRadius_m: 0.5,
  casingRadius_m: 0.5,
  thickness_m: null,
  pumpedScreen: null,
  observedScreen: null,
  ...overrides,
})

function drawdown(well: StoringWell, distance_m: number | null, time_s: number): number {
  const out = new Float64Array(4)
  largeDiameterRespond(well, distance_m)(time_s, out)
  return out[0] as number
}

const logBetween = (low: number, high: number) =>
  fc.double({ min: Math.log(low), max: Math.log(high), noNaN: true }).map(Math.exp)

describe('Drawdown of a large-diameter well', () => {
  it('equals the integral of its source in the well to 1e-6 (scipy, laplace-solutions.py)', () => {
    expect(reference.stored.length).toBe(12)
    for (const { u, alpha, value } of reference.stored) {
      const well = makeWell({ T: 1, S: alpha, wellRadius_m: 1, casingRadius_m: 1 })
      expect(relative(4 * Math.PI * drawdown(well, null, alpha / (4 * u)), value)).toBeLessThan(1e-6)
    }
  })

  it("equals de Hoog's inversion with skin, in the well and outside, to 1e-6 (mpmath, laplace-solutions.py)", () => {
    expect(reference.skin.length).toBe(12)
    for (const { ratio, alpha, skin, distance, value } of reference.skin) {
      const well = makeWell({ T: 1, S: alpha, wellRadius_m: 1, casingRadius_m: 1, skin })
      expect(relative(4 * Math.PI * drawdown(well, distance, ratio * alpha), value)).toBeLessThan(1e-6)
    }
  })

  it('begins as the water taken from the casing, Qt/(π·r_c²)', () => {
    for (const skin of [0, 5]) {
      const well = makeWell({ T: 1e-5, skin })
      expect(relative(drawdown(well, null, 1), 1 / (Math.PI * 0.25))).toBeLessThan(1e-3)
    }
  })

  it('goes over to the confined curve, with 2σ more in the well and the effective radius of a negative skin', () => {
    const late = 1e8
    const [T, S] = [1e-3, 1e-4]
    expect(relative(drawdown(makeWell({ skin: 3 }), 40, late), theisDrawdown(1, T, S, 40, late))).toBeLessThan(1e-5)
    const positive = theisDrawdown(1, T, S, 0.5, late) + 3 / (2 * Math.PI * T)
    expect(relative(drawdown(makeWell({ skin: 3 }), null, late), positive)).toBeLessThan(1e-5)
    const negative = theisDrawdown(1, T, S, 0.5 * Math.exp(2), late)
    expect(relative(drawdown(makeWell({ skin: -2 }), null, late), negative)).toBeLessThan(1e-5)
    expect(drawdown(makeWell({ skin: -2 }), 1, late)).toBe(drawdown(makeWell({ skin: -2 }), null, late))
  })

  it('is the confined curve at every time when well and casing are thin', () => {
    const thin = makeWell({ wellRadius_m: 1e-4, casingRadius_m: 1e-6 })
    for (const time of [3, 30, 1e3, 1e6])
      expect(relative(drawdown(thin, 30, time), theisDrawdown(1, 1e-3, 1e-4, 30, time))).toBeLessThan(1e-6)
  })

  it('balances: casing and aquifer give what is pumped, so that storage delays and never adds', () => {
    fc.assert(
      fc.property(logBetween(1e-5, 1e-1), logBetween(1e-6, 1e-2), logBetween(1, 1e6), (T, S, time) => {
        const well = makeWell({ T, S })
        const inWell = drawdown(well, null, time)
        expect(inWell).toBeLessThan((time / (Math.PI * 0.25)) * (1 + 1e-8))
        expect(drawdown(well, null, 1.05 * time)).toBeGreaterThan(inWell)
        expect(drawdown(well, 10, time)).toBeLessThan(theisDrawdown(1, T, S, 10, time) * (1 + 1e-8) + 1e-10 / T)
      }),
    )
  })

  it('has the derivatives by ln T, ln S and skin that central differences show', () => {
    const skins = fc.oneof(
      fc.double({ min: -3, max: -0.01, noNaN: true }),
      fc.double({ min: 0.01, max: 20, noNaN: true }),
    )
    fc.assert(
      fc.property(logBetween(1e-5, 1e-1), logBetween(1e-6, 1e-2), skins, logBetween(1, 1e6), (T, S, skin, time) => {
        for (const distance of [null, 25]) {
          const out = new Float64Array(4)
          largeDiameterRespond(makeWell({ T, S, skin }), distance)(time, out)
          const h = 1e-4
          const scale = (out[0] as number) + 1 / (4 * Math.PI * T)
          const slope = (at: (step: number) => StoringWell) =>
            (drawdown(at(h), distance, time) - drawdown(at(-h), distance, time)) / (2 * h)
          const slopes = [
            slope((step) => makeWell({ T: T * Math.exp(step), S, skin })),
            slope((step) => makeWell({ T, S: S * Math.exp(step), skin })),
            slope((step) => makeWell({ T, S, skin: skin + step })),
          ]
          slopes.forEach((value, k) => expect(Math.abs(value - (out[k + 1] as number))).toBeLessThan(1e-6 * scale))
        }
      }),
      { numRuns: 60 },
    )
  })

  it('needs the radii of the pumped well', () => {
    expect(() => largeDiameter.respond([1e-3, 1e-4], makePlace({ wellRadius_m: null }))).toThrow(
      new AnalysisError('analysis/no-well-radius'),
    )
    expect(() => largeDiameter.respond([1e-3, 1e-4], makePlace({ casingRadius_m: null }))).toThrow(
      new AnalysisError('analysis/no-casing-radius'),
    )
  })
})

describe('Fit of a large-diameter well', () => {
  const elapsed_s = logSpaced(60, 5, 2e5)
  const series = (truth: StoringWell, distance_m: number | null) =>
    makeSeries({
      wellId: distance_m === null ? 'p' : 'o1',
      role: distance_m === null ? 'pumped' : 'observation',
      distance_m: distance_m ?? 0,
      wellRadius_m: distance_m === null ? truth.wellRadius_m : null,
      casingRadius_m: distance_m === null ? truth.casingRadius_m : null,
      elapsed_s,
      drawdown_m: elapsed_s.map((time) => 0.01 * drawdown(truth, distance_m, time)),
    })

  it('finds T, S and skin of exact readings in the well and at a distance together', () => {
    const truth = makeWell({ T: 3e-3, S: 2e-4, skin: 2.5 })
    const inputs = makeInputs({ series: [series(truth, null), series(truth, 20)] })
    const result = curveMethod(largeDiameterSkin).run(inputs, makeOptions({ wellIds: ['p', 'o1'] }))
    expect(relative(valueOf(result.T), 3e-3)).toBeLessThan(1e-6)
    expect(relative(valueOf(result.S), 2e-4)).toBeLessThan(1e-5)
    expect(result.others?.[0]?.id).toBe('skin')
    expect(result.others?.[0]?.value).toBeCloseTo(2.5, 5)
  })

  it('finds T and S without skin from the readings of an observation well', () => {
    const truth = makeWell({ T: 5e-4, S: 1e-3 })
    const inputs = makeInputs({
      series: [series(truth, 15)],
      pumpedWell: { wellRadius_m: 0.5, casingRadius_m: 0.5, screen: null },
    })
    const result = curveMethod(largeDiameter).run(inputs, makeOptions())
    expect(relative(valueOf(result.T), 5e-4)).toBeLessThan(1e-6)
    expect(relative(valueOf(result.S), 1e-3)).toBeLessThan(1e-6)
  })

  it('says so when the casing is out of play, and when skin is asked of an observation well alone', () => {
    const truth = makeWell({ T: 0.1, S: 1e-4 })
    const inputs = makeInputs({
      series: [series(truth, 15)],
      pumpedWell: { wellRadius_m: 0.5, casingRadius_m: 0.05, screen: null },
    })
    const codes = curveMethod(largeDiameterSkin)
      .run(inputs, makeOptions())
      .findings.map(({ code }) => code)
    expect(codes).toContain('casing-storage-unseen')
    expect(codes).toContain('skin-unseen')
  })
})
