import type { AnalysisResult, HandLine } from '#shared/hydraulics/analysis.ts'
import { unitById } from '#shared/quantities/units.ts'
import type { PlotKind } from './plot-kinds.ts'
import type { XY } from './plot-wells.ts'

interface LinePlot {
  kind: PlotKind
  units: { time: string; length: string }
}

/** Factor from the abscissa of a straight-line plot to the one its line is kept in: seconds, metres, or t/t'. */
export function abscissaToSI({ kind, units }: LinePlot): number {
  if (kind === 'recovery') return 1
  return unitById(kind === 'distance' ? units.length : units.time).toSI
}

/** The line through two points of the plot. */
export function lineThrough(plot: LinePlot, [[x1, y1], [x2, y2]]: readonly [XY, XY]): HandLine {
  const length_m = unitById(plot.units.length).toSI
  const [a, b] = [x1, x2].map((x) => Math.log10(x * abscissaToSI(plot))) as [number, number]
  const slope = ((y2 - y1) * length_m) / (b - a)
  return { slope, intercept: y1 * length_m - slope * a }
}

/** Points of a line at two abscissas of the plot. */
export function lineEnds(plot: LinePlot, { slope, intercept }: HandLine, xs: readonly [number, number]): [XY, XY] {
  const length_m = unitById(plot.units.length).toSI
  return xs.map((x): XY => [x, (intercept + slope * Math.log10(x * abscissaToSI(plot))) / length_m]) as [XY, XY]
}

/** The line that a result was read from; null for methods without one. */
export function lineOf({ extras }: Pick<AnalysisResult, 'extras'>): HandLine | null {
  const { slope_m: slope, intercept_m: intercept } = extras
  return slope === undefined || intercept === undefined ? null : { slope, intercept }
}

/** The line with this fall per factor of ten (m) and this zero (SI of the abscissa). */
export const lineFromZero = (fall_m: number, zero: number): HandLine => ({
  slope: fall_m,
  intercept: -fall_m * Math.log10(zero),
})

/** Where the line reaches zero drawdown, SI of the abscissa. */
export const zeroOf = ({ slope, intercept }: HandLine): number => 10 ** (-intercept / slope)
