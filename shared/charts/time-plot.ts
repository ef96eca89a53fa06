import type { AnalysisInputs, AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { unitById } from '#shared/quantities/units.ts'
import { extentOf, linearAxis, logAxis, valueAt, type Axis } from './axis.ts'
import { plotClock, type PlotClock } from './plot-clock.ts'
import type { PlotKind } from './plot-kinds.ts'
import { hasDerivative, plotWells, type PlotWell } from './plot-wells.ts'
import { drawnRegimes, type DrawnRegime } from './regimes.ts'

/** Unit ids in which a plot is drawn. */
export interface PlotUnits {
  time: string
  length: string
}

export interface TimePlotRequest {
  kind: Exclude<PlotKind, 'distance' | 'composite'>
  inputs: AnalysisInputs
  wellIds: readonly string[]
  options: Pick<AnalysisOptions, 'phase' | 'rateHistory'>
  units: PlotUnits
  /** Which way drawdown points; a log–log plot always grows upwards. */
  direction: 'down' | 'up'
  /** Of the derivative, factors of ten in time to either side. */
  smoothing?: number
  /** The well whose derivative is diagnosed, on plots that show one; null: none. */
  diagnosed?: string | null
  /** The part of the abscissa that is looked at, in its unit; left out or null: all of it. */
  view?: readonly [number, number] | null
}

/** A plot against time before any analysis is drawn on it. */
export interface TimePlot {
  kind: TimePlotRequest['kind']
  x: Axis
  y: Axis
  clock: PlotClock
  wells: PlotWell[]
  units: PlotUnits
  /** Times at which a curve is drawn, elapsed seconds. */
  curve_s: number[]
  /** What the derivative of the diagnosed well shows. */
  regimes: DrawnRegime[]
}

export function timePlot(request: TimePlotRequest): TimePlot {
  const { kind, inputs, wellIds, options, units, direction, smoothing, diagnosed = null, view = null } = request
  const clock = plotClock(kind, inputs, options, unitById(units.time).toSI)
  const length_m = unitById(units.length).toSI
  const smoothed = smoothing === undefined ? {} : { smoothing }
  const viewed = view && viewedAxis(kind, view, units)
  const within = viewed ? ([viewed.min, viewed.max] as const) : undefined
  const wells = plotWells({ kind, inputs, wellIds, clock, length_m, within, ...smoothed })
  const wellId = hasDerivative(kind) && wells.some((well) => well.wellId === diagnosed) ? diagnosed : null
  const x = viewed ?? timeAxis(kind, wells, units)
  return {
    kind,
    clock,
    wells,
    units,
    x,
    y: drawdownAxis(kind, wells, units, { inverse: direction === 'down', fromZero: viewed === null }),
    curve_s: curveTimes(kind, x, clock),
    regimes: drawnRegimes({ inputs, wellId, clock, ...smoothed }),
  }
}

/** Readings that were left out keep their place in time, so that they can be taken back; their levels may be anything. */
const xs = (wells: PlotWell[]) => wells.flatMap(({ points, leftOut }) => [...points, ...leftOut].map(({ x }) => x))
const CURVE_POINTS = 100

/** Times across the plot, evenly along its axis. */
function curveTimes(kind: TimePlot['kind'], x: Axis, clock: PlotClock): number[] {
  const even = Array.from({ length: CURVE_POINTS + 1 }, (_, i) => clock.elapsed(valueAt(x, i / CURVE_POINTS)))
  if (kind !== 'linear') return even
  // Drawdown bends most just after pumping begins, where even steps would cut the corner.
  const first = x.max / 1e4
  const early = Array.from({ length: CURVE_POINTS }, (_, i) => clock.elapsed(first * 1e4 ** (i / CURVE_POINTS)))
  return [...even, ...early].sort((a, b) => a - b)
}

const measured = (wells: PlotWell[]) => wells.flatMap(({ points }) => points.map(({ y }) => y))
const ys = (wells: PlotWell[]) => [
  ...measured(wells),
  ...wells.flatMap(({ derivative }) => derivative.map(([, y]) => y)),
]

function timeAxis(kind: TimePlot['kind'], wells: PlotWell[], units: PlotUnits): Axis {
  if (kind === 'linear') return linearAxis(xs(wells), timeTitle(kind, units), { parts: 8 })
  if (kind === 'recovery') return ratioAxis(xs(wells), timeTitle(kind, units))
  return logAxis(xs(wells), timeTitle(kind, units))
}

const timeTitle = (kind: TimePlot['kind'], units: PlotUnits) =>
  kind === 'recovery'
    ? "t/t', time since pumping began over time since it stopped"
    : `time since pumping began, ${unitById(units.time).label}`

/** A part of the axis; a linear one reaches to the next round numbers. */
function viewedAxis(kind: TimePlot['kind'], [min, max]: readonly [number, number], units: PlotUnits): Axis {
  const title = timeTitle(kind, units)
  if (kind === 'linear') return linearAxis([min, max], title, { fromZero: false })
  return { scale: 'log', min, max, title, inverse: false }
}

/** From 1, where recovery ends, outwards. */
function ratioAxis(ratios: number[], title: string): Axis {
  const [, most] = extentOf(ratios) ?? [1, 100]
  const axis = logAxis([1, most], title)
  return { ...axis, min: 1 }
}

/** Readings that scatter a little about zero before the level falls do not open a part of the axis below it. */
const NOISE = 0.04

export function withoutNoise(values: number[]): number[] {
  const [least, most] = extentOf(values) ?? [0, 1]
  return least < 0 && -least <= NOISE * most ? values.filter((value) => value >= 0) : values
}

/** Readings set the scale: stray derivatives of a noisy log must not flatten the plot. */
function drawdownAxis(
  kind: TimePlot['kind'],
  wells: PlotWell[],
  units: PlotUnits,
  { inverse, fromZero }: { inverse: boolean; fromZero: boolean },
): Axis {
  const unit = unitById(units.length).label
  if (kind === 'log-log') return logAxis(ys(wells), `drawdown and its derivative, ${unit}`)
  const title = kind === 'recovery' ? `residual drawdown, ${unit}` : `drawdown, ${unit}`
  // A part of the plot is looked at for its detail, at the beginning around zero too.
  return linearAxis(fromZero ? withoutNoise(measured(wells)) : measured(wells), title, { inverse, fromZero })
}
