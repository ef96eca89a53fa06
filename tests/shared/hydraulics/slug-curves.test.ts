import { describe, expect, it } from 'vitest'
import { analyseKind, kindCurve } from '#shared/hydraulics/kinds.ts'
import {
  GRAVITY,
  springDamping,
  springDisplacement,
  springTransmissivity,
} from '#shared/hydraulics/slug/damped-spring.ts'
import { inertialHeads } from '#shared/hydraulics/slug/inertial-heads.ts'
import { slugResponse } from '#shared/hydraulics/slug/cooper-bredehoeft-papadopulos.ts'
import reference from '../../reference/test-kinds.json'
import { relative, valueOf } from './make-inputs.ts'
import { makeRepeat, makeSlugInputs, makeSlugOptions } from './make-slug.ts'

const codes = ({ findings }: { findings: { code: string }[] }) => findings.map(({ code }) => code)
const all = makeSlugOptions({ readingsPerCycle: null })

/** The well of the reference, whose column is as long as it was built: casing above a screen of the same radius. */
function swingingWell({ t, h, r, length, S }: typeof reference.critical | typeof reference.swinging) {
  const repeat = makeRepeat({ initial_m: 0.6, elapsed_s: t, displacement_m: h.map((head) => 0.6 * head) })
  return makeSlugInputs({
    repeats: [repeat],
    casingRadius_m: r,
    screenRadius_m: r,
    wellRadius_m: r,
    screenLength_m: 4,
    screenTop_m: length - 2,
    thickness_m: 4,
    aquifer: 'confined',
    storage: { value: S, logSd: 0.5 },
  })
}

describe('Cooper, Bredehoeft & Papadopulos by least squares', () => {
  const { t, h, rw, rc } = reference.storage
  const inputs = makeSlugInputs({
    repeats: [makeRepeat({ initial_m: 1, elapsed_s: t, displacement_m: h })],
    casingRadius_m: rc,
    wellRadius_m: rw,
    screenRadius_m: rw,
    screenLength_m: 5,
    thickness_m: 5,
    aquifer: 'confined',
  })

  it('equals scipy on noisy heads, comes near the truth, and keeps S without using it', () => {
    const result = analyseKind('slug', 'cooper-bredehoeft-papadopulos', inputs, all)
    expect(relative(valueOf(result.T), reference.storage.T)).toBeLessThan(1e-5)
    expect(relative(valueOf(result.S), reference.storage.S)).toBeLessThan(1e-4)
    expect(relative(valueOf(result.K) * 5, valueOf(result.T))).toBeLessThan(1e-12)
    expect(relative(valueOf(result.T), reference.storage.truth.T)).toBeLessThan(0.05)
    expect(codes(result)).toContain('slug-storage')
  })

  it('draws the response with what it found', () => {
    const result = analyseKind('slug', 'cooper-bredehoeft-papadopulos', inputs, all)
    const [curve] = kindCurve('slug', 'cooper-bredehoeft-papadopulos', inputs, all, result, [-1, 0, 60])
    const expected = slugResponse(valueOf(result.T), valueOf(result.S), rw, rc, 60)
    expect(curve?.drawdown_m).toEqual([null, 1, expect.closeTo(expected, 12)])
  })

  it('says that the aquifer is not confined, and that the head was not followed far enough', () => {
    const [repeat] = inputs.repeats
    const short = makeRepeat({ ...repeat, included: t.map((time) => time < 12) })
    const result = analyseKind(
      'slug',
      'cooper-bredehoeft-papadopulos',
      { ...inputs, aquifer: 'unconfined', repeats: [short] },
      all,
    )
    expect(codes(result)).toEqual(expect.arrayContaining(['slug-unconfined', 'slug-short']))
  })
})

describe('a damped spring', () => {
  it('starts where it is let go, with the velocity given, and obeys its equation of motion', () => {
    for (const damping of [0, 0.1, 0.9, 0.99999999999, 1, 1.00000000001, 1.5, 8, 300]) {
      const spring = { frequency_1_s: 0.7, damping }
      expect(springDisplacement(spring, 0, 2, 0.3)).toBe(2)
      const step = 1e-3
      const at = (time: number) => springDisplacement(spring, time, 2, 0.3)
      for (const time of [0.5, 4]) {
        const slope = (at(time + step) - at(time - step)) / (2 * step)
        const bend = (at(time + step) - 2 * at(time) + at(time - step)) / step ** 2
        const rest = bend + 2 * damping * 0.7 * slope + 0.49 * at(time)
        expect(Math.abs(rest)).toBeLessThan(1e-4 * (1 + damping ** 2 * Math.abs(slope)))
      }
    }
  })

  it('is e^-γt·(cos ωt + γ/ω·sin ωt) when let go from rest', () => {
    const [gamma, omega] = [0.2, 0.6]
    const frequency_1_s = Math.hypot(gamma, omega)
    for (const time of [0.1, 2, 11]) {
      const closed = Math.exp(-gamma * time) * (Math.cos(omega * time) + (gamma / omega) * Math.sin(omega * time))
      expect(springDisplacement({ frequency_1_s, damping: gamma / frequency_1_s }, time)).toBeCloseTo(closed, 13)
    }
  })

  it('gives T that solves T = b + a·ln T, and back the damping that led to it', () => {
    const well = { casingRadius_m: 0.05, screenRadius_m: 0.06, storativity: 1e-4 }
    for (const damping of [0.02, 0.2, 0.8]) {
      const spring = { frequency_1_s: 0.8, damping }
      const found = springTransmissivity(spring, well, 0.79)
      const T = found?.T ?? NaN
      const a = (0.05 ** 2 * 0.8) / (8 * damping)
      const b = -a * Math.log(0.79 * 0.06 ** 2 * 1e-4 * 0.8)
      expect(relative(T, b + a * Math.log(T))).toBeLessThan(1e-11)
      expect(relative(springDamping(T, 0.8, well, 0.79), damping)).toBeLessThan(1e-11)
    }
  })

  it('has no T where the damping is too strong for the storativity assumed', () => {
    const well = { casingRadius_m: 0.05, screenRadius_m: 0.2, storativity: 0.3 }
    expect(springTransmissivity({ frequency_1_s: 0.8, damping: 5 }, well, 1)).toBeNull()
  })
})

describe('heads with inertia and storage', () => {
  it('equal the Laplace-space solution inverted by mpmath', () => {
    for (const { T, S, r, length, t, h } of [reference.swinging, reference.critical]) {
      const heads = inertialHeads({ T, S, screenRadius_m: r, casingRadius_m: r, column_m: length }, t)
      heads.forEach((head, i) => expect(Math.abs(head - (h[i] as number))).toBeLessThan(1e-6))
    }
  })

  it('come to those with storage alone as the column shrinks', () => {
    const well = { T: 2e-5, S: 1e-3, screenRadius_m: 0.1, casingRadius_m: 0.05, column_m: 1e-6 }
    const times = [5, 50, 500]
    inertialHeads(well, times).forEach((head, i) =>
      expect(Math.abs(head - slugResponse(2e-5, 1e-3, 0.1, 0.05, times[i] as number))).toBeLessThan(1e-6),
    )
  })
})

describe('oscillating slug test', () => {
  const inputs = swingingWell(reference.swinging)

  it('finds the frequency and damping that scipy finds, and T of the full solution within 10 %', () => {
    const result = analyseKind('slug', 'slug-oscillating', inputs, all)
    expect(relative(result.extras.frequency_1_s_1 as number, reference.swinging.frequency)).toBeLessThan(1e-5)
    expect(relative(result.extras.damping_1 as number, reference.swinging.damping)).toBeLessThan(1e-4)
    expect(relative(valueOf(result.T), reference.swinging.T)).toBeLessThan(0.1)
    expect(codes(result)).toEqual(expect.arrayContaining(['damping-fits', 'column-agrees']))
    expect(result.S).toBeNull()
  })

  it('carries the uncertainty of the storativity assumed into K', () => {
    const width = (logSd: number) => {
      const { K } = analyseKind('slug', 'slug-oscillating', { ...inputs, storage: { value: 1e-4, logSd } }, all)
      return (K?.high ?? NaN) / (K?.low ?? NaN)
    }
    expect(width(1)).toBeGreaterThan(width(0))
    const at = (value: number) =>
      Math.log(valueOf(analyseKind('slug', 'slug-oscillating', { ...inputs, storage: { value, logSd: 0 } }, all).K))
    const { extras } = analyseKind('slug', 'slug-oscillating', inputs, all)
    const leverage = (at(0.99e-4) - at(1.01e-4)) / Math.log(1.01 / 0.99)
    expect(relative(leverage, extras.storage_leverage_1 as number)).toBeLessThan(1e-3)
  })

  it('does not mind when the level was let go', () => {
    const [repeat] = inputs.repeats
    const later = makeRepeat({ ...repeat, elapsed_s: reference.swinging.t.map((time) => time + 1.3) })
    const a = analyseKind('slug', 'slug-oscillating', inputs, all)
    const b = analyseKind('slug', 'slug-oscillating', { ...inputs, repeats: [later] }, all)
    expect(relative(valueOf(b.K), valueOf(a.K))).toBeLessThan(1e-6)
  })

  it('draws its swings, and says when the column does not fit the well', () => {
    const result = analyseKind('slug', 'slug-oscillating', { ...inputs, screenTop_m: 5 }, all)
    expect(codes(result)).toContain('column-differs')
    const [curve] = kindCurve('slug', 'slug-oscillating', inputs, all, result, reference.swinging.t)
    const worst = Math.max(
      ...reference.swinging.h.map((head, i) => Math.abs((curve?.drawdown_m[i] as number) - 0.6 * head)),
    )
    expect(worst).toBeLessThan(0.01)
  })
})

describe('slug test near critical damping', () => {
  const inputs = swingingWell(reference.critical)

  it('finds T and the column of the full solution', () => {
    const result = analyseKind('slug', 'slug-near-critical', inputs, all)
    expect(relative(valueOf(result.T), reference.critical.T)).toBeLessThan(1e-4)
    expect(relative(result.extras.column_m_1 as number, reference.critical.length)).toBeLessThan(1e-4)
    expect(relative(result.extras.frequency_1_s_1 as number, Math.sqrt(GRAVITY / 20))).toBeLessThan(1e-4)
    expect(codes(result)).toEqual(expect.arrayContaining(['damping-fits', 'column-agrees']))
  })

  it('sends a swinging level to the method for oscillating tests, whose T it repeats within 10 %', () => {
    const swinging = swingingWell(reference.swinging)
    const full = analyseKind('slug', 'slug-near-critical', swinging, all)
    expect(codes(full)).toContain('damping-weak')
    const spring = analyseKind('slug', 'slug-oscillating', swinging, all)
    expect(relative(valueOf(spring.T), valueOf(full.T))).toBeLessThan(0.1)
  })

  it('draws its fall from the first displacement', () => {
    const result = analyseKind('slug', 'slug-near-critical', inputs, all)
    const [curve] = kindCurve('slug', 'slug-near-critical', inputs, all, result, [-1, 0, ...reference.critical.t])
    expect(curve?.drawdown_m.slice(0, 2)).toEqual([null, 0.6])
    curve?.drawdown_m
      .slice(2)
      .forEach((value, i) => expect(value).toBeCloseTo(0.6 * (reference.critical.h[i] as number), 4))
  })
})
