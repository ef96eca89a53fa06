import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { flagSeries, MAD_TO_SIGMA, type FlagOptions } from '#shared/readings/flag-series.ts'
import { centredMedian, localMedian } from '#shared/readings/running-median.ts'

interface Filters {
  values: number[]
  median11: number[]
  median51: number[]
  madToSigma: number
}
const scipy = JSON.parse(
  readFileSync(new URL('../../reference/readings-filters.json', import.meta.url), 'utf8'),
) as Filters

const minutes = (n: number) => Array.from({ length: n }, (_, i) => 60 * (i + 1))
const codes = (times: number[], values: number[], options?: FlagOptions) =>
  flagSeries(times, values, options).map(({ index, code }) => `${index} ${code.replace('readings/', '')}`)

describe('running medians', () => {
  it('equal those of scipy inside the series', () => {
    const centred = centredMedian(scipy.values, 5)
    const local = localMedian(scipy.values, 25)
    for (let i = 5; i < scipy.values.length - 5; i++) expect(centred[i]).toBe(scipy.median11[i])
    for (let i = 25; i < scipy.values.length - 25; i++) expect(local[i]).toBe(scipy.median51[i])
  })

  it('leave a rising series as it is, to its very ends', () => {
    const rising = Array.from({ length: 40 }, (_, i) => Math.log(i + 1))
    expect([...centredMedian(rising, 5)]).toEqual(rising)
  })

  it('scale the MAD of normal noise to its standard deviation', () => {
    expect(MAD_TO_SIGMA).toBeCloseTo(scipy.madToSigma, 12)
  })
})

describe('flagSeries', () => {
  it('finds spikes of one reading and of three in real noise', () => {
    const values = scipy.values.map((value, i) => (i === 60 || (i >= 120 && i < 123) ? value + 0.5 : value))
    expect(codes(minutes(200), values)).toEqual(['60 spike', '120 spike', '121 spike', '122 spike'])
  })

  it('finds none in noise alone', () => {
    expect(codes(minutes(200), scipy.values)).toEqual([])
  })

  it('does not take the coarse steps of a logger for spikes', () => {
    const stepped = Array.from({ length: 60 }, (_, i) => 12 + (i % 7 === 3 ? 0.01 : 0))
    expect(codes(minutes(60), stepped, { resolution_m: 0.01 })).toEqual([])
    const spiked = stepped.map((value, i) => (i === 30 ? value + 0.06 : value))
    expect(codes(minutes(60), spiked, { resolution_m: 0.01 })).toEqual(['30 spike'])
  })

  it('never flags a curve that only rises or only falls', () => {
    const steps = fc.array(fc.double({ min: 0, max: 1e3, noNaN: true }), { minLength: 1, maxLength: 80 })
    fc.assert(
      fc.property(steps, fc.constantFrom(1, -1), (rises, way) => {
        let level = 0
        const values = rises.map((rise) => (level += way * rise))
        expect(codes(minutes(values.length), values, { resolution_m: 0.001 })).toEqual([])
      }),
    )
  })

  it('exempts the readings about a stop of the pump', () => {
    const values = Array.from({ length: 40 }, (_, i) => (i < 20 ? 5 + 0.1 * i : 7 / (i - 18)))
    const times = minutes(40)
    expect(codes(times, values, { resolution_m: 0.001 })).not.toEqual([])
    expect(codes(times, values, { resolution_m: 0.001, events_s: [1200] })).toEqual([])
  })

  it('flags sentinels and leaves them out of the median', () => {
    const values = scipy.values.slice(0, 40).map((value, i) => (i >= 10 && i < 20 ? -9999 : value))
    expect(codes(minutes(40), values)).toEqual(Array.from({ length: 10 }, (_, i) => `${i + 10} sentinel`))
  })

  it('flags a time that repeats or steps back', () => {
    expect(codes([0, 60, 60, 180, 120], [1, 1, 1, 1, 1])).toEqual(['2 duplicate-time', '4 time-backwards'])
  })

  it('flags a gap in a regular log', () => {
    const times = minutes(30).map((time, i) => (i < 15 ? time : time + 3600))
    expect(
      flagSeries(
        times,
        times.map(() => 1),
      ),
    ).toEqual([{ index: 15, code: 'readings/gap-before', params: { gap_s: 3660, usual_s: 60 } }])
  })

  it('takes ever longer steps of a test read by hand for no gaps', () => {
    const times = [0.5, 1, 1.5, 2, 3, 4, 5, 10, 15, 20, 30, 60, 90, 120, 240, 360, 1440, 2880].map((min) => 60 * min)
    expect(
      codes(
        times,
        times.map(() => 1),
      ),
    ).toEqual([])
  })

  it('has nothing to say of short or empty series', () => {
    expect(flagSeries([], [])).toEqual([])
    expect(flagSeries([0], [1])).toEqual([])
    expect(flagSeries([0, 60, 120], [1, 50, 1])).toEqual([])
  })

  it('refuses times and values that differ in number', () => {
    expect(() => flagSeries([0, 1], [1])).toThrow(RangeError)
  })
})
