import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { analyseKind, kindCurve } from '#shared/hydraulics/kinds.ts'
import { bouwerRiceConductivity, curveValue, dissipationLog } from '#shared/hydraulics/slug/bouwer-rice.ts'
import { effectiveCasingRadius } from '#shared/hydraulics/slug/effective-radius.ts'
import { slugResponse } from '#shared/hydraulics/slug/cooper-bredehoeft-papadopulos.ts'
import { shapeFactors } from '#shared/hydraulics/slug/shape-factors.ts'
import reference from '../../reference/test-kinds.json'
import { relative, valueOf } from './make-inputs.ts'
import { makeRepeat, makeSlugInputs, makeSlugOptions } from './make-slug.ts'

const codes = ({ findings }: { findings: { code: string }[] }) => findings.map(({ code }) => code)
const all = makeSlugOptions()

describe('shape factors', () => {
  const screen = { length_m: 3, radius_m: 0.05, stretch: 1 }

  it('come to 2πL/ln(L/R) for long screens, as handbooks print it for L/R above 8', () => {
    const long = shapeFactors['screen-in-aquifer'].factor({ ...screen, length_m: 20 })
    expect(relative(long, (2 * Math.PI * 20) / Math.log(400))).toBeLessThan(1e-5)
    const short = shapeFactors['screen-in-aquifer'].factor({ ...screen, length_m: 0.4 })
    expect(relative(short, (2 * Math.PI * 0.4) / Math.log(8))).toBeLessThan(0.01)
  })

  it('of a screen at a tight layer are half of those of the screen and its mirror image', () => {
    const half = shapeFactors['screen-at-boundary'].factor(screen)
    const whole = shapeFactors['screen-in-aquifer'].factor({ ...screen, length_m: 6 })
    expect(half).toBeCloseTo(whole / 2, 12)
    expect(shapeFactors.hemisphere.factor(screen)).toBeCloseTo(shapeFactors.sphere.factor(screen) / 2, 12)
  })

  it('fall with horizontal layering, which lets a screen act shorter than it is', () => {
    const layered = shapeFactors['screen-in-aquifer'].factor({ ...screen, stretch: 3 })
    expect(layered).toBeLessThan(shapeFactors['screen-in-aquifer'].factor(screen))
  })
})

describe('Hvorslev', () => {
  it('gives K = r²·ln(L/R)/(2·L·T0) for a head that falls to 37 % in T0', () => {
    const result = analyseKind('slug', 'hvorslev', makeSlugInputs(), all)
    const handbook = (0.025 ** 2 * Math.log(2 / 0.05)) / (2 * 2 * 30)
    expect(relative(valueOf(result.K), handbook)).toBeLessThan(1e-3)
    expect(relative(valueOf(result.T), valueOf(result.K) * 10)).toBeLessThan(1e-12)
    expect(result.S).toBeNull()
  })

  it('draws its line through the heads recommended, and says when others are chosen', () => {
    const inputs = makeSlugInputs()
    const result = analyseKind('slug', 'hvorslev', inputs, all)
    expect(result.fit.n).toBe(inputs.repeats[0]?.displacement_m.filter((s) => s <= 0.125 && s >= 0.075).length)
    expect(codes(result)).not.toContain('heads-other')
    const other = analyseKind('slug', 'hvorslev', inputs, makeSlugOptions({ heads: { from: 0.1, to: 0.9 } }))
    expect(codes(other)).toContain('heads-other')
    expect(relative(valueOf(other.K), valueOf(result.K))).toBeLessThan(1e-9)
  })

  it('has the slope of linregress within the same heads', () => {
    const { t, h, n, slope, intercept } = reference.slugLine
    const repeat = makeRepeat({ elapsed_s: t, displacement_m: h.map((head) => -0.8 * head), initial_m: -0.8 })
    const inputs = makeSlugInputs({ repeats: [repeat] })
    const result = analyseKind('slug', 'hvorslev', inputs, makeSlugOptions({ heads: { from: 0.2, to: 0.3 } }))
    expect(result.fit.n).toBe(n)
    expect(relative(result.extras.slope_1 as number, slope)).toBeLessThan(1e-10)
    expect(result.extras.intercept_1).toBeCloseTo(intercept, 10)
  })

  it('draws the fall that it was given, and takes a line drawn by hand', () => {
    const inputs = makeSlugInputs()
    const result = analyseKind('slug', 'hvorslev', inputs, all)
    const [curve] = kindCurve('slug', 'hvorslev', inputs, all, result, [-1, 0, 30])
    expect(curve?.drawdown_m).toEqual([null, expect.closeTo(0.5, 9), expect.closeTo(0.5 / Math.E, 9)])
    const line = { slope: 2 / (30 * Math.LN10), intercept: 0 }
    const drawn = analyseKind('slug', 'hvorslev', inputs, makeSlugOptions({ line }))
    expect(relative(valueOf(drawn.K), 2 * valueOf(result.K))).toBeLessThan(1e-9)
    expect(codes(drawn)).toContain('hand-line')
  })

  it('says that a screen is short', () => {
    expect(codes(analyseKind('slug', 'hvorslev', makeSlugInputs({ screenLength_m: 0.3 }), all))).toContain(
      'screen-short',
    )
  })
})

describe('Bouwer & Rice', () => {
  it('repeats the example of Bouwer & Rice 1976, a well near Phoenix (from memory)', () => {
    const well = { length_m: 4.56, depth_m: 5.5, thickness_m: 80, radius_m: 0.12 }
    expect(dissipationLog(well)).toBeCloseTo(2.37, 1)
    const K = bouwerRiceConductivity(0.076, well, 0.238)
    expect(relative(K, 3.6e-4)).toBeLessThan(0.02)
  })

  it('reads A, B and C near the printed curves (Bouwer & Rice 1976, figure 3, from memory)', () => {
    expect(curveValue('A', 38)).toBeCloseTo(2.7, 1)
    expect(curveValue('B', 38)).toBeCloseTo(0.43, 2)
    expect(curveValue('C', 1000) / curveValue('A', 1000)).toBeGreaterThan(1)
  })

  it('moves K by well under one percent with the other constant of C in circulation', () => {
    const well = { length_m: 5, depth_m: 8, thickness_m: 8, radius_m: 0.1 }
    const ofDepth = 1.1 / Math.log(80)
    const other = 1 / (ofDepth + (curveValue('C', 50) - 0.792 + 0.729) / 50)
    expect(relative(other, dissipationLog(well))).toBeLessThan(0.006)
    expect(relative(other, dissipationLog(well))).toBeGreaterThan(0.001)
  })

  it('gives K near that of Hvorslev for the same fall (common practice: within a factor of two)', () => {
    const inputs = makeSlugInputs()
    const ratio =
      valueOf(analyseKind('slug', 'bouwer-rice', inputs, all).K) /
      valueOf(analyseKind('slug', 'hvorslev', inputs, all).K)
    expect(ratio).toBeGreaterThan(0.5)
    expect(ratio).toBeLessThan(1)
  })

  it('counts the filter pack where the level stands in the screen', () => {
    const filterPack = { radius_m: 0.1, porosity: 0.3 }
    const inputs = makeSlugInputs({ filterPack, screenTop_m: -0.5 })
    expect(effectiveCasingRadius(inputs)).toBeCloseTo(Math.sqrt(0.025 ** 2 + 0.3 * (0.1 ** 2 - 0.025 ** 2)), 12)
    expect(effectiveCasingRadius({ ...inputs, screenTop_m: 1 })).toBe(0.025)
    expect(codes(analyseKind('slug', 'bouwer-rice', inputs, all))).toContain('filter-pack-drains')
  })

  it('needs the saturated thickness and a screen inside it', () => {
    const run =
      (overrides = {}) =>
      () =>
        analyseKind('slug', 'bouwer-rice', makeSlugInputs(overrides), all)
    expect(run({ thickness_m: null })).toThrow(expect.objectContaining({ params: { dimension: 'thickness_m' } }))
    expect(run({ thickness_m: 4 })).toThrow(expect.objectContaining({ params: { dimension: 'screenTop_m' } }))
  })
})

describe('two straight lines', () => {
  const bent = (early: number, late: number, bend: number) => {
    const elapsed_s = Array.from({ length: 100 }, (_, i) => i + 1)
    const head = (t: number) => Math.exp(-Math.min(t, bend) / early - Math.max(0, t - bend) / late)
    return makeRepeat({ elapsed_s, displacement_m: elapsed_s.map((t) => 0.5 * head(t)) })
  }

  it('are found, named after the filter pack, and K is that of the second', () => {
    const repeat = bent(20, 60, 15)
    const filterPack = { radius_m: 0.1, porosity: 0.3 }
    const inputs = makeSlugInputs({ repeats: [repeat], screenTop_m: -0.5, filterPack })
    const result = analyseKind('slug', 'bouwer-rice', inputs, all)
    const found = result.findings.find(({ code }) => code === 'double-straight-line')
    expect(found?.params.ratio).toBeCloseTo(3, 1)
    expect(found?.params.time_s).toBeCloseTo(15, 0)
    expect(result.extras.slope_1).toBeCloseTo(1 / (60 * Math.LN10), 6)
  })

  it('without a reason in the construction are named as such, and a smooth curve as a curve', () => {
    const inputs = makeSlugInputs({ repeats: [bent(20, 60, 15)] })
    expect(codes(analyseKind('slug', 'hvorslev', inputs, all))).toContain('double-straight-line-unexplained')
    const curved = makeRepeat({
      elapsed_s: reference.storage.t,
      displacement_m: reference.storage.t.map((t) => 0.5 * slugResponse(2e-5, 0.1, 0.05, 0.05, t)),
    })
    expect(codes(analyseKind('slug', 'hvorslev', makeSlugInputs({ repeats: [curved] }), all))).toContain('heads-curved')
  })

  it('are not seen in one line with noise', () => {
    const { t, h } = reference.slugLine
    const inputs = makeSlugInputs({ repeats: [makeRepeat({ elapsed_s: t, displacement_m: h, initial_m: 1 })] })
    const found = codes(analyseKind('slug', 'hvorslev', inputs, all))
    expect(found.filter((code) => code.startsWith('double') || code === 'heads-curved')).toEqual([])
  })
})

describe('repeats', () => {
  const repeatOf = (id: string, initial_m: number, lag: number) => {
    const elapsed_s = Array.from({ length: 150 }, (_, i) => i + 1)
    return makeRepeat({
      id,
      label: id,
      initial_m,
      elapsed_s,
      displacement_m: elapsed_s.map((t) => initial_m * Math.exp(-t / lag)),
    })
  }
  const run = (...repeats: ReturnType<typeof repeatOf>[]) =>
    analyseKind('slug', 'hvorslev', makeSlugInputs({ repeats }), all)

  it('of different size that agree are good, alike ones tell less, and fewer than three are noted', () => {
    expect(codes(run(repeatOf('a', 0.3, 30), repeatOf('b', -0.6, 31), repeatOf('c', 0.9, 30)))).toContain(
      'repeats-agree',
    )
    const two = codes(run(repeatOf('a', 0.5, 30), repeatOf('b', 0.5, 31)))
    expect(two).toEqual(expect.arrayContaining(['repeats-few', 'repeats-alike']))
  })

  it('that slow down with the slug depend on the head; others just disagree', () => {
    expect(codes(run(repeatOf('a', 0.3, 25), repeatOf('b', 0.6, 32), repeatOf('c', 1.2, 40)))).toContain(
      'depends-on-head',
    )
    expect(codes(run(repeatOf('a', 0.3, 32), repeatOf('b', 0.6, 25), repeatOf('c', 1.2, 40)))).toContain(
      'repeats-disagree',
    )
  })

  it('are pooled by the geometric mean, with an interval that holds their spread', () => {
    const result = run(repeatOf('a', 0.3, 20), repeatOf('b', 0.6, 30), repeatOf('c', 1.2, 45))
    const one = valueOf(run(repeatOf('b', 0.6, 30)).K)
    expect(relative(valueOf(result.K), one)).toBeLessThan(1e-9)
    expect(result.K?.low).toBeLessThan(one / 2)
  })

  it('do not depend on their order, nor on those left out', () => {
    const [a, b] = [repeatOf('a', 0.3, 20), repeatOf('b', 0.6, 30)]
    expect(valueOf(run(a, b).K)).toBeCloseTo(valueOf(run(b, a).K), 14)
    const inputs = makeSlugInputs({ repeats: [a, b] })
    const chosen = analyseKind('slug', 'hvorslev', inputs, makeSlugOptions({ repeatIds: ['b'] }))
    expect(valueOf(chosen.K)).toBe(valueOf(run(b).K))
  })
})

describe('slug tests by a line', () => {
  it('give the same in feet and minutes as in metres and seconds', () => {
    const foot = 0.3048
    fc.assert(
      fc.property(
        fc.constantFrom('hvorslev', 'bouwer-rice'),
        fc.double({ min: 5, max: 200, noNaN: true }),
        (id, lag) => {
          const elapsed_s = Array.from({ length: 60 }, (_, i) => ((i + 1) * lag) / 15)
          const displacement_m = elapsed_s.map((t) => 0.5 * Math.exp(-t / lag))
          const si = makeSlugInputs({ repeats: [makeRepeat({ elapsed_s, displacement_m })] })
          const imperial = {
            ...si,
            repeats: [
              makeRepeat({
                initial_m: 0.5 / foot,
                elapsed_s: elapsed_s.map((t) => t / 60),
                displacement_m: displacement_m.map((s) => s / foot),
              }),
            ],
            casingRadius_m: si.casingRadius_m / foot,
            wellRadius_m: si.wellRadius_m / foot,
            screenRadius_m: si.screenRadius_m / foot,
            screenLength_m: si.screenLength_m / foot,
            screenTop_m: si.screenTop_m / foot,
            thickness_m: 10 / foot,
          }
          const [a, b] = [si, imperial].map((inputs) => analyseKind('slug', id, inputs, all))
          expect(relative((valueOf(b?.K ?? null) * foot) / 60, valueOf(a?.K ?? null))).toBeLessThan(1e-9)
          expect(relative((valueOf(b?.T ?? null) * foot ** 2) / 60, valueOf(a?.T ?? null))).toBeLessThan(1e-9)
        },
      ),
      { numRuns: 30 },
    )
  })

  it('refuse what they cannot use', () => {
    const run =
      (overrides = {}, options = all) =>
      () =>
        analyseKind('slug', 'hvorslev', makeSlugInputs(overrides), options)
    expect(run({ repeats: [] })).toThrow('analysis/no-repeats')
    expect(run({}, makeSlugOptions({ repeatIds: ['x'] }))).toThrow('analysis/no-repeats')
    expect(run({ repeats: [makeRepeat({ initial_m: 0 })] })).toThrow('analysis/initial-head')
    expect(run({ repeats: [makeRepeat({ displacement_m: [1] })] })).toThrow('analysis/uneven-series')
    expect(run({ casingRadius_m: 0 })).toThrow('analysis/dimension')
    expect(run({ screenLength_m: NaN })).toThrow('analysis/dimension')
    expect(run({ screenTop_m: -2 })).toThrow('analysis/dimension')
    expect(run({ filterPack: { radius_m: 0.01, porosity: 0.3 } })).toThrow('analysis/dimension')
    expect(run({}, makeSlugOptions({ heads: { from: 0.4, to: 0.3 } }))).toThrow('analysis/bad-option')
    expect(run({}, makeSlugOptions({ heads: { from: 0.5, to: 0.51 } }))).toThrow('analysis/slug-readings')
    const rising = makeRepeat({ displacement_m: Array.from({ length: 120 }, (_, i) => 0.11 + i * 1e-4) })
    expect(run({ repeats: [rising] })).toThrow('analysis/slope-not-positive')
  })
})
