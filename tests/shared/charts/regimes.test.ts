import { describe, expect, it } from 'vitest'
import { casingMoments } from '#shared/charts/casing-moments.ts'
import { drawnRegimes } from '#shared/charts/regimes.ts'
import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { logSpaced, makeInputs, makeSeries, makeTheisSeries } from '../hydraulics/make-inputs.ts'
import { makeFit, makePlot, truth } from './make-plot.ts'

const times = logSpaced(120, 10, 86_400)

/** One well read often enough for its derivative to show something. */
function makeDense(rates: AnalysisInputs['rates'] = [{ start_s: 0, rate_m3_s: 0.01 }], pumped = false) {
  const well = pumped
    ? { role: 'pumped' as const, distance_m: 0, wellRadius_m: 0.15, casingRadius_m: 0.5 }
    : { distance_m: 20 }
  const series = makeTheisSeries(truth, { rates, elapsed_s: times, included: times.map(() => true), ...well })
  return makeInputs({ rates, series: [series] })
}

describe('The diagnosis on a plot', () => {
  it('stands on the plots that show a derivative, for the well that is asked for', () => {
    const inputs = makeDense()
    const regimesOf = (kind: 'linear' | 'semi-log' | 'log-log', diagnosed: string | null) =>
      makePlot({ kind, inputs, diagnosed }).regimes.map(({ regime }) => regime)
    expect([regimesOf('semi-log', 'o1'), regimesOf('log-log', 'o1')]).toEqual([['radial-flow'], ['radial-flow']])
    expect([regimesOf('linear', 'o1'), regimesOf('semi-log', null), regimesOf('semi-log', 'gone')]).toEqual([
      [],
      [],
      [],
    ])
  })

  it('has its place in the units of the axis', () => {
    const [span] = makePlot({ inputs: makeDense(), diagnosed: 'o1' }).regimes
    expect([span!.from * 60, span!.to * 60]).toEqual([expect.closeTo(span!.from_s, 6), expect.closeTo(span!.to_s, 6)])
  })

  it('reads no derivative past a change of the rate, but past one too small to matter', () => {
    const step = (rate_m3_s: number) => [
      { start_s: 0, rate_m3_s: 0.01 },
      { start_s: 7200, rate_m3_s },
    ]
    const ends = [step(0.02), step(0.0105)].map((rates) => {
      const inputs = makeDense(rates)
      return drawnRegimes({ inputs, wellId: 'o1', clock: makePlot({ inputs }).clock }).at(-1)!.to_s
    })
    expect(ends[0]).toBeLessThan(7200)
    expect(ends[1]).toBeGreaterThan(7200)
  })
})

describe('Casing storage on a plot', () => {
  const inputs = makeDense(undefined, true)
  const plot = makePlot({ inputs })

  it('is marked at 25 and 250 r_c²/T after pumping began, by the T that was found', () => {
    const fit = makeFit('cooper-jacob', {}, inputs)
    const unit_min = 0.5 ** 2 / fit.result.T!.value / 60
    const moments = casingMoments(plot, fit, 0)
    expect(moments.map(({ label }) => label)).toEqual(['25 r_c²/T', '250 r_c²/T'])
    expect(moments.map(({ x }) => x / unit_min)).toEqual([expect.closeTo(25, 9), expect.closeTo(250, 9)])
  })

  it('is not marked for observation wells, for a casing that is not known, or on a linear axis', () => {
    const fit = makeFit('cooper-jacob', {}, inputs)
    const observed = makeDense()
    expect(casingMoments(makePlot({ inputs: observed }), makeFit('cooper-jacob', {}, observed), 0)).toEqual([])
    const unknown = { ...inputs, series: [makeSeries({ ...inputs.series[0], casingRadius_m: null })] }
    expect(casingMoments(plot, { ...fit, inputs: unknown }, 0)).toEqual([])
    expect(casingMoments(makePlot({ inputs, kind: 'linear' }), fit, 0)).toEqual([])
  })
})
