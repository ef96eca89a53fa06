import { describe, expect, it } from 'vitest'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import type { AnalysisInputs, AnalysisOptions, RateStep } from '#shared/hydraulics/analysis.ts'
import { analyse, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { forecastDrawdown, forecastRefusal, type ForecastRequest } from '#shared/hydraulics/forecast.ts'
import { unknownsCovariance } from '#shared/hydraulics/forecast-uncertainty.ts'
import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import { makeNoise } from '../numerics/make-noise.ts'
import { DAY, makeInputs, makeOptions, makeSeries, makeTheisSeries, valueOf } from './make-inputs.ts'

/** A hundred fits take seconds where others work beside. */
const FITS = 60_000
const truth = { T: 4e-3, S: 2e-4 }
const at = (time_s: number, distance_m = 200, rates: RateStep[] = [{ start_s: 0, rate_m3_s: 0.02 }]) => ({
  distance_m,
  rates,
  times_s: [time_s],
})

function analysed(
  { noise_m = 0, seed = 1, ...overrides }: Partial<AnalysisInputs> & { noise_m?: number; seed?: number } = {},
  options: Partial<AnalysisOptions> = {},
  method: MethodId = 'theis',
) {
  const noise = makeNoise(seed, 40).map((value) => noise_m * value)
  const inputs = makeInputs({ series: [makeTheisSeries(truth, { noise })], ...overrides })
  const chosen = makeOptions(options)
  return { inputs, options: chosen, result: analyse(method, inputs, chosen) }
}

const pointAt = (from: ReturnType<typeof analysed>, request: ForecastRequest) => {
  const [point] = forecastDrawdown(from, request).points
  return { drawdown_m: point?.drawdown_m ?? NaN, low_m: point?.low_m ?? NaN, high_m: point?.high_m ?? NaN }
}
const codes = (from: ReturnType<typeof analysed>, request: ForecastRequest) =>
  forecastDrawdown(from, request).findings.map(({ code, severity }) => `${code} ${severity}`)

describe('a forecast from a fitted curve', () => {
  it('is the table value W(0.01) = 4.0379 where u is 0.01 (Wenzel 1942, from memory)', () => {
    const time_s = (200 ** 2 * truth.S) / (4 * truth.T * 0.01)
    const { drawdown_m } = pointAt(analysed(), at(time_s))
    expect((drawdown_m * 4 * Math.PI * truth.T) / 0.02).toBeCloseTo(4.0379, 4)
  })

  it('superposes steps of the rate, and a stop, as the sum of their curves', () => {
    const rates = [
      { start_s: 0, rate_m3_s: 0.01 },
      { start_s: 2 * DAY, rate_m3_s: 0.03 },
      { start_s: 5 * DAY, rate_m3_s: 0 },
    ]
    const one = (rate: number, time: number) => theisDrawdown(rate, truth.T, truth.S, 350, time)
    const expected = one(0.01, 7 * DAY) + one(0.02, 5 * DAY) - one(0.03, 2 * DAY)
    expect(pointAt(analysed(), at(7 * DAY, 350, rates)).drawdown_m).toBeCloseTo(expected, 8)
  })

  it('is proportional to the rate, grows with time and falls with distance', () => {
    const from = analysed({ noise_m: 0.01 })
    const base = pointAt(from, at(DAY))
    const double = pointAt(from, at(DAY, 200, [{ start_s: 0, rate_m3_s: 0.04 }]))
    expect(double.drawdown_m / base.drawdown_m).toBeCloseTo(2, 10)
    expect(double.high_m / double.low_m).toBeCloseTo(base.high_m / base.low_m, 8)
    expect(pointAt(from, at(10 * DAY)).drawdown_m).toBeGreaterThan(base.drawdown_m)
    expect(pointAt(from, at(DAY, 400)).drawdown_m).toBeLessThan(base.drawdown_m)
  })

  it('stands behind a barrier as its images make it, and asks for the direction', () => {
    const series = [makeTheisSeries(truth, { bearing_deg: 90 })]
    const boundaries = [{ kind: 'barrier' as const, distance_m: 500, bearing_deg: 0 }]
    const plain = analysed({ series })
    const from = { ...plain, options: { ...plain.options, boundaries } }
    const image_m = Math.hypot(200, 1000)
    const expected = (T: number, S: number) =>
      theisDrawdown(0.02, T, S, 200, DAY) + theisDrawdown(0.02, T, S, image_m, DAY)
    expect(pointAt(from, { ...at(DAY), bearing_deg: 90 }).drawdown_m).toBeCloseTo(expected(truth.T, truth.S), 8)
    expect(() => forecastDrawdown(from, at(DAY))).toThrow(AnalysisError)
  })
})

describe('the band of a forecast', () => {
  it('is the rate error alone where the readings are exact: drawdown is known in proportion', () => {
    const from = analysed({ rateError: 0.05 })
    for (const request of [at(DAY), at(100 * DAY, 800), at(3600, 60)]) {
      const { drawdown_m, low_m, high_m } = pointAt(from, request)
      expect(Math.log(high_m / drawdown_m)).toBeCloseTo(1.959964 * 0.05, 5)
      expect(Math.log(drawdown_m / low_m)).toBeCloseTo(1.959964 * 0.05, 5)
    }
  })

  it('is the distance error alone by its way through S, where the readings are exact', () => {
    const from = analysed({ series: [makeTheisSeries(truth, { distanceSd_m: 2 })] })
    const u = (200 ** 2 * truth.S) / (4 * truth.T * DAY)
    const expected = (1.959964 * 2 * 0.04 * Math.exp(-u)) / exponentialIntegral(u)
    const { drawdown_m, high_m } = pointAt(from, at(DAY))
    expect(Math.log(high_m / drawdown_m) / expected).toBeCloseTo(1, 4)
  })

  it('is that of many aquifers drawn from the covariance of ln T and ln S', () => {
    const from = analysed({ noise_m: 0.02, rateError: 0.05 })
    const [[tt = 0, ts = 0] = [], [, ss = 0] = []] = unknownsCovariance(from)
    const draws = makeNoise(7, 20_000)
    const [T, S] = [valueOf(from.result.T), valueOf(from.result.S)]
    const drawdowns = Array.from({ length: 10_000 }, (_, i) => {
      const [a, b] = [draws[2 * i] as number, draws[2 * i + 1] as number]
      const x = Math.sqrt(tt) * a
      const y = (ts / Math.sqrt(tt)) * a + Math.sqrt(ss - (ts * ts) / tt) * b
      return theisDrawdown(0.02, T * Math.exp(x), S * Math.exp(y), 200, 30 * DAY)
    }).sort((a, b) => a - b)
    const { low_m, high_m } = pointAt(from, at(30 * DAY))
    expect(low_m / (drawdowns[250] as number)).toBeCloseTo(1, 2)
    expect(high_m / (drawdowns[9750] as number)).toBeCloseTo(1, 2)
  })

  it(
    'holds the true drawdown in 90 to 99 of a hundred noisy tests',
    () => {
      const exact = theisDrawdown(0.02, truth.T, truth.S, 300, 30 * DAY)
      const held = Array.from({ length: 100 }, (_, i) => {
        const { low_m, high_m } = pointAt(analysed({ noise_m: 0.02, seed: i + 1 }), at(30 * DAY, 300))
        return low_m <= exact && exact <= high_m
      }).filter(Boolean).length
      expect(held).toBeGreaterThanOrEqual(90)
      expect(held).toBeLessThanOrEqual(99)
    },
    FITS,
  )

  it('is the same however the readings were weighed, within a tenth of its width, on logarithmic noise', () => {
    const noise = makeNoise(3, 40)
    const series = makeTheisSeries(truth)
    series.drawdown_m = series.drawdown_m.map((value, i) => value * Math.exp(0.02 * (noise[i] as number)))
    const from = analysed({ series: [series] }, { objective: 'log-drawdown' })
    const { drawdown_m, low_m, high_m } = pointAt(from, at(30 * DAY))
    expect(low_m).toBeLessThan(drawdown_m)
    expect(high_m / low_m).toBeLessThan(1.1)
    expect(Math.abs(Math.log(drawdown_m / theisDrawdown(0.02, truth.T, truth.S, 200, 30 * DAY)))).toBeLessThan(0.03)
  })

  it('is nothing before pumping begins', () => {
    const rates = [{ start_s: DAY, rate_m3_s: 0.02 }]
    expect(pointAt(analysed({ noise_m: 0.02 }), at(3600, 200, rates))).toEqual({ drawdown_m: 0, low_m: 0, high_m: 0 })
  })

  it('is the same whenever it is asked for', () => {
    const from = analysed({ noise_m: 0.02 })
    expect(forecastDrawdown(from, at(DAY))).toEqual(forecastDrawdown(from, at(DAY)))
  })
})

describe('what is to be borne in mind about a forecast', () => {
  it('names the reach of the test, more strongly far beyond it', () => {
    const from = analysed()
    expect(codes(from, at(DAY / 2, 40))).toEqual([])
    expect(codes(from, at(3 * DAY, 120))).toEqual(['forecast-longer note', 'forecast-farther note'])
    expect(codes(from, at(30 * DAY, 900))).toEqual(['forecast-longer caution', 'forecast-farther caution'])
  })

  it('names storage that the test was too short for, and thinning of an unconfined aquifer', () => {
    const unconfined = { aquifer: 'unconfined' as const, thickness_m: 20, thicknessBasis: 'saturated' as const }
    const from = analysed(unconfined)
    expect(codes(from, at(DAY / 2, 40))).toEqual(['forecast-apparent-storage caution', 'forecast-thinning caution'])
    const strong = [{ start_s: 0, rate_m3_s: 0.1 }]
    expect(codes(from, at(DAY / 2, 40, strong))).toContain('forecast-thinning-much bad')
  })

  it('names a quantity of the solution that the readings do not determine', () => {
    const from = analysed({ noise_m: 0.02, aquifer: 'leaky' }, {}, 'leaky')
    const loose = (from.result.others ?? []).map((other) => ({ ...other, determined: false }))
    expect(codes(from, at(DAY / 2, 40))).not.toContain('forecast-loose caution')
    expect(codes({ ...from, result: { ...from.result, others: loose } }, at(DAY / 2, 40))).toContain(
      'forecast-loose caution',
    )
  })
})

describe('a forecast is refused', () => {
  it('where the analysis has no curve, no storativity, or does not determine them', () => {
    const line = analysed({}, {}, 'cooper-jacob')
    expect(forecastRefusal(line.result)).toBe('no-curve')
    const pumped = makeTheisSeries(truth, { role: 'pumped', distance_m: 0, wellRadius_m: 0.1 })
    expect(forecastRefusal(analysed({ series: [pumped] }).result)).toBe('no-storage')
    const noisy = analysed({ noise_m: 3 })
    expect(forecastRefusal(noisy.result)).toBe('not-determined')
    expect(forecastRefusal(analysed().result)).toBeNull()
    expect(() => forecastDrawdown(line, at(DAY))).toThrow(RangeError)
  })

  it('at no distance, at a time that is no number, and without pumping', () => {
    const from = analysed()
    for (const distance of [0, -5, NaN, Infinity])
      expect(() => forecastDrawdown(from, at(DAY, distance))).toThrow(RangeError)
    expect(() => forecastDrawdown(from, at(NaN))).toThrow(RangeError)
    expect(() => forecastDrawdown(from, at(DAY, 100, [{ start_s: 0, rate_m3_s: 0 }]))).toThrow(AnalysisError)
  })

  it('when the well that was analysed is gone from the test', () => {
    const from = analysed()
    const inputs = { ...from.inputs, series: [makeSeries({ wellId: 'other' })] }
    expect(() => forecastDrawdown({ ...from, inputs }, at(DAY))).toThrow(AnalysisError)
  })
})
