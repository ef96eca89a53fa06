import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { analyse, fittedCurve } from '#shared/hydraulics/catalogue.ts'
import { recoveryAbscissa } from '#shared/hydraulics/recovery-line.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { drawdownHistory } from '#shared/hydraulics/superposition.ts'
import { theisDrawdown, theisRespond } from '#shared/hydraulics/theis.ts'
import { DAY, logSpaced, makeInputs, makeOptions, makeTheisSeries, relative, valueOf } from './make-inputs.ts'

const truth = { T: 5e-3, S: 2e-4 }
const stop = DAY
const rates = [
  { start_s: 0, rate_m3_s: 0.01 },
  { start_s: stop, rate_m3_s: 0 },
]
const afterStop = logSpaced(40, 60, 2 * DAY).map((since) => stop + since)

describe('recovery', () => {
  it('superposed equals the closed form W(u) − W(u′)', () => {
    fc.assert(
      fc.property(fc.double({ min: 10, max: 1e6, noNaN: true }), (since) => {
        const time = stop + since
        const [superposed] = drawdownHistory(
          theisRespond([5e-3, 2e-4], { distance_m: 50 }),
          2,
          rateHistory(rates).increments,
          [time],
        )
        const closed = theisDrawdown(0.01, 5e-3, 2e-4, 50, time) - theisDrawdown(0.01, 5e-3, 2e-4, 50, since)
        expect(Math.abs((superposed as number) - closed)).toBeLessThan(1e-12)
      }),
    )
  })

  it('finds T from late residual drawdown, with t/t′ near 1 at zero, and gives no S', () => {
    const series = makeTheisSeries(truth, { rates, elapsed_s: afterStop })
    const withPumping = makeTheisSeries(truth, { rates, elapsed_s: [...logSpaced(30, 60, stop), ...afterStop] })
    const result = analyse('recovery', makeInputs({ rates, series: [withPumping] }), makeOptions())
    expect(relative(valueOf(result.T), truth.T)).toBeLessThan(0.02)
    expect(result.extras.storage_ratio).toBeCloseTo(1, 1)
    expect(result.findings.map(({ code }) => code)).toEqual(
      expect.arrayContaining(['u-small', 'recovery-ratio-near-one']),
    )
    expect(result.S).toBeNull()
    const alone = analyse(
      'recovery',
      makeInputs({ rates, series: [series] }),
      makeOptions({ window: { from_s: 7200, to_s: 2 * DAY } }),
    )
    expect(relative(valueOf(alone.T), truth.T)).toBeLessThan(0.01)
    expect(alone.findings.map(({ code }) => code)).toContain('u-unknown')
  })

  it('agrees with the drawdown line of the same test, which has the same T and other readings', () => {
    const elapsed_s = [...logSpaced(40, 60, stop), ...afterStop]
    const inputs = makeInputs({ rates, series: [makeTheisSeries(truth, { rates, elapsed_s })] })
    const pumping = analyse('cooper-jacob', inputs, makeOptions())
    const recovered = analyse('recovery', inputs, makeOptions())
    expect(relative(valueOf(pumping.T), valueOf(recovered.T))).toBeLessThan(0.03)
  })

  it('has the abscissa log10(t/t′) for one rate, by superposition and by equivalent time alike', () => {
    const history = rateHistory(rates)
    for (const since of [60, 3600, DAY]) {
      const expected = Math.log10((stop + since) / since)
      expect(recoveryAbscissa(history, makeOptions(), stop + since)).toBeCloseTo(expected, 12)
      expect(recoveryAbscissa(history, makeOptions({ rateHistory: 'equivalent' }), stop + since)).toBeCloseTo(
        expected,
        12,
      )
    }
  })

  it('keeps T right after a rate that varied, better by superposition than by equivalent time', () => {
    const varied = [
      { start_s: 0, rate_m3_s: 0.02 },
      { start_s: stop / 2, rate_m3_s: 0.01 },
      { start_s: stop, rate_m3_s: 0 },
    ]
    const series = makeTheisSeries(truth, { rates: varied, elapsed_s: afterStop })
    const inputs = makeInputs({ rates: varied, series: [series] })
    const options = makeOptions({ window: { from_s: 3600, to_s: 2 * DAY } })
    const error = (result: ReturnType<typeof analyse>) => relative(valueOf(result.T), truth.T)
    const superposed = error(analyse('recovery', inputs, options))
    const equivalent = error(analyse('recovery', inputs, { ...options, rateHistory: 'equivalent' }))
    expect(superposed).toBeLessThan(0.01)
    expect(superposed).toBeLessThan(equivalent)
    expect(equivalent).toBeLessThan(0.1)
  })

  it('names a level that is back too early, and one that stays down', () => {
    const shifted = (by: number) => {
      const series = makeTheisSeries(truth, { rates, elapsed_s: afterStop })
      const moved = { ...series, drawdown_m: series.drawdown_m.map((value) => value + by) }
      const options = makeOptions({ window: { from_s: 3600, to_s: 2 * DAY } })
      return analyse('recovery', makeInputs({ rates, series: [moved] }), options).findings.map(({ code }) => code)
    }
    expect(shifted(-0.15)).toContain('recovery-ratio-high')
    expect(shifted(0.15)).toContain('recovery-ratio-low')
  })

  it('draws its line after the stop only', () => {
    const inputs = makeInputs({ rates, series: [makeTheisSeries(truth, { rates, elapsed_s: afterStop })] })
    const options = makeOptions({ window: { from_s: 3600, to_s: 2 * DAY } })
    const result = analyse('recovery', inputs, options)
    const times = [stop - 1, stop, ...afterStop.slice(30)]
    const [curve] = fittedCurve('recovery', inputs, options, result, times)
    expect(curve?.drawdown_m.slice(0, 2)).toEqual([null, null])
    const exact = inputs.series[0]?.drawdown_m.slice(30) ?? []
    curve?.drawdown_m.slice(2).forEach((value, i) => expect(value).toBeCloseTo(exact[i] as number, 3))
  })

  it('refuses a test that never stopped', () => {
    expect(() => analyse('recovery', makeInputs(), makeOptions())).toThrow('analysis/no-recovery')
  })
})
