import { describe, expect, it } from 'vitest'
import { analyse, fittedCurve } from '#shared/hydraulics/catalogue.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeTheisSeries, relative, valueOf } from './make-inputs.ts'

const truth = { T: 8e-3, S: 1.5e-4 }
const wellIds = ['a', 'b', 'c', 'd']

function makeWells(overrides = {}) {
  return [10, 25, 60, 90].map((distance_m, i) =>
    makeTheisSeries(truth, {
      wellId: wellIds[i] as string,
      distance_m,
      elapsed_s: logSpaced(50, 60, DAY),
      ...overrides,
    }),
  )
}

describe('distance–drawdown', () => {
  it('finds T and S of late readings within the error that it shows', () => {
    const result = analyse('distance-drawdown', makeInputs({ series: makeWells() }), makeOptions({ wellIds }))
    const shown = result.findings.find(({ code }) => code === 'u-small')
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(Number(shown?.params.slopeError))
    expect(relative(valueOf(result.S), truth.S)).toBeLessThan(0.02)
    expect(result.fit.n).toBe(4)
  })

  it('agrees with the time–drawdown line of one of the wells', () => {
    const inputs = makeInputs({ series: makeWells() })
    const distance = analyse('distance-drawdown', inputs, makeOptions({ wellIds }))
    const time = analyse('cooper-jacob', inputs, makeOptions({ wellIds: ['a'] }))
    expect(relative(valueOf(distance.T), valueOf(time.T))).toBeLessThan(0.01)
    expect(relative(valueOf(distance.S), valueOf(time.S))).toBeLessThan(0.05)
  })

  it('compares the wells at the moment asked for, between readings', () => {
    const options = makeOptions({ wellIds, time_s: 50_000 })
    const inputs = makeInputs({ series: makeWells() })
    const result = analyse('distance-drawdown', inputs, options)
    expect(result.extras.time_s).toBe(50_000)
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(0.01)
    const curve = fittedCurve('distance-drawdown', inputs, options, result, [50_000, -5])[1]
    expect(curve?.drawdown_m).toEqual([
      expect.closeTo((result.extras.intercept_m as number) + (result.extras.slope_m as number) * Math.log10(25), 10),
      null,
    ])
  })

  it('leaves out the pumped well, and says so', () => {
    const pumped = makeTheisSeries(truth, {
      wellId: 'p',
      role: 'pumped',
      wellRadius_m: 0.1,
      elapsed_s: logSpaced(50, 60, DAY),
    })
    const inputs = makeInputs({ series: [...makeWells(), pumped] })
    const result = analyse('distance-drawdown', inputs, makeOptions({ wellIds: [...wellIds, 'p'] }))
    expect(result.leftOut).toContainEqual({ wellId: 'p', count: 50, reason: 'pumped-well' })
    expect(result.residuals.map(({ wellId }) => wellId)).toEqual(wellIds)
  })

  it('widens S and T for uncertain distances', () => {
    const sharp = analyse('distance-drawdown', makeInputs({ series: makeWells() }), makeOptions({ wellIds }))
    const vague = analyse(
      'distance-drawdown',
      makeInputs({ series: makeWells({ distanceSd_m: 3 }) }),
      makeOptions({ wellIds }),
    )
    expect(vague.T?.logSd ?? 0).toBeGreaterThan(2 * (sharp.T?.logSd ?? 1))
    expect(vague.S?.logSd ?? 0).toBeGreaterThan(2 * (sharp.S?.logSd ?? 1))
    expect(vague.findings.map(({ code }) => code)).toContain('distance-uncertain')
  })

  it('refuses too few wells, equal distances, and a moment that the wells do not share', () => {
    const inputs = makeInputs({ series: makeWells() })
    const run =
      (changes: object, series = inputs.series) =>
      () =>
        analyse('distance-drawdown', { ...inputs, series }, makeOptions({ wellIds, ...changes }))
    expect(run({ wellIds: ['a', 'b'] })).toThrow('analysis/too-few-wells')
    expect(run({ time_s: 2 * DAY })).toThrow('analysis/no-common-time')
    expect(
      run(
        {},
        inputs.series.map((one) => ({ ...one, distance_m: 40 })),
      ),
    ).toThrow('analysis/distances-equal')
  })
})
