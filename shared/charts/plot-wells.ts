import { thinLogarithmically } from '#shared/numerics/logarithmic-thinning.ts'
import type { AnalysisInputs, Series } from '#shared/hydraulics/analysis.ts'
import { DERIVATIVE_SMOOTHING, logDerivative } from '#shared/hydraulics/derivative.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { pumpingPhase, selectReadings } from '#shared/hydraulics/selection.ts'
import type { PlotClock } from './plot-clock.ts'
import type { PlotKind } from './plot-kinds.ts'

export type XY = [x: number, y: number]

export interface PlotPoint {
  x: number
  y: number
  elapsed_s: number
}

/** One well's readings as a plot shows them, in the reader's units. */
export interface PlotWell {
  wellId: string
  label: string
  role: Series['role']
  points: PlotPoint[]
  /** How many readings the points were chosen from; as many as there are points where all are drawn. */
  readingCount: number
  /** Readings that somebody left out. */
  leftOut: PlotPoint[]
  /** Derivative of drawdown by the logarithm of time. */
  derivative: XY[]
}

/** Symbols tell wells apart where colour does not. */
const symbols = ['circle', 'diamond', 'triangle', 'rect', 'arrow', 'pin'] as const
export const symbolOf = (index: number) => symbols[index % symbols.length] as (typeof symbols)[number]

/** More points than a screen can show apart only cost time. */
const POINTS_PER_CYCLE = 120
const MOST_LINEAR = 1200

interface WellsRequest {
  kind: PlotKind
  inputs: AnalysisInputs
  wellIds: readonly string[]
  clock: PlotClock
  /** The reader's unit of length, m. */
  length_m: number
  smoothing?: number
}

export function plotWells(request: WellsRequest): PlotWell[] {
  const { inputs, wellIds } = request
  return inputs.series.filter(({ wellId }) => wellIds.includes(wellId)).map((series) => plotWell(request, series))
}

function plotWell({ kind, inputs, clock, length_m, smoothing }: WellsRequest, series: Series): PlotWell {
  const placed = placedReadings(series, clock, length_m, kind === 'log-log')
  const kept = placed.filter(({ included }) => included)
  const { wellId, label, role } = series
  return {
    wellId,
    label,
    role,
    points: thinned(kept, kind, clock.origin_s),
    readingCount: kept.length,
    leftOut: placed.filter(({ included }) => !included),
    derivative: hasDerivative(kind) ? derivativeOf(inputs, wellId, clock, { length_m, smoothing, kind }) : [],
  }
}

function placedReadings(series: Series, clock: PlotClock, length_m: number, positive: boolean) {
  return series.elapsed_s.flatMap((elapsed_s, i) => {
    const x = clock.place(elapsed_s)
    const y = (series.drawdown_m[i] as number) / length_m
    if (x === null || !Number.isFinite(y) || (positive && !(y > 0))) return []
    return [{ x, y, elapsed_s, included: series.included[i] as boolean }]
  })
}

function thinned<Point extends PlotPoint>(points: Point[], kind: PlotKind, origin_s: number): Point[] {
  if (points.length <= MOST_LINEAR) return points
  if (kind === 'linear') {
    const step = Math.ceil(points.length / MOST_LINEAR)
    return points.filter((_, i) => i % step === 0 || i === points.length - 1)
  }
  const times = points.map(({ elapsed_s }) => elapsed_s - origin_s)
  return thinLogarithmically(times, POINTS_PER_CYCLE).map((i) => points[i] as Point)
}

/** How many of the wells' readings are drawn; null where all are. */
export function drawnShare(wells: readonly PlotWell[]): { drawn: number; of: number } | null {
  const drawn = wells.reduce((sum, { points }) => sum + points.length, 0)
  const of = wells.reduce((sum, { readingCount }) => sum + readingCount, 0)
  return drawn < of ? { drawn, of } : null
}

/** Plots on which the derivative is drawn. */
export const hasDerivative = (kind: PlotKind) => kind === 'semi-log' || kind === 'log-log'

/** From the same readings that the evidence is judged by. */
function derivativeOf(
  inputs: AnalysisInputs,
  wellId: string,
  clock: PlotClock,
  { length_m, smoothing = DERIVATIVE_SMOOTHING, kind }: Pick<WellsRequest, 'length_m' | 'smoothing' | 'kind'>,
): XY[] {
  const phase = pumpingPhase(rateHistory(inputs.rates), null)
  const { wells } = selectReadings(inputs, { wellIds: [wellId], window: null }, phase)
  return wells.flatMap(({ time_s, drawdown_m }) =>
    logDerivative(time_s, drawdown_m, { smoothing }).flatMap(({ time_s: time, derivative_m }): XY[] => {
      const x = clock.place(clock.origin_s + time)
      return x === null || (kind === 'log-log' && !(derivative_m > 0)) ? [] : [[x, derivative_m / length_m]]
    }),
  )
}
