import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { analyseKind, kindCurve } from '#shared/hydraulics/kinds.ts'
import { assumedStorage } from '#shared/hydraulics/specific-capacity/specific-capacity-method.ts'
import { penetrationLoss } from '#shared/hydraulics/specific-capacity/partial-penetration.ts'
import type { SpecificCapacityInputs } from '#shared/hydraulics/specific-capacity/specific-capacity-test.ts'
import { STRAIGHT_LINE_CONSTANT } from '#shared/hydraulics/small-u.ts'
import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import { DAY, relative, valueOf } from './make-inputs.ts'

const truth = { T: 2e-3, S: 1e-4 }
const codes = ({ findings }: { findings: { code: string }[] }) => findings.map(({ code }) => code)

function makeWell(overrides: Partial<SpecificCapacityInputs> = {}): SpecificCapacityInputs {
  return {
    version: 1,
    wellId: 'w1',
    label: 'PB-1',
    rate_m3_s: 0.01,
    rateError: 0,
    drawdown_m: theisDrawdown(0.01, truth.T, truth.S, 0.15, DAY),
    drawdownSd_m: 0,
    duration_s: DAY,
    wellRadius_m: 0.15,
    casingRadius_m: 0.1,
    aquifer: 'confined',
    thickness_m: null,
    thicknessError: 0,
    screenLength_m: null,
    ...overrides,
  }
}
const run = (inputs = makeWell(), options = {}) =>
  analyseKind('specific-capacity', 'specific-capacity', inputs, options)

describe('specific capacity to transmissivity', () => {
  it('has the printed rule T = 2,000 Q/s (confined) and 1,500 Q/s (unconfined) in gpd/ft and gpm/ft', () => {
    // Driscoll 1986, from memory: a day, a radius of 0.5 ft, T 30,000 gpd/ft, S 0.001 and 0.075.
    const [foot, gallon] = [0.3048, 231 * 0.0254 ** 3]
    const T = (30_000 * gallon) / DAY / foot
    for (const { S, factor } of [
      { S: 1e-3, factor: 2000 },
      { S: 0.075, factor: 1500 },
    ]) {
      const capacity = ((30_000 / factor) * gallon) / 60 / foot
      const inputs = makeWell({ wellRadius_m: foot / 2, drawdown_m: 0.01 / capacity })
      expect(relative(valueOf(run(inputs, { storativity: S }).T), T)).toBeLessThan(0.01)
    }
  })

  it('gives back T of a Theis drawdown with its S', () => {
    const result = run(makeWell(), { storativity: truth.S })
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(1e-6)
    expect(codes(result)).toEqual(expect.arrayContaining(['u-small', 'casing-storage-over', 'storage-assumed']))
    expect(result.S).toBeNull()
  })

  it('solves T = Q/(4πs)·(ln(2.25Tt/r²S) + 2s_p), whatever the well', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-3, max: 0.1, noNaN: true }),
        fc.double({ min: 0.5, max: 30, noNaN: true }),
        fc.double({ min: 3600, max: 1e6, noNaN: true }),
        fc.double({ min: 0.2, max: 1, noNaN: true }),
        (rate_m3_s, drawdown_m, duration_s, open) => {
          const inputs = makeWell({ rate_m3_s, drawdown_m, duration_s, thickness_m: 40, screenLength_m: 40 * open })
          const { T, findings } = run(inputs)
          if (!T) return expect(findings.map(({ code }) => code)).toContain('specific-capacity-no-solution')
          const bracket =
            Math.log((STRAIGHT_LINE_CONSTANT * T.value * duration_s) / (0.15 ** 2 * 1e-4)) +
            2 * penetrationLoss(40 * open, 40, 0.15)
          expect(relative((rate_m3_s * bracket) / (4 * Math.PI * drawdown_m), T.value)).toBeLessThan(1e-10)
        },
      ),
    )
  })

  it('takes off well loss and partial penetration', () => {
    const loss = 3000
    const lossy = makeWell({ drawdown_m: makeWell().drawdown_m + loss * 1e-4 })
    expect(relative(valueOf(run(lossy, { storativity: truth.S, wellLoss_s2_m5: loss }).T), truth.T)).toBeLessThan(1e-6)
    expect(valueOf(run(lossy, { storativity: truth.S }).T)).toBeLessThan(truth.T)
    const extra = (2 * penetrationLoss(10, 40, 0.15) * 0.01) / (4 * Math.PI * truth.T)
    const partial = makeWell({ drawdown_m: makeWell().drawdown_m + extra, thickness_m: 40, screenLength_m: 10 })
    const result = run(partial, { storativity: truth.S })
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(1e-6)
    expect(relative(valueOf(result.K) * 40, valueOf(result.T))).toBeLessThan(1e-12)
    expect(codes(result)).toContain('penetration-corrected')
  })

  it('has a penetration loss that falls to nothing as the screen grows to the aquifer', () => {
    const at = [0.1, 0.3, 0.6, 0.9, 1].map((open) => penetrationLoss(40 * open, 40, 0.15))
    at.slice(1).forEach((value, i) => expect(value).toBeLessThan(at[i] as number))
    expect(at.at(-1)).toBe(0)
    expect(() => penetrationLoss(50, 40, 0.15)).toThrow(RangeError)
  })

  it('carries the assumed storativity, rate, drawdown and well loss into the interval', () => {
    const sd = (overrides = {}, options = {}) =>
      (run(makeWell(overrides), { storativity: truth.S, storativityLogSd: 0, ...options }).T?.logSd ?? NaN) * Math.LN10
    expect(sd()).toBe(0)
    const logT = (options = {}, overrides = {}) =>
      Math.log(valueOf(run(makeWell(overrides), { storativity: truth.S, ...options }).T))
    const byS = (logT({ storativity: truth.S * 0.99 }) - logT({ storativity: truth.S * 1.01 })) / Math.log(1.01 / 0.99)
    expect(relative(sd({}, { storativityLogSd: 0.01 }), byS * 0.01 * Math.LN10)).toBeLessThan(1e-3)
    const byRate = (logT({}, { rate_m3_s: 0.0101 }) - logT({}, { rate_m3_s: 0.0099 })) / Math.log(101 / 99)
    expect(relative(sd({ rateError: 0.05 }), byRate * 0.05)).toBeLessThan(1e-3)
    const s = makeWell().drawdown_m
    const byDrawdown = (logT({}, { drawdown_m: s - 0.01 }) - logT({}, { drawdown_m: s + 0.01 })) / 0.02
    expect(relative(sd({ drawdownSd_m: 0.1 }), byDrawdown * 0.1)).toBeLessThan(1e-3)
    const byLoss = (logT({ wellLoss_s2_m5: 100 }) - logT({ wellLoss_s2_m5: 0 })) / 100
    expect(relative(sd({}, { wellLossSd_s2_m5: 500 }), byLoss * 500)).toBeLessThan(0.01)
  })

  it('assumes storativity by the kind of aquifer', () => {
    const unconfined = run(makeWell({ aquifer: 'unconfined' }))
    expect(unconfined.extras.S).toBe(assumedStorage.unconfined.value)
    expect(valueOf(unconfined.T)).toBeLessThan(valueOf(run().T))
  })

  it('reports a drawdown that no T explains as a finding', () => {
    const result = run(makeWell({ drawdown_m: 50, duration_s: 60, wellRadius_m: 0.5, aquifer: 'unconfined' }))
    expect(result.T).toBeNull()
    expect(result.fit.converged).toBe(false)
    expect(result.findings).toContainEqual(
      expect.objectContaining({ code: 'specific-capacity-no-solution', severity: 'bad' }),
    )
  })

  it('corrects thinning when asked, and offers it', () => {
    const inputs = makeWell({ aquifer: 'unconfined', thickness_m: 12, drawdown_m: 3 })
    expect(codes(run(inputs))).toContain('thinning-offered')
    const corrected = run(inputs, { thinning: true })
    expect(corrected.extras.formation_drawdown_m).toBeCloseTo(3 - 9 / 24, 12)
    expect(() => run({ ...inputs, drawdown_m: 8 }, { thinning: true })).toThrow('analysis/thinning-too-large')
    expect(() => run(makeWell(), { thinning: true })).toThrow('analysis/not-unconfined')
  })

  it('draws the drawdown through the reading that it rests on', () => {
    const inputs = makeWell()
    const result = run(inputs, { storativity: truth.S })
    const [curve] = kindCurve('specific-capacity', 'specific-capacity', inputs, {}, result, [0, DAY])
    expect(curve?.drawdown_m).toEqual([null, expect.closeTo(inputs.drawdown_m, 9)])
  })

  it('gives the same in feet and minutes', () => {
    const foot = 0.3048
    const si = makeWell({ thickness_m: 30, screenLength_m: 12 })
    const imperial = {
      ...si,
      rate_m3_s: (si.rate_m3_s * 60) / foot ** 3,
      drawdown_m: si.drawdown_m / foot,
      duration_s: si.duration_s / 60,
      wellRadius_m: si.wellRadius_m / foot,
      thickness_m: 30 / foot,
      screenLength_m: 12 / foot,
    }
    expect(relative((valueOf(run(imperial).T) * foot ** 2) / 60, valueOf(run(si).T))).toBeLessThan(1e-9)
  })

  it('refuses what it cannot use', () => {
    expect(() => run(makeWell({ rate_m3_s: 0 }))).toThrow('analysis/no-rate')
    expect(() => run(makeWell({ drawdown_m: NaN }))).toThrow('analysis/no-drawdown')
    expect(() => run(makeWell({ duration_s: 0 }))).toThrow('analysis/dimension')
    expect(() => run(makeWell({ thickness_m: 10, screenLength_m: 12 }))).toThrow('analysis/dimension')
    expect(() => run(makeWell(), { storativity: 0 })).toThrow('analysis/bad-option')
    expect(() => run(makeWell(), { wellLoss_s2_m5: 1e6 })).toThrow('analysis/well-loss-exceeds')
  })
})
