import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Interval } from '#shared/hydraulics/analysis.ts'
import { curveMethod } from '#shared/hydraulics/curve-method.ts'
import { penetrationCorrection } from '#shared/hydraulics/penetration.ts'
import type { ResponsePlace } from '#shared/hydraulics/place.ts'
import {
  leakyPartialPenetration,
  leakyPartialPenetrationRespond,
} from '#shared/hydraulics/solutions/leaky-partial-penetration.ts'
import { leakyDrawdown } from '#shared/hydraulics/solutions/leaky.ts'
import {
  partialPenetration,
  partialPenetrationDrawdown,
  partialPenetrationIsotropic,
  partialPenetrationRespond,
} from '#shared/hydraulics/solutions/partial-penetration.ts'
import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import { leakyW } from '#shared/numerics/leaky-well-function.ts'
import reference from '../../reference/leaky-functions.json'
import { logSpaced, makeInputs, makeOptions, makeSeries, relative, valueOf } from './make-inputs.ts'
import { readingsOf, withDrawdown } from './make-readings.ts'

const thickness_m = 20
const part = (from: number, to: number): Interval => ({ top_m: from * thickness_m, bottom_m: to * thickness_m })

function makePlace(overrides: Partial<ResponsePlace> = {}): ResponsePlace {
  return {
    pumped: false,
    distance_m: 10,
    bearing_deg: null,
    wellRadius_m: 0.1,
    casingRadius_m: null,
    thickness_m,
    pumpedScreen: part(0, 0.4),
    observedScreen: null,
    ...overrides,
  }
}

const share = fc.double({ min: 0, max: 0.9, noNaN: true })
const screen = fc
  .tuple(share, fc.double({ min: 0.02, max: 1, noNaN: true }))
  .map(([top, length]) => part(top, Math.min(1, top + length)))
const distance = fc.double({ min: Math.log(1), max: Math.log(60), noNaN: true }).map(Math.exp)
const anisotropy = fc.double({ min: Math.log(0.05), max: 0, noNaN: true }).map(Math.exp)
const u = fc.double({ min: Math.log(1e-4), max: 0, noNaN: true }).map(Math.exp)

const correction = (place: ResponsePlace, at: number, ratio = 1, leakage = 0) => {
  const out = new Float64Array(4)
  penetrationCorrection(place, ratio, leakage)(at, out)
  return [...out] as [value: number, byU: number, byAnisotropy: number, byLeakage: number]
}

describe('partial penetration', () => {
  it('equals image sinks integrated over time by mpmath to 1e-10, leaky or not (fixtures: leaky-functions.py)', () => {
    expect(reference.penetration.length).toBe(15)
    for (const { u: at, r, anisotropy: ratio, leakage, pumped, observed, value } of reference.penetration) {
      const [pumpedScreen, observedScreen] = [pumped, observed].map(([from, to]) => part(from as number, to as number))
      const place = makePlace({
        distance_m: r * thickness_m,
        pumpedScreen: pumpedScreen as Interval,
        observedScreen: observedScreen as Interval,
      })
      const base = leakage > 0 ? leakyW(at, leakage) : exponentialIntegral(at)
      expect(relative(base + correction(place, at, ratio, leakage)[0], value)).toBeLessThan(1e-10)
    }
  })

  it('changes nothing at a well open to the whole aquifer, or for a pumped well that is', () => {
    fc.assert(
      fc.property(u, distance, screen, (at, distance_m, some) => {
        const all = part(0, 1)
        for (const [pumpedScreen, observedScreen] of [
          [all, some],
          [some, all],
          [some, null],
          [null, some],
        ] as const) {
          expect(Math.abs(correction(makePlace({ distance_m, pumpedScreen, observedScreen }), at)[0])).toBeLessThan(
            1e-11,
          )
        }
      }),
    )
  })

  it('is the same when pumped and observed screens change places (reciprocity)', () => {
    fc.assert(
      fc.property(u, distance, anisotropy, screen, screen, (at, distance_m, ratio, one, other) => {
        const there = correction(makePlace({ distance_m, pumpedScreen: one, observedScreen: other }), at, ratio)[0]
        const back = correction(makePlace({ distance_m, pumpedScreen: other, observedScreen: one }), at, ratio)[0]
        expect(Math.abs(there - back)).toBeLessThan(1e-11)
      }),
    )
  })

  it('averages to nothing over the depth', () => {
    const place = (top: number) => makePlace({ observedScreen: part(top, top + 0.25) })
    const sum = [0, 0.25, 0.5, 0.75].reduce((total, top) => total + correction(place(top), 0.01)[0], 0)
    expect(Math.abs(sum)).toBeLessThan(1e-12)
  })

  it('vanishes beyond 1.5·b·√(Kr/Kz) (Hantush 1961), and only there', () => {
    const place = (distance_m: number) => makePlace({ distance_m, observedScreen: part(0, 0.2) })
    const last = 1e-4
    const effect = (distance_m: number, ratio: number) =>
      Math.abs(correction(place(distance_m), last, ratio)[0]) / exponentialIntegral(last)
    expect(effect(1.5 * thickness_m, 1)).toBeLessThan(0.01)
    expect(effect((1.5 * thickness_m) / Math.sqrt(0.1), 0.1)).toBeLessThan(0.01)
    expect(effect(0.2 * thickness_m, 1)).toBeGreaterThan(0.1)
  })

  it('is a point where the screen has no length', () => {
    const point = correction(makePlace({ observedScreen: part(0.3, 0.3) }), 0.01)[0]
    const short = correction(makePlace({ observedScreen: part(0.2999, 0.3001) }), 0.01)[0]
    expect(relative(short, point)).toBeLessThan(1e-5)
  })

  it('takes the pumped screen for the level in the pumped well itself', () => {
    const pumped = makePlace({ pumped: true, distance_m: 0.1 })
    const same = makePlace({ pumped: true, distance_m: 0.1, observedScreen: part(0, 0.4) })
    expect(correction(pumped, 1e-8)).toEqual(correction(same, 1e-8))
    expect(correction(pumped, 1e-8)[0]).toBeGreaterThan(5)
  })

  it('has the derivatives that central differences show', () => {
    fc.assert(
      fc.property(u, distance, anisotropy, screen, screen, (at, distance_m, ratio, pumpedScreen, observedScreen) => {
        const place = makePlace({ distance_m, pumpedScreen, observedScreen })
        const h = 1e-3
        const slope = (of: (factor: number) => number) => (of(Math.exp(h)) - of(Math.exp(-h))) / (2 * h)
        const [value, byU, byAnisotropy, byLeakage] = correction(place, at, ratio, 0.3)
        const tolerance = 1e-5 * (1 + Math.abs(value))
        expect(Math.abs(slope((f) => correction(place, at * f, ratio, 0.3)[0]) - byU)).toBeLessThan(tolerance)
        expect(Math.abs(slope((f) => correction(place, at, ratio * f, 0.3)[0]) - byAnisotropy)).toBeLessThan(tolerance)
        expect(Math.abs(slope((f) => correction(place, at, ratio, 0.3 * f)[0]) - byLeakage)).toBeLessThan(tolerance)
      }),
    )
  })

  it('refuses a place without thickness or screens, and a screen outside the aquifer', () => {
    expect(() => correction(makePlace({ thickness_m: null }), 0.1)).toThrow('analysis/penetration-thickness')
    expect(() => correction(makePlace({ pumpedScreen: null }), 0.1)).toThrow('analysis/penetration-screens')
    expect(() => correction(makePlace({ observedScreen: part(1.2, 1.5) }), 0.1)).toThrow('analysis/screen-outside')
  })
})

describe('partial penetration as a solution', () => {
  it('has the derivatives by ln T, ln S and ln(Kz/Kr) that central differences show', () => {
    const place = makePlace({ distance_m: 6, observedScreen: part(0.1, 0.3) })
    const parameters = [2e-3, 3e-4, 0.2]
    const out = new Float64Array(4)
    partialPenetrationRespond(parameters, place)(60, out)
    const h = 1e-4
    for (const k of [0, 1, 2]) {
      const [above, below] = [h, -h].map((by) => {
        const [a = NaN, b = NaN, c = NaN] = parameters.map((value, i) => (i === k ? value * Math.exp(by) : value))
        return partialPenetrationDrawdown(1, [a, b, c], place, 60)
      }) as [number, number]
      expect(relative((above - below) / (2 * h), out[k + 1] as number)).toBeLessThan(1e-6)
    }
  })

  it('is the confined one for a well open to all of the aquifer', () => {
    const place = makePlace({ pumpedScreen: part(0, 1) })
    const value = partialPenetrationDrawdown(0.01, [2e-3, 3e-4, 0.2], place, 3600)
    expect(relative(value, theisDrawdown(0.01, 2e-3, 3e-4, 10, 3600))).toBeLessThan(1e-12)
  })

  const wells = [part(0.05, 0.15), part(0.8, 0.9)].map((one, i) =>
    makeSeries({ wellId: `p${i}`, distance_m: 8, screen: one, elapsed_s: logSpaced(30, 10, 20_000) }),
  )
  const pumpedWell = makeSeries({ wellId: 'w', role: 'pumped', wellRadius_m: 0.1, screen: part(0, 0.4), elapsed_s: [] })
  const inputs = makeInputs({ series: [pumpedWell, ...wells], thickness_m })
  const options = makeOptions({ wellIds: ['p0', 'p1'] })

  it('finds T, S and Kz/Kr from piezometers at two depths', () => {
    const exact = withDrawdown(partialPenetration, [2e-3, 3e-4, 0.15], inputs)
    const result = curveMethod(partialPenetration).run(exact, options)
    expect(relative(valueOf(result.T), 2e-3)).toBeLessThan(1e-6)
    expect(relative(valueOf(result.S), 3e-4)).toBeLessThan(1e-6)
    expect(relative(result.extras.fitted_Kz_Kr ?? NaN, 0.15)).toBeLessThan(1e-5)
    expect(result.findings.map(({ code }) => code)).toContain('penetration-matters')
  })

  it('finds T and S alone where Kz = Kr', () => {
    const exact = withDrawdown(partialPenetrationIsotropic, [2e-3, 3e-4], inputs)
    const result = curveMethod(partialPenetrationIsotropic).run(exact, options)
    expect(relative(valueOf(result.T), 2e-3)).toBeLessThan(1e-6)
    expect(relative(valueOf(result.S), 3e-4)).toBeLessThan(1e-6)
  })

  it('says that far wells tell nothing of Kz/Kr', () => {
    const far = { ...inputs, series: [pumpedWell, makeSeries({ wellId: 'p0', distance_m: 200, screen: part(0, 0.2) })] }
    const readings = readingsOf(withDrawdown(partialPenetration, [2e-3, 3e-4, 0.15], far))
    const found = partialPenetration.judge([2e-3, 3e-4, 0.15], { ...readings, wells: readings.wells.slice(1) })
    expect(found.at(-1)?.code).toBe('penetration-not-shown')
  })
})

describe('partial penetration in a leaky aquifer', () => {
  const value = (parameters: number[], place: ResponsePlace, time_s: number) => {
    const out = new Float64Array(5)
    leakyPartialPenetrationRespond(parameters, place)(time_s, out)
    return [...out]
  }

  it('is the leaky response for full penetration, and the confined one without leakage', () => {
    const full = value([2e-3, 3e-4, 60, 0.2], makePlace({ pumpedScreen: part(0, 1) }), 3600)[0] ?? NaN
    expect(relative(full, leakyDrawdown(1, [2e-3, 3e-4, 60], 10, 3600))).toBeLessThan(1e-11)
    const place = makePlace({ observedScreen: part(0.1, 0.3) })
    const tight = value([2e-3, 3e-4, 1e9, 0.2], place, 3600)[0] ?? NaN
    expect(relative(tight, partialPenetrationDrawdown(1, [2e-3, 3e-4, 0.2], place, 3600))).toBeLessThan(1e-9)
  })

  it('has the derivatives by ln T, ln S, ln B and ln(Kz/Kr) that central differences show', () => {
    const place = makePlace({ distance_m: 6, observedScreen: part(0.1, 0.3) })
    const parameters = [2e-3, 3e-4, 30, 0.2]
    const out = value(parameters, place, 60)
    const h = 1e-4
    for (const k of parameters.keys()) {
      const at = (by: number) =>
        value(
          parameters.map((p, i) => (i === k ? p * Math.exp(by) : p)),
          place,
          60,
        )[0] ?? NaN
      expect(Math.abs((at(h) - at(-h)) / (2 * h) - (out[k + 1] as number))).toBeLessThan(1e-6 * (out[0] as number))
    }
  })

  it('finds all four unknowns from piezometers at two depths and two distances', () => {
    const series = [
      makeSeries({ wellId: 'w', role: 'pumped', wellRadius_m: 0.1, screen: part(0, 0.4), elapsed_s: [] }),
      ...[
        { wellId: 'near', distance_m: 8, screen: part(0.05, 0.15) },
        { wellId: 'deep', distance_m: 8, screen: part(0.8, 0.9) },
        { wellId: 'far', distance_m: 60, screen: null },
      ].map((one) => makeSeries({ ...one, elapsed_s: logSpaced(30, 10, 80_000) })),
    ]
    const truth = [2e-3, 3e-4, 90, 0.15]
    const inputs = withDrawdown(leakyPartialPenetration, truth, makeInputs({ series, thickness_m, aquifer: 'leaky' }))
    const result = curveMethod(leakyPartialPenetration).run(inputs, makeOptions({ wellIds: ['near', 'deep', 'far'] }))
    leakyPartialPenetration.unknowns.forEach(({ id }, k) => {
      expect(relative(result.extras[`fitted_${id}`] ?? NaN, truth[k] ?? NaN)).toBeLessThan(1e-5)
    })
    const codes = result.findings.map(({ code }) => code)
    expect(codes).toEqual(expect.arrayContaining(['curve-covered', 'leakance', 'penetration-matters']))
    expect(codes.filter((code) => code === 'curve-covered')).toHaveLength(1)
  })
})
