import type { DrawdownCode, Params } from './codes.ts'
import type { Quantity, ReadingRow } from './model.ts'

/** Static level: given (m, as depth or level like the readings), or from the readings before pumping. */
export type StaticLevel = { given_m: number } | { beforePumping: true; removeTrend: boolean }

export interface DrawdownReading {
  row: number
  elapsed_s: number
  drawdown_m: number
}

/** The level that drawdown is counted from: `value_m + slope_m_per_s · elapsed_s`. */
export interface StaticLine {
  value_m: number
  slope_m_per_s: number
  /** Readings behind it; 0 when it was given. */
  readings: number
}

export type DrawdownResult =
  | {
      ok: true
      readings: DrawdownReading[]
      static: StaticLine | null
      warnings: { code: DrawdownCode; params: Params }[]
    }
  | { ok: false; code: DrawdownCode; params: Params }

type Reading = Pick<ReadingRow, 'row' | 'elapsed_s' | 'value_m' | 'taken'>
interface Point {
  row: number
  t: number
  v: number
}

const pointsOf = (rows: Reading[]): Point[] =>
  rows.flatMap(({ row, elapsed_s, value_m, taken }) =>
    taken && elapsed_s !== null && value_m !== null ? [{ row, t: elapsed_s, v: value_m }] : [],
  )

const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length

/** Least-squares line through the readings, its level at the start of pumping. */
function trendLine(points: Point[]): StaticLine {
  const [t0, v0] = [mean(points.map(({ t }) => t)), mean(points.map(({ v }) => v))]
  const sxx = points.reduce((sum, { t }) => sum + (t - t0) ** 2, 0)
  const sxy = points.reduce((sum, { t, v }) => sum + (t - t0) * (v - v0), 0)
  const slope = sxy / sxx
  return { value_m: v0 - slope * t0, slope_m_per_s: slope, readings: points.length }
}

/** A trend is carried through the whole test: it needs as long a record before it. */
function shortRecord(before: Point[], all: Point[]): { code: DrawdownCode; params: Params }[] {
  const times = (points: Point[]) => points.map(({ t }) => t)
  const antecedent_s = -times(before).reduce((a, b) => Math.min(a, b), 0)
  const test_s = times(all).reduce((a, b) => Math.max(a, b), 0)
  return antecedent_s < test_s ? [{ code: 'readings/antecedent-short', params: { antecedent_s, test_s } }] : []
}

/** Readings up to the start belong to the time before pumping: the one at zero is taken as the pump is switched on. */
const isBefore = ({ t }: Point) => t <= 0

type Static =
  { line: StaticLine; warnings: { code: DrawdownCode; params: Params }[] } | { code: DrawdownCode; params: Params }

function staticLine(points: Point[], level: StaticLevel): Static {
  if ('given_m' in level) return { line: { value_m: level.given_m, slope_m_per_s: 0, readings: 0 }, warnings: [] }
  const before = points.filter(isBefore)
  if (before.length === 0) return { code: 'readings/no-antecedent', params: {} }
  if (!level.removeTrend) {
    const line = { value_m: mean(before.map(({ v }) => v)), slope_m_per_s: 0, readings: before.length }
    return { line, warnings: [] }
  }
  const distinct = new Set(before.map(({ t }) => t)).size
  if (distinct < 3) return { code: 'readings/no-antecedent-trend', params: { readings: before.length } }
  return { line: trendLine(before), warnings: shortRecord(before, points) }
}

/** Depth grows with drawdown, a level falls. */
const sign: Record<Quantity, 1 | -1> = { depth: 1, level: -1, drawdown: 1 }

/**
 * Drawdown of the readings that were taken, in file order: depth − static depth, or static level − level.
 * Readings that are drawdown already come back unchanged and need no static level.
 */
export function toDrawdown(rows: Reading[], quantity: Quantity, level: StaticLevel): DrawdownResult {
  const points = pointsOf(rows)
  if (quantity === 'drawdown') {
    const readings = points.map(({ row, t, v }) => ({ row, elapsed_s: t, drawdown_m: v }))
    return { ok: true, readings, static: null, warnings: [] }
  }
  const found = staticLine(points, level)
  if ('code' in found) return { ok: false, ...found }
  const { line, warnings } = found
  const readings = points.map(({ row, t, v }) => {
    const drawdown_m = sign[quantity] * (v - (line.value_m + line.slope_m_per_s * t))
    return { row, elapsed_s: t, drawdown_m }
  })
  return { ok: true, readings, static: line, warnings }
}
