import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { toDrawdown, type DrawdownResult } from '#shared/readings/drawdown.ts'

interface Filters {
  times: number[]
  values: number[]
  trend: { intercept: number; slope: number; readings: number }
}
const scipy = JSON.parse(
  readFileSync(new URL('../../reference/readings-filters.json', import.meta.url), 'utf8'),
) as Filters

const makeRows = (points: [elapsed_s: number | null, value_m: number | null, taken?: boolean][]) =>
  points.map(([elapsed_s, value_m, taken = true], i) => ({ row: i + 2, elapsed_s, value_m, taken }))

const drawdowns = (result: DrawdownResult) => (result.ok ? result.readings.map(({ drawdown_m }) => drawdown_m) : result)

describe('toDrawdown', () => {
  it('is depth less static depth, and static level less level', () => {
    const rows = makeRows([
      [0, 10],
      [60, 12.5],
    ])
    expect(drawdowns(toDrawdown(rows, 'depth', { given_m: 10 }))).toEqual([0, 2.5])
    expect(drawdowns(toDrawdown(rows, 'level', { given_m: 13 }))).toEqual([3, 0.5])
  })

  it('takes readings of drawdown as they are', () => {
    const result = toDrawdown(makeRows([[60, 2.5]]), 'drawdown', { beforePumping: true, removeTrend: true })
    expect(result).toEqual({
      ok: true,
      readings: [{ row: 2, elapsed_s: 60, drawdown_m: 2.5 }],
      static: null,
      warnings: [],
    })
  })

  it('takes the mean of the readings up to the start as static level', () => {
    const rows = makeRows([
      [-120, 10],
      [0, 10.5],
      [60, 12],
    ])
    const result = toDrawdown(rows, 'depth', { beforePumping: true, removeTrend: false })
    expect(result).toMatchObject({ ok: true, static: { value_m: 10.25, slope_m_per_s: 0, readings: 2 } })
    expect(drawdowns(result)).toEqual([-0.25, 0.25, 1.75])
  })

  it('leaves rows out that were not taken, and keeps the order of the rest', () => {
    const rows = makeRows([
      [120, 13],
      [60, -999, false],
      [null, 5],
      [30, null],
      [30, 11],
    ])
    const result = toDrawdown(rows, 'depth', { given_m: 10 })
    expect(result.ok && result.readings.map(({ row, drawdown_m }) => [row, drawdown_m])).toEqual([
      [2, 3],
      [6, 1],
    ])
  })

  it('fits the antecedent trend that scipy fits', () => {
    const rows = makeRows(scipy.times.map((time, i) => [time, scipy.values[i] ?? NaN]))
    const result = toDrawdown(rows, 'depth', { beforePumping: true, removeTrend: true })
    if (!result.ok || !result.static) throw new Error('no trend')
    expect(result.static.readings).toBe(scipy.trend.readings)
    expect(result.static.value_m).toBeCloseTo(scipy.trend.intercept, 10)
    expect(result.static.slope_m_per_s / scipy.trend.slope).toBeCloseTo(1, 8)
  })

  it.each(['depth', 'level'] as const)('removes a straight trend without rest from readings of %s', (quantity) => {
    const way = quantity === 'depth' ? 1 : -1
    const pumped = (t: number) => (t > 0 ? 1 + t / 1000 : 0)
    const times = Array.from({ length: 40 }, (_, i) => 60 * (i - 20))
    const rows = makeRows(times.map((t) => [t, 10 + 2e-5 * t + way * pumped(t)]))
    const result = toDrawdown(rows, quantity, { beforePumping: true, removeTrend: true })
    if (!result.ok) throw new Error(result.code)
    result.readings.forEach(({ elapsed_s, drawdown_m }) => expect(drawdown_m).toBeCloseTo(pumped(elapsed_s), 10))
  })

  it('warns when the record before pumping is shorter than the test', () => {
    const rows = makeRows([
      [-120, 10],
      [-60, 10],
      [0, 10],
      [600, 12],
    ])
    const result = toDrawdown(rows, 'depth', { beforePumping: true, removeTrend: true })
    expect(result.ok && result.warnings).toEqual([
      { code: 'readings/antecedent-short', params: { antecedent_s: 120, test_s: 600 } },
    ])
  })

  it('says that it cannot find a static level or a trend', () => {
    const after = makeRows([
      [60, 12],
      [120, 13],
    ])
    const mean = { beforePumping: true, removeTrend: false } as const
    expect(toDrawdown(after, 'depth', mean)).toMatchObject({ ok: false, code: 'readings/no-antecedent' })
    const two = makeRows([
      [-60, 12],
      [-60, 12],
      [0, 12],
      [60, 13],
    ])
    const trend = { beforePumping: true, removeTrend: true } as const
    expect(toDrawdown(two, 'depth', trend)).toMatchObject({ ok: false, code: 'readings/no-antecedent-trend' })
  })
})
