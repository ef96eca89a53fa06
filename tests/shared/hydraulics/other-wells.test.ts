import { describe, expect, it } from 'vitest'
import type { AnalysisInputs, OtherWell } from '#shared/hydraulics/analysis.ts'
import { analyse, fittedCurve } from '#shared/hydraulics/catalogue.ts'
import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import { findingText } from '#shared/words/findings.ts'
import { unitSystems } from '#shared/quantities/systems.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeSeries, relative, valueOf } from './make-inputs.ts'

const [T, S] = [5e-3, 2e-4]
const rate = 0.01
const elapsed_s = logSpaced(50, 60, 2 * DAY)
const times = [-2 * DAY, 0.2 * DAY, 1.5 * DAY]

/** 300 m east of the pumped well; the observation well stands 40 m east. */
const makeOther = (overrides: Partial<OtherWell> = {}): OtherWell => ({
  wellId: '9',
  label: 'W-9',
  rates: times.map((start_s, i) => ({ start_s, rate_m3_s: [0.004, 0.012, 0][i]! })),
  fitted: false,
  distance_m: 300,
  bearing_deg: 90,
  distances: [
    { wellId: 'o1', distance_m: 260 },
    { wellId: 'p', distance_m: 300 },
  ],
  ...overrides,
})

/** Theis in closed form, each change of rate by itself; what came before the test is part of the static level. */
function byOther(time: number, distance: number, factor = 1): number {
  const at = (moment: number) =>
    [0.004, 0.008, -0.012].reduce((sum, change, i) => {
      const since = moment - times[i]!
      return since > 0 ? sum + theisDrawdown(factor * change, T, S, distance, since) : sum
    }, 0)
  return at(time) - at(0)
}

function inputsWith(other: Partial<OtherWell>, factor = 1): AnalysisInputs {
  const drawdown_m = elapsed_s.map((time) => theisDrawdown(rate, T, S, 40, time) + byOther(time, 260, factor))
  const series = makeSeries({
    distance_m: 40,
    bearing_deg: 90,
    elapsed_s,
    drawdown_m,
    included: elapsed_s.map(() => true),
  })
  return makeInputs({ rates: [{ start_s: 0, rate_m3_s: rate }], series: [series], otherWells: [makeOther(other)] })
}
const codes = ({ findings }: { findings: { code: string }[] }) => findings.map(({ code }) => code)

describe('another pumping well', () => {
  it('is superposed by a curve, so that the aquifer of both comes out', () => {
    const result = analyse('theis', inputsWith({}), makeOptions())
    expect(relative(valueOf(result.T), T)).toBeLessThan(1e-6)
    expect(relative(valueOf(result.S), S)).toBeLessThan(1e-5)
    expect(codes(result)).toContain('other-well-superposed')
  })

  it('that began to pump in the middle of the record before is counted from the mean of that record, as drawdown is', () => {
    const before = Array.from({ length: 61 }, (_, i) => (i - 60) * 0.08 * DAY)
    const asked = [...before, ...elapsed_s]
    const moved = asked.map((time) => byOther(time, 260) + (time > 0 ? theisDrawdown(rate, T, S, 40, time) : 0))
    const mean = moved.slice(0, before.length).reduce((sum, value) => sum + value, 0) / before.length
    expect(-mean).toBeGreaterThan(0.05)
    const inputs = inputsWith({})
    const readings = {
      elapsed_s: asked,
      drawdown_m: moved.map((value) => value - mean),
      included: asked.map(() => true),
    }
    const result = analyse(
      'theis',
      { ...inputs, series: [{ ...inputs.series[0]!, ...readings, zero: 'mean-before' }] },
      makeOptions(),
    )
    expect(relative(valueOf(result.T), T)).toBeLessThan(1e-6)
    expect(relative(valueOf(result.S), S)).toBeLessThan(1e-5)
  })

  it('spoils the curve where it is not told of', () => {
    const { otherWells: _none, ...without } = inputsWith({})
    expect(relative(valueOf(analyse('theis', without, makeOptions()).T), T)).toBeGreaterThan(0.05)
  })

  it('has one factor on its rates fitted together with the aquifer', () => {
    const result = analyse('theis', inputsWith({ fitted: true }, 1.7), makeOptions())
    const factor = result.others!.find(({ id }) => id === 'rate_factor:W-9')!
    expect(relative(factor.value, 1.7)).toBeLessThan(1e-5)
    expect(factor.determined).toBe(true)
    expect(relative(valueOf(result.T), T)).toBeLessThan(1e-5)
    const [curve] = fittedCurve('theis', inputsWith({ fitted: true }, 1.7), makeOptions(), result, [DAY])
    expect(curve!.drawdown_m[0]).toBeCloseTo(theisDrawdown(rate, T, S, 40, DAY) + byOther(DAY, 260, 1.7), 6)
  })

  it('draws in one place what a well there would draw in its own: the two may change places', () => {
    const at = (distance_m: number, other: OtherWell) => {
      const inputs = makeInputs({
        rates: [{ start_s: 0, rate_m3_s: rate }],
        series: [makeSeries({ distance_m, bearing_deg: 90 })],
        otherWells: [{ ...other, distances: [{ wellId: 'o1', distance_m: Math.abs(300 - distance_m) }] }],
      })
      const fitted = analyse('theis', inputsWith({}), makeOptions())
      return fittedCurve('theis', inputs, makeOptions(), fitted, logSpaced(5, 600, DAY))[0]!.drawdown_m
    }
    const same = makeOther({ rates: [{ start_s: 0, rate_m3_s: rate }] })
    at(40, same).forEach((value, i) => expect(value).toBeCloseTo(at(260, same)[i]!, 12))
  })

  it('feels a stream as the pumped well does: between two wells alike the drawdown is the same seen from either', () => {
    // A stream 500 m north of both; the images stand 1000 m north of each.
    const boundaries = [{ kind: 'recharge' as const, distance_m: 500, bearing_deg: 0 }]
    const image = Math.hypot(1000, 40)
    const drawdown_m = elapsed_s.map(
      (time) =>
        theisDrawdown(rate, T, S, 40, time) -
        theisDrawdown(rate, T, S, image, time) +
        byOther(time, 260) -
        byOther(time, Math.hypot(1000, 260)),
    )
    const inputs = inputsWith({})
    const bounded = { ...inputs, series: [{ ...inputs.series[0]!, drawdown_m }] }
    const result = analyse('theis', bounded, makeOptions({ boundaries }))
    expect(relative(valueOf(result.T), T)).toBeLessThan(1e-5)
    const east = [{ ...boundaries[0]!, distance_m: 200, bearing_deg: 90 }]
    expect(() => analyse('theis', bounded, makeOptions({ boundaries: east }))).toThrow('analysis/other-well-behind')
    const sought = [{ ...boundaries[0]!, distance_m: null }]
    expect(() => analyse('theis', bounded, makeOptions({ boundaries: sought }))).toThrow(
      'analysis/other-wells-boundary',
    )
  })

  it('is passed over by a straight line, which says so beside the number', () => {
    const result = analyse('cooper-jacob', inputsWith({}), makeOptions())
    const finding = result.findings.find(({ code }) => code === 'other-well-not-counted')!
    expect(finding.severity).toBe('caution')
    expect(findingText(finding, unitSystems[0]!)).toContain('W-9 pumped too')
  })

  it('needs a distance from every well that is fitted', () => {
    const nowhere = inputsWith({ distances: [] })
    expect(() => analyse('theis', nowhere, makeOptions())).toThrow('analysis/other-well-distance')
  })
})

describe('corrected readings', () => {
  it('are named with the result, with what is to be borne in mind', () => {
    const short = {
      code: 'antecedent-short',
      severity: 'caution' as const,
      params: { antecedent_s: DAY, test_s: 2 * DAY },
    }
    const trend = {
      kind: 'trend' as const,
      given: false,
      outside: null,
      record: { slope_m_s: 1e-8 },
      findings: [short],
    }
    const inputs = inputsWith({})
    const corrected = { ...inputs, series: [{ ...inputs.series[0]!, corrections: [trend] }] }
    const { findings } = analyse('theis', corrected, makeOptions())
    expect(findings.map(({ code }) => code)).toEqual(
      expect.arrayContaining(['correction-applied', 'antecedent-short', 'other-well-and-trend']),
    )
    for (const finding of findings) expect(findingText(finding, unitSystems[0]!)).toMatch(/\.$/)
  })
})
