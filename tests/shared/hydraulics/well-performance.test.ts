import { describe, expect, it } from 'vitest'
import type { ParameterEstimate } from '#shared/hydraulics/analysis.ts'
import { wellPerformanceAt } from '#shared/hydraulics/well-performance-at.ts'
import { casingStorageTimes } from '#shared/hydraulics/casing-storage.ts'
import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import {
  expectedDrawdown,
  skin,
  specificCapacity,
  steadySpecificCapacity,
  wellEfficiency,
} from '#shared/hydraulics/well-performance.ts'
import { DAY, makeInputs, makeTheisSeries } from './make-inputs.ts'

function makeEstimate(value: number, logSd = 0): ParameterEstimate {
  return { value, low: value, high: value, logSd, determined: true }
}

const T = 500 / DAY
const S = 1e-4
function makeState(overrides = {}) {
  const ideal = theisDrawdown(0.02, T, S, 0.15, DAY)
  return { rate_m3_s: 0.02, time_s: DAY, wellRadius_m: 0.15, drawdown_m: ideal / 0.7, ...overrides }
}

describe('well performance', () => {
  it('gives the efficiency that the drawdown was made with', () => {
    expect(wellEfficiency(makeState(), makeEstimate(T), makeEstimate(S)).value).toBeCloseTo(0.7, 12)
  })

  it('moves expected drawdown by some 12 % when S is tenfold off', () => {
    const state = makeState()
    const change = 1 - expectedDrawdown(state, T, 10 * S) / expectedDrawdown(state, T, S)
    expect(change).toBeGreaterThan(0.09)
    expect(change).toBeLessThan(0.14)
  })

  it('has the interval that moving T and S by their errors gives', () => {
    const state = makeState()
    const at = (lnT: number, lnS: number) => Math.log(expectedDrawdown(state, T * Math.exp(lnT), S * Math.exp(lnS)))
    const h = 1e-4
    const byT = (at(h, 0) - at(-h, 0)) / (2 * h)
    const byS = (at(0, h) - at(0, -h)) / (2 * h)
    const { logSd } = wellEfficiency(state, makeEstimate(T, 0.1), makeEstimate(S, 0.3))
    expect(logSd).toBeCloseTo(Math.hypot(0.1 * byT, 0.3 * byS), 6)
  })

  it('takes the drawdown of partial penetration off first', () => {
    const state = makeState()
    const excess = 0.2 * state.drawdown_m
    const corrected = wellEfficiency({ ...state, penetrationExcess_m: excess }, makeEstimate(T), makeEstimate(S))
    expect(corrected.value).toBeCloseTo(0.7 / 0.8, 12)
    expect(() =>
      wellEfficiency({ ...state, penetrationExcess_m: 2 * state.drawdown_m }, makeEstimate(T), makeEstimate(S)),
    ).toThrow(RangeError)
  })

  it('gives a skin of zero for a perfect well, and one that undoes itself', () => {
    const ideal = theisDrawdown(0.02, T, S, 0.15, DAY)
    expect(skin(makeState({ drawdown_m: ideal }), T, S)).toBeCloseTo(0, 12)
    const withSkin = ideal + (0.02 / (4 * Math.PI * T)) * 2 * 3.5
    expect(skin(makeState({ drawdown_m: withSkin }), T, S)).toBeCloseTo(3.5, 10)
    expect(skin(makeState({ drawdown_m: 0.8 * ideal }), T, S)).toBeLessThan(0)
  })

  it('divides the rate by the drawdown and refuses either at zero', () => {
    expect(specificCapacity(0.02, 4)).toBe(0.005)
    expect(() => specificCapacity(0, 4)).toThrow(RangeError)
    expect(() => specificCapacity(0.02, 0)).toThrow(RangeError)
  })

  it('tends beside a stream to the rate over drawdown of well and image well after a long time', () => {
    const steady = steadySpecificCapacity(makeEstimate(T), { streamDistance_m: 80, wellRadius_m: 0.15 })
    const late = 1e5 * DAY
    const drawdown = theisDrawdown(0.02, T, 0.1, 0.15, late) - theisDrawdown(0.02, T, 0.1, 160, late)
    expect(steady.value / (0.02 / drawdown)).toBeCloseTo(1, 5)
  })

  it('lowers it by the measured efficiency and adds the errors', () => {
    const place = { streamDistance_m: 80, wellRadius_m: 0.15 }
    const ideal = steadySpecificCapacity(makeEstimate(T, 0.1), place)
    const real = steadySpecificCapacity(makeEstimate(T, 0.1), place, makeEstimate(0.7, 0.05))
    expect(real.value / ideal.value).toBeCloseTo(0.7, 12)
    expect(real.logSd).toBeCloseTo(Math.hypot(0.1, 0.05), 10)
    expect(() => steadySpecificCapacity(makeEstimate(T), { streamDistance_m: 0, wellRadius_m: 0.15 })).toThrow(
      RangeError,
    )
  })

  it('gives 25 and 250 r_c²/T for casing storage, the riser taken off', () => {
    expect(casingStorageTimes(0.01, 0.2)).toEqual({
      drawdown_s: expect.closeTo(100, 9),
      straightLine_s: expect.closeTo(1000, 9),
    })
    expect(casingStorageTimes(0.01, 0.2, { riserRadius_m: 0.1 }).drawdown_s).toBeCloseTo(75, 9)
    expect(() => casingStorageTimes(0.01, 0.1, { riserRadius_m: 0.1 })).toThrow(RangeError)
  })
})

describe('well performance from a test', () => {
  const rates = [{ start_s: 0, rate_m3_s: 0.02 }]
  const pumped = makeTheisSeries({ T, S }, { wellId: 'p', role: 'pumped', wellRadius_m: 0.15, rates })
  const lossy = { ...pumped, drawdown_m: pumped.drawdown_m.map((value) => value / 0.8) }
  const inputs = makeInputs({ rates, series: [lossy], streamDistance_m: 80 })
  const known = { T: makeEstimate(T, 0.05), S: makeEstimate(S, 0.1) }

  it('reads drawdown and rate at the time asked for, or at the last reading', () => {
    const last = wellPerformanceAt(inputs, known, { wellId: 'p' })
    expect(last.time_s).toBeCloseTo(DAY, 6)
    expect(last.specificCapacity).toBeCloseTo(0.02 / (lossy.drawdown_m.at(-1) as number), 12)
    const noon = wellPerformanceAt(inputs, known, { wellId: 'p', time_s: DAY / 2 })
    expect(noon.efficiency?.value).toBeCloseTo(0.8, 4)
    expect(noon.specificCapacity).toBeGreaterThan(last.specificCapacity)
  })

  it('gives efficiency, skin and both steady capacities beside the stream', () => {
    const { efficiency, skin: found, steadyIdeal, steadyReal } = wellPerformanceAt(inputs, known, { wellId: 'p' })
    expect(efficiency?.value).toBeCloseTo(0.8, 10)
    expect(found).toBeGreaterThan(0)
    expect((steadyReal?.value ?? NaN) / (steadyIdeal?.value ?? NaN)).toBeCloseTo(0.8, 10)
  })

  it('leaves out what cannot be known', () => {
    const nothing = wellPerformanceAt({ ...inputs, streamDistance_m: null }, { T: null, S: null }, { wellId: 'p' })
    expect(nothing).toMatchObject({ efficiency: null, skin: null, steadyIdeal: null, steadyReal: null })
  })

  it('compares the drawdown corrected for thinning in an unconfined aquifer', () => {
    const s = lossy.drawdown_m.at(-1) as number
    const unconfined = wellPerformanceAt({ ...inputs, aquifer: 'unconfined', thickness_m: 4 * s }, known, {
      wellId: 'p',
    })
    expect(unconfined.efficiency?.value).toBeCloseTo(0.8 / (1 - 1 / 8), 10)
    expect(unconfined.drawdown_m).toBe(s)
  })

  it('refuses a time without readings, and a well without any', () => {
    expect(() => wellPerformanceAt(inputs, known, { wellId: 'p', time_s: 2 * DAY })).toThrow('analysis/no-common-time')
    expect(() => wellPerformanceAt(inputs, known, { wellId: 'x' })).toThrow('analysis/unknown-well')
    const rising = { ...lossy, drawdown_m: lossy.drawdown_m.map((value) => -value) }
    expect(() => wellPerformanceAt({ ...inputs, series: [rising] }, known, { wellId: 'p' })).toThrow(
      'analysis/no-drawdown',
    )
  })
})
