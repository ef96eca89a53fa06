import type { AnalysisInputs, Series, TimeWindow } from '#shared/hydraulics/analysis.ts'
import { interpolated } from '#shared/hydraulics/interpolate.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { pumpingPhase, selectReadings } from '#shared/hydraulics/selection.ts'
import { LARGEST_U } from '#shared/hydraulics/small-u.ts'
import { unitById } from '#shared/quantities/units.ts'
import { linearAxis, logAxis, valueAt, type Axis } from './axis.ts'
import type { Fit } from './fit-band.ts'
import type { FitDrawing, Shade } from './fit-drawing.ts'
import { residualUnit } from './fit-drawing.ts'
import { lineMarks } from './line-marks.ts'
import { drawsLine } from './plot-kinds.ts'
import type { PlotWell, XY } from './plot-wells.ts'
import type { PlotUnits } from './time-plot.ts'

/** Drawdown of all observation wells at one moment, against distance. */
export interface DistancePlot {
  kind: 'distance'
  x: Axis
  y: Axis
  wells: PlotWell[]
  units: PlotUnits
  /** Moment compared, elapsed seconds. */
  time_s: number
  /** When pumping began, elapsed seconds. */
  start_s: number
  /** Times since then at which all wells have readings; null where there are none. */
  common: TimeWindow | null
}

interface DistanceRequest {
  inputs: AnalysisInputs
  wellIds: readonly string[]
  units: PlotUnits
  direction: 'down' | 'up'
  /** Elapsed seconds; null: the last moment common to all. */
  time_s: number | null
}

interface Reach {
  series: Series
  time_s: number[]
  drawdown_m: number[]
}

export function distancePlot({ inputs, wellIds, units, direction, time_s }: DistanceRequest): DistancePlot {
  const reaches = observed(inputs, wellIds)
  const { start_s } = rateHistory(inputs.rates)
  const at_s = time_s === null ? lastCommon(reaches) : time_s - start_s
  const length_m = unitById(units.length).toSI
  const wells = reaches.flatMap((reach) => pointOf(reach, at_s, start_s, length_m))
  const points = wells.flatMap((well) => well.points)
  const label = unitById(units.length).label
  return {
    kind: 'distance',
    wells,
    units,
    time_s: start_s + at_s,
    start_s,
    common: commonTimes(reaches),
    x: widened(
      logAxis(
        points.map(({ x }) => x),
        `distance from the pumped well, ${label}`,
      ),
    ),
    y: linearAxis(
      points.map(({ y }) => y),
      `drawdown, ${label}`,
      { inverse: direction === 'down' },
    ),
  }
}

/** The line is read where it meets zero, outside the wells. */
const widened = (axis: Axis): Axis => ({ ...axis, min: axis.min / 2, max: axis.max * 4 })

function observed(inputs: AnalysisInputs, wellIds: readonly string[]): Reach[] {
  const phase = pumpingPhase(rateHistory(inputs.rates), null)
  const wanted = inputs.series.filter(({ role, wellId }) => role === 'observation' && wellIds.includes(wellId))
  return wanted.flatMap(({ wellId }) => {
    const options = { wellIds: [wellId], window: null, readingsPerCycle: null }
    return selectReadings(inputs, options, phase).wells.filter(({ time_s }) => time_s.length > 0)
  })
}

function commonTimes(reaches: Reach[]): TimeWindow | null {
  const from_s = Math.max(...reaches.map(({ time_s }) => time_s[0] as number))
  const to_s = lastCommon(reaches)
  return reaches.length > 0 && from_s < to_s ? { from_s, to_s } : null
}

const lastCommon = (reaches: Reach[]) => Math.min(...reaches.map(({ time_s }) => time_s.at(-1) ?? 0))

function pointOf({ series, time_s, drawdown_m }: Reach, at_s: number, start_s: number, length_m: number): PlotWell[] {
  if (!(at_s >= (time_s[0] as number) && at_s <= (time_s.at(-1) as number))) return []
  const { wellId, label, role, distance_m } = series
  const y = interpolated(time_s, drawdown_m, at_s) / length_m
  const points = [{ x: distance_m / length_m, y, elapsed_s: start_s + at_s }]
  return [{ wellId, label, role, points, readingCount: points.length, leftOut: [], derivative: [] }]
}

/** The line through the wells, drawn only for methods that compare distances. */
export function distanceDrawing(plot: DistancePlot, fit: Fit): FitDrawing | null {
  const { slope_m: slope, intercept_m: intercept } = fit.result.extras
  if (!drawsLine(fit.result.method, 'distance') || slope === undefined || intercept === undefined) return null
  const length_m = unitById(plot.units.length).toSI
  const y = (x: number) => (intercept + slope * Math.log10(x * length_m)) / length_m
  const line = [0, 1].map((share): XY => [valueAt(plot.x, share), y(valueAt(plot.x, share))])
  const zero = 10 ** (-intercept / slope) / length_m
  const drawn = line.map(([x, value]): XY => (value >= 0 ? [x, value] : [zero, 0]))
  const unit = residualUnit(plot.units.length)
  const off = ({ points }: PlotWell) =>
    points.map((point): XY => [point.x, ((point.y - y(point.x)) * length_m) / unitById(unit).toSI])
  return {
    inside: plot.wells.map(({ points }) => points.map((point): XY => [point.x, point.y])),
    fitted: [drawn],
    bands: [null],
    span: null,
    shade: farShade(plot, fit),
    marks: lineMarks(plot, fit),
    moments: [],
    residuals: { inside: plot.wells.flatMap(off), outside: [], unit },
  }
}

/** Beyond the distance at which u reaches its limit the straight line does not hold. */
function farShade({ x, units, time_s }: DistancePlot, { inputs, result: { T, S } }: Fit): Shade | null {
  if (!T || !S) return null
  const { start_s } = rateHistory(inputs.rates)
  const reach_m = Math.sqrt((4 * T.value * (time_s - start_s) * LARGEST_U) / S.value)
  const from = Math.max(x.min, reach_m / unitById(units.length).toSI)
  return from < x.max ? { from, to: x.max, label: 'u > 0.05' } : null
}
