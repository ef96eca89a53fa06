import { largestTriangles } from '#shared/numerics/largest-triangle.ts'
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
const MOST_POINTS = 1200
const FEWEST_POINTS = 480
const POINTS_PER_CYCLE = 120

interface WellsRequest {
  kind: PlotKind
  inputs: AnalysisInputs
  wellIds: readonly string[]
  clock: PlotClock
  /** The reader's unit of length, m. */
  length_m: number
  smoothing?: number
  /** The part of the abscissa that is shown; left out: all of it. */
  within?: readonly [number, number] | undefined
}

export function plotWells(request: WellsRequest): PlotWell[] {
  const { inputs, wellIds } = request
  return inputs.series.filter(({ wellId }) => wellIds.includes(wellId)).map((series) => plotWell(request, series))
}

function plotWell(request: WellsRequest, series: Series): PlotWell {
  const { kind, inputs, clock, length_m, smoothing } = request
  const { kept, leftOut } = placedReadings(series, request)
  const { wellId, label, role } = series
  return {
    wellId,
    label,
    role,
    points: thinned(kept, kind),
    readingCount: kept.length,
    leftOut,
    derivative: hasDerivative(kind) ? derivativeOf(inputs, wellId, clock, { length_m, smoothing, kind }) : [],
  }
}

/** Readings with a place in the part that is shown. A loop: arrays of one element each take seconds of a long log. */
function placedReadings(series: Series, { kind, clock, length_m, within = [-Infinity, Infinity] }: WellsRequest) {
  const { elapsed_s: times, drawdown_m, included } = series
  const [kept, leftOut]: [PlotPoint[], PlotPoint[]] = [[], []]
  for (let i = 0; i < times.length; i++) {
    const elapsed_s = times[i] as number
    const x = clock.place(elapsed_s)
    const y = (drawdown_m[i] as number) / length_m
    const isShown = x !== null && x >= within[0] && x <= within[1]
    if (!isShown || !Number.isFinite(y) || (kind === 'log-log' && !(y > 0))) continue
    if (included[i]) kept.push({ x, y, elapsed_s })
    else leftOut.push({ x, y, elapsed_s })
  }
  return { kept, leftOut }
}

/** By what they look like on the axes of the plot: the spikes and steps of a long log stay. */
function thinned(points: PlotPoint[], kind: PlotKind): PlotPoint[] {
  if (points.length <= MOST_POINTS) return points
  const along = points.map(({ x }) => (kind === 'linear' ? x : Math.log10(x)))
  const up = points.map(({ y }) => (kind === 'log-log' ? Math.log10(y) : y))
  const span = (along.at(-1) as number) - (along[0] as number)
  // t/t' falls while time goes on.
  const ascending = span < 0 ? along.map((x) => -x) : along
  const wanted = kind === 'linear' ? MOST_POINTS : POINTS_PER_CYCLE * Math.abs(span)
  const buckets = Math.min(Math.max(Math.ceil(wanted), FEWEST_POINTS), MOST_POINTS)
  return largestTriangles(ascending, up, buckets - 2).map((i) => points[i] as PlotPoint)
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
