import type { AnalysisInputs, AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { unitById } from '#shared/quantities/units.ts'
import { linearAxis, logAxis, valueAt, type Axis } from './axis.ts'
import { modelled, type Fit } from './fit-band.ts'
import { inWindowOf, residualUnit, type FitDrawing } from './fit-drawing.ts'
import { plotClock } from './plot-clock.ts'
import { plotWells, type PlotPoint, type PlotWell, type XY } from './plot-wells.ts'
import { withoutNoise, type PlotUnits } from './time-plot.ts'

/**
 * Drawdown of all observation wells against time over distance squared. In a uniform confined aquifer they fall on one
 * curve; a well that lies apart has other properties around it, or another distance.
 */
export interface CompositePlot {
  kind: 'composite'
  x: Axis
  y: Axis
  wells: PlotWell[]
  units: PlotUnits
  /** When pumping began, elapsed seconds. */
  start_s: number
  /** Abscissa of one second, by id of the well: t/r² is proportional to time. */
  perSecond: ReadonlyMap<string, number>
  /** The stop, after which there is no place for readings; null: none. */
  end_s: number | null
}

interface CompositeRequest {
  inputs: AnalysisInputs
  wellIds: readonly string[]
  options: Pick<AnalysisOptions, 'phase'>
  units: PlotUnits
  direction: 'down' | 'up'
}

/** Unit of the abscissa: "min/m²". */
export const compositeUnit = ({ time, length }: PlotUnits) => `${unitById(time).label}/${unitById(length).label}²`

/** Wells that have a place on a composite plot. */
export const compositeWells = ({ series }: AnalysisInputs) =>
  series.filter(({ role, distance_m }) => role === 'observation' && distance_m > 0)

export function compositePlot({ inputs, wellIds, options, units, direction }: CompositeRequest): CompositePlot {
  const [length_m, unit_s] = [unitById(units.length).toSI, unitById(units.time).toSI]
  const clock = plotClock('composite', inputs, options, unit_s)
  const shown = compositeWells(inputs).filter(({ wellId }) => wellIds.includes(wellId))
  const perSecond = new Map(
    shown.map(({ wellId, distance_m }) => [wellId, 1 / (unit_s * (distance_m / length_m) ** 2)]),
  )
  const wells = plotWells({ kind: 'composite', inputs, wellIds: [...perSecond.keys()], clock, length_m }).map(
    (well) => {
      const placed = (point: PlotPoint) => ({ ...point, x: point.x * unit_s * (perSecond.get(well.wellId) as number) })
      return { ...well, points: well.points.map(placed), leftOut: well.leftOut.map(placed) }
    },
  )
  const points = wells.flatMap((well) => well.points)
  return {
    kind: 'composite',
    wells,
    units,
    start_s: clock.origin_s,
    perSecond,
    end_s: options.phase === 'all' ? null : rateHistory(inputs.rates).stop_s,
    x: logAxis(
      wells.flatMap((well) => [...well.points, ...well.leftOut].map(({ x }) => x)),
      `time since pumping began over distance squared, ${compositeUnit(units)}`,
    ),
    y: linearAxis(withoutNoise(points.map(({ y }) => y)), `drawdown, ${unitById(units.length).label}`, {
      inverse: direction === 'down',
    }),
  }
}

const CURVE_POINTS = 100

/** The curve of each well that was analysed, and its readings in the window. */
export function compositeDrawing(plot: CompositePlot, fit: Fit): FitDrawing {
  const inWindow = inWindowOf(fit)
  const fitted = plot.wells.map(({ wellId }) => (fit.options.wellIds.includes(wellId) ? curve(plot, fit, wellId) : []))
  return {
    inside: plot.wells.map(({ wellId, points }) =>
      fit.options.wellIds.includes(wellId)
        ? points.filter(({ elapsed_s }) => inWindow(elapsed_s)).map(({ x, y }): XY => [x, y])
        : [],
    ),
    fitted,
    bands: plot.wells.map(() => null),
    span: null,
    shade: null,
    marks: null,
    moments: [],
    residuals: { inside: [], outside: [], unit: residualUnit(plot.units.length) },
  }
}

function curve(plot: CompositePlot, fit: Fit, wellId: string): XY[] {
  const length_m = unitById(plot.units.length).toSI
  const xs = Array.from({ length: CURVE_POINTS + 1 }, (_, i) => valueAt(plot.x, i / CURVE_POINTS))
  const times_s = xs.map((x) => plot.start_s + x / (plot.perSecond.get(wellId) as number))
  const values = modelled(fit, wellId, times_s)
  return xs.flatMap((x, i): XY[] => {
    const value = values[i]
    const pumping = plot.end_s === null || (times_s[i] as number) <= plot.end_s
    return pumping && value != null && value >= 0 ? [[x, value / length_m]] : []
  })
}
