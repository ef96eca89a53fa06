import type { OverviewValue, Trend, UnitFigures, UnitStatistics } from '#shared/contracts/unit-statistics.ts'
import { evidence } from '#shared/contracts/kinds.ts'
import { fromSI, unitById } from '#shared/quantities/units.ts'
import { extentOf, linearAxis, logAxis, type Axis } from './axis.ts'
import type { XY } from './plot-wells.ts'
import type { SimpleDots, SimplePlot } from './simple-plot.ts'

/** What a plot of values is drawn in: unit id, and the name of the quantity. */
export interface Drawn {
  unit: string
  name: string
}

/** A storativity has no unit to name. */
export const titleOf = ({ unit, name }: Drawn) => [name, unitById(unit).label].filter(Boolean).join(', ')
const shown = (log10: number, unit: string) => fromSI(10 ** log10, unit)

type Place = (value: OverviewValue) => { x: number; y: number } | null

/** A symbol for each evidence, so that one sees what carries the picture. */
function dotsByEvidence(
  values: readonly OverviewValue[],
  place: Place,
  fitted: (at: XY) => number | null,
): SimpleDots[] {
  return evidence.options.map((label) => {
    const points = values.flatMap((value) => {
      const at = value.evidence === label ? place(value) : null
      return at ? [{ ...at, name: value.wellCode, fitted: fitted([at.x, at.y]), state: 'used' as const }] : []
    })
    return { label, points, of: points.length }
  })
}

const pointsOf = (dots: readonly SimpleDots[]) => dots.flatMap(({ points }) => points)
const bare = { shades: [], moments: [] }

/** Values against what normal values would be: a straight line where log10 is normal. */
export function probabilityPlot(values: readonly OverviewValue[], figures: UnitFigures, drawn: Drawn): SimplePlot {
  const line = (score: number) => shown(figures.mean + figures.deviation * score, drawn.unit)
  const dots = dotsByEvidence(values, ({ normalScore: x, log10 }) => ({ x, y: shown(log10, drawn.unit) }), ([x]) => line(x)) // prettier-ignore
  const x = linearAxis(
    pointsOf(dots).map((point) => point.x),
    'normal score, standard deviations',
    { fromZero: false },
  )
  const ends: XY[] = [x.min, x.max].map((score) => [score, line(score)])
  return {
    ...bare,
    x,
    y: logAxis(pointsOf(dots).map((point) => point.y), titleOf(drawn)), // prettier-ignore
    dots,
    lines: [{ label: 'normal with these figures', points: ends }],
  }
}

/** The line of a trend over the span of its points, in the reader's units; `toSI` takes an abscissa back. */
function trendLine(trend: Trend | null, xs: readonly number[], toSI: (x: number) => number, unit: string): XY[] {
  const span = extentOf(xs)
  if (!trend || !span) return []
  return span.map((x) => [x, shown(trend.intercept + trend.slope * toSI(x), unit)])
}

const fittedBy = (trend: Trend | null, at: number, unit: string) =>
  trend && shown(trend.intercept + trend.slope * at, unit)

/** Whole years, with one to spare at either end. */
function yearAxis(years: readonly number[]): Axis {
  const [first, last] = extentOf(years) ?? [2000, 2000]
  const parts = Math.min(8, last - first + 2)
  return { ...linearAxis([first - 1, last + 1], 'year of the test', { fromZero: false, parts }), years: true }
}

export function yearPlot({ values, year }: Pick<UnitStatistics, 'values' | 'year'>, drawn: Drawn): SimplePlot {
  const dots = dotsByEvidence(
    values,
    (value) => (value.year === null ? null : { x: value.year, y: shown(value.log10, drawn.unit) }),
    ([x]) => fittedBy(year, x, drawn.unit),
  )
  const points = pointsOf(dots)
  const xs = points.map(({ x }) => x)
  return {
    ...bare,
    x: yearAxis(xs),
    y: logAxis(points.map(({ y }) => y), titleOf(drawn)), // prettier-ignore
    dots,
    lines: [{ label: 'trend', points: trendLine(year, xs, (x) => x, drawn.unit) }],
  }
}

/** Depth of the middle of the tested interval along the abscissa, in the reader's unit of length. */
export function depthPlot(
  { values, depth }: Pick<UnitStatistics, 'values' | 'depth'>,
  drawn: Drawn & { length: string },
): SimplePlot {
  const length = unitById(drawn.length)
  const dots = dotsByEvidence(
    values,
    ({ depthM, log10 }) => (depthM === null ? null : { x: depthM / length.toSI, y: shown(log10, drawn.unit) }),
    ([x]) => fittedBy(depth, x * length.toSI, drawn.unit),
  )
  const points = pointsOf(dots)
  const xs = points.map(({ x }) => x)
  return {
    ...bare,
    x: linearAxis(xs, `middle of the tested interval below ground, ${length.label}`),
    y: logAxis(points.map(({ y }) => y), titleOf(drawn)), // prettier-ignore
    dots,
    lines: [{ label: 'trend', points: trendLine(depth, xs, (x) => x * length.toSI, drawn.unit) }],
  }
}

/** T against specific capacity after a day, with the region's own line where there is one. */
export function capacityPairsPlot(
  { pairs, regression }: NonNullable<UnitStatistics['capacity']>,
  drawn: Drawn & { capacity: string },
): SimplePlot {
  const capacity = unitById(drawn.capacity)
  const points = pairs.map(({ wellCode: name, log10Capacity, log10T }) => ({
    name,
    x: shown(log10Capacity, drawn.capacity),
    y: shown(log10T, drawn.unit),
    fitted: fittedBy(regression, log10Capacity, drawn.unit),
    state: 'used' as const,
  }))
  const xs = points.map(({ x }) => x)
  const line = trendLine(regression, xs, (x) => Math.log10(x * capacity.toSI), drawn.unit)
  return {
    ...bare,
    x: logAxis(xs, `specific capacity after a day, ${capacity.label}`),
    y: logAxis(points.map(({ y }) => y), titleOf(drawn)), // prettier-ignore
    dots: [{ label: 'wells', points, of: points.length }],
    lines: [{ label: 'regression of log10', points: line }],
  }
}
