import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { analyse, fittedCurve } from '#shared/hydraulics/catalogue.ts'
import { thinningCorrection, uncorrectedDrawdown } from '#shared/hydraulics/unconfined.ts'
import { logSpaced, makeInputs, makeOptions, makeTheisSeries, relative, valueOf } from './make-inputs.ts'

const truth = { T: 2e-3, S: 0.1 }

/** Drawdowns as an unconfined aquifer of 10 m shows them when the corrected ones are Theis. */
function makeThinned({ hours = 96, thickness_m = 10, distance_m = 5 } = {}) {
  const exact = makeTheisSeries(truth, { distance_m, elapsed_s: logSpaced(40, 3600, hours * 3600) })
  const measured = exact.drawdown_m.map((value) => uncorrectedDrawdown(value, thickness_m) as number)
  return makeInputs({
    aquifer: 'unconfined',
    thickness_m,
    thicknessBasis: 'saturated',
    series: [{ ...exact, drawdown_m: measured }],
  })
}
const codes = (result: ReturnType<typeof analyse>) => result.findings.map(({ code }) => code)

describe('thinning of an unconfined aquifer', () => {
  it('is undone by its inverse and is less than the drawdown', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 0.5, noNaN: true }), (share) => {
        const corrected = thinningCorrection(10 * share, 10)
        expect(corrected).toBeLessThan(10 * share)
        expect(uncorrectedDrawdown(corrected, 10)).toBeCloseTo(10 * share, 10)
      }),
    )
  })

  it('corrected, gives back T, and S times (b − s)/b with s at the end', () => {
    const inputs = makeThinned()
    const options = makeOptions({ thinning: true })
    const result = analyse('theis', inputs, options)
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(1e-7)
    const last = inputs.series[0]?.drawdown_m.at(-1) as number
    expect(relative(valueOf(result.S), (truth.S * (10 - last)) / 10)).toBeLessThan(1e-7)
    const [curve] = fittedCurve('theis', inputs, options, result, [96 * 3600])
    expect(curve?.drawdown_m[0]).toBeCloseTo(last, 6)
  })

  it('is offered above a tenth of the thickness, and T reads low without it', () => {
    const plain = analyse('theis', makeThinned(), makeOptions())
    expect(codes(plain)).toContain('thinning-offered')
    expect(valueOf(plain.T)).toBeLessThan(0.99 * truth.T)
    expect(codes(analyse('theis', makeThinned({ thickness_m: 100 }), makeOptions()))).not.toContain('thinning-offered')
  })

  it('is refused without thickness, in a confined aquifer, above half of it, and for early readings', () => {
    const options = makeOptions({ thinning: true })
    const run =
      (inputs: ReturnType<typeof makeThinned>, more = {}) =>
      () =>
        analyse('theis', inputs, { ...options, ...more })
    expect(run({ ...makeThinned(), thickness_m: null })).toThrow('analysis/no-thickness')
    expect(run({ ...makeThinned(), aquifer: 'confined' })).toThrow('analysis/not-unconfined')
    expect(run({ ...makeThinned(), thickness_m: 2 })).toThrow('analysis/thinning-too-large')
    expect(run(makeThinned({ hours: 24 }))).toThrow('analysis/thinning-early')
    expect(run(makeThinned({ hours: 24 }), { afterDrainage: true })).not.toThrow()
    expect(() => thinningCorrection(6, 10)).toThrow(RangeError)
    expect(() => thinningCorrection(1, 0)).toThrow(RangeError)
  })

  it('shorter than 72 h gives an apparent storage, longer a specific yield, unless the analyst knows better', () => {
    const classOf = (hours: number, afterDrainage: boolean | null = null) =>
      analyse('theis', makeThinned({ hours }), makeOptions({ afterDrainage })).storageClass
    expect([classOf(24), classOf(96), classOf(24, true), classOf(96, false)]).toEqual([
      'apparent',
      'specific-yield',
      'specific-yield',
      'apparent',
    ])
    const confined = { ...makeThinned(), aquifer: 'confined' as const }
    expect(analyse('theis', confined, makeOptions()).storageClass).toBe('elastic')
  })

  it('makes readings beyond half of the thickness a bad finding where it is not asked for', () => {
    const deep = { ...makeThinned(), thickness_m: 2 }
    expect(analyse('theis', deep, makeOptions()).findings).toContainEqual(
      expect.objectContaining({ code: 'thinning-too-large', severity: 'bad' }),
    )
  })
})
