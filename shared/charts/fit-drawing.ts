import type { AnalysisInputs, TimeWindow } from '#shared/hydraulics/analysis.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { unitById } from '#shared/quantities/units.ts'
import { shareOf } from './axis.ts'
import { casingMoments, type Moment } from './casing-moments.ts'
import { bandOf, modelled, type Fit, type HalfWidths } from './fit-band.ts'
import { lineMarks, type LineMarks } from './line-marks.ts'
import type { PlotPoint, XY } from './plot-wells.ts'
import type { TimePlot } from './time-plot.ts'

export interface Band {
  low: XY[]
  high: XY[]
}

/** A part of the time axis in which the method does not hold yet. */
export interface Shade {
  from: number
  to: number
  label: string
}

/** What an analysis adds to a plot: everything that moves when its window or its line moves. */
export interface FitDrawing {
  /** Readings in the window, per well. */
  inside: XY[][]
  fitted: XY[][]
  bands: (Band | null)[]
  /** The window on the axis; null where the plot does not show it. */
  span: [number, number] | null
  shade: Shade | null
  marks: LineMarks | null
  /** Moments that have a name, such as the end of casing storage. */
  moments: Moment[]
  /** Measured less calculated, in the unit of the strip. */
  residuals: { inside: XY[]; outside: XY[]; unit: string }
}

const WINDOW_FIGURES = 4
const residualUnits: Record<string, string> = { m: 'mm', ft: 'in' }
export const residualUnit = (lengthUnit: string) => residualUnits[lengthUnit] ?? lengthUnit

/** Moment from which the method's window is counted. */
export function methodOrigin(inputs: AnalysisInputs, method: MethodId): number {
  const history = rateHistory(inputs.rates)
  return methods[method].needs.phase === 'recovery' ? (history.stop_s ?? Number.NaN) : history.start_s
}

/** The window that was asked for, or the one that the method chose, on the method's clock. */
export function windowOf({ options, result: { extras } }: Fit): TimeWindow | null {
  if (options.window) return options.window
  const { window_from_s: from_s, window_to_s: to_s } = extras
  return from_s === undefined || to_s === undefined ? null : { from_s, to_s }
}

/** Whether a moment lies in the window of an analysis. */
export function inWindowOf(fit: Fit): (elapsed_s: number) => boolean {
  const window = windowOf(fit)
  if (window === null) return () => true
  const origin_s = methodOrigin(fit.inputs, fit.result.method)
  return (elapsed_s) => elapsed_s - origin_s >= window.from_s && elapsed_s - origin_s <= window.to_s
}

interface Drawn {
  plot: TimePlot
  fit: Fit
  inWindow: (elapsed_s: number) => boolean
  halfWidths: HalfWidths | null
}

/** Draws an analysis on a plot against time. `withBand` can be left out while something is dragged. */
export function fitDrawing(plot: TimePlot, fit: Fit, { withBand = true } = {}): FitDrawing {
  const window = windowOf(fit)
  const origin_s = methodOrigin(fit.inputs, fit.result.method)
  const inWindow = inWindowOf(fit)
  const drawn = { plot, fit, inWindow, halfWidths: withBand ? bandOf(fit) : null }
  const times_s = plot.curve_s
  const curves = plot.wells.map(({ wellId }) => modelled(fit, wellId, times_s))
  return {
    inside: plot.wells.map(({ points }) =>
      points.filter((point) => inWindow(point.elapsed_s)).map(({ x, y }) => [x, y]),
    ),
    fitted: curves.map((curve) => curveLine(plot, times_s, curve)),
    bands: plot.wells.map(({ wellId }, i) => band(drawn, wellId, times_s, curves[i] ?? [])),
    span: window && spanOf(plot, origin_s, window),
    shade: shadeOf(drawn, origin_s),
    marks: lineMarks(plot, fit),
    moments: casingMoments(plot, fit, origin_s),
    residuals: residuals(drawn),
  }
}

/** A modelled curve on the axes of a plot; nothing where the plot shows none. */
export function curveLine(plot: TimePlot, times_s: number[], curve: (number | null)[]): XY[] {
  const length_m = unitById(plot.units.length).toSI
  return times_s.flatMap((time, i): XY[] => {
    const [x, value] = [plot.clock.place(time), curve[i]]
    if (x === null || value == null) return []
    const y = value / length_m
    return plot.y.scale === 'log' ? (y > plot.y.min ? [[x, y]] : []) : y >= 0 ? [[x, y]] : []
  })
}

function band(
  { plot, inWindow, halfWidths }: Drawn,
  wellId: string,
  times_s: number[],
  curve: (number | null)[],
): Band | null {
  const within = times_s.flatMap((time, i) => (inWindow(time) && curve[i] != null ? [i] : []))
  const times = within.map((i) => times_s[i] as number)
  const half = halfWidths && times.length > 1 ? halfWidths(wellId, times) : null
  if (!half) return null
  const edge = (sign: 1 | -1) =>
    curveLine(
      plot,
      times,
      within.map((i, k) => (curve[i] as number) + sign * (half[k] as number)),
    )
  return { low: edge(-1), high: edge(1) }
}

/** Where a window lies on the axis; null where the plot does not show its phase. */
export function spanOf(
  { x, clock }: TimePlot,
  origin_s: number,
  { from_s, to_s }: TimeWindow,
): [number, number] | null {
  const first = clock.place(origin_s + from_s)
  const b = clock.place(origin_s + to_s)
  // A window that begins with the clock has no place on a logarithmic axis: it begins at the axis' end.
  const a = first ?? (from_s <= 0 ? earlyEnd(clock, x) : null)
  return a === null || b === null ? null : [Math.min(a, b), Math.max(a, b)]
}

/** The end of the axis at which time begins: the right one for t/t'. */
const earlyEnd = (clock: TimePlot['clock'], { min, max }: TimePlot['x']) =>
  clock.elapsed(min) < clock.elapsed(max) ? min : max

/** The window that a span of the axis stands for, in few figures: no pointer is finer. */
export function windowOfSpan(
  { clock, units }: Pick<TimePlot, 'clock' | 'units'>,
  origin_s: number,
  span: readonly [number, number],
): TimeWindow {
  const unit_s = unitById(units.time).toSI
  const rounded = (x: number) => Number(((clock.elapsed(x) - origin_s) / unit_s).toPrecision(WINDOW_FIGURES)) * unit_s
  const [a, b] = span.map(rounded) as [number, number]
  return { from_s: Math.max(0, Math.min(a, b)), to_s: Math.max(a, b) }
}

/** The window after one of its edges was moved: the edge that stayed keeps all its digits. */
export function movedWindow(
  plot: Pick<TimePlot, 'clock' | 'units'>,
  origin_s: number,
  { window, span, moved }: { window: TimeWindow; span: readonly [number, number]; moved: readonly [number, number] },
): TimeWindow {
  const before = windowOfSpan(plot, origin_s, span)
  const after = windowOfSpan(plot, origin_s, moved)
  return {
    from_s: after.from_s === before.from_s ? window.from_s : after.from_s,
    to_s: after.to_s === before.to_s ? window.to_s : after.to_s,
  }
}

const shadeLabels: Record<string, string> = {
  'u-small': 'u > 0.05',
  'u-large': 'u > 0.05',
  'casing-storage': 'casing storage',
  'casing-storage-over': 'casing storage',
}

/** The part of the axis before the method holds: all of it when that moment lies beyond the axis. */
function shadeOf({ plot: { x, clock }, fit }: Drawn, origin_s: number): Shade | null {
  const finding = fit.result.findings.find(({ code }) => code in shadeLabels)
  const end_s = origin_s + Number(finding?.params.validFrom_s ?? finding?.params.over_s ?? Number.NaN)
  if (!finding || !Number.isFinite(end_s) || !showsPhase(x, clock, origin_s)) return null
  const label = shadeLabels[finding.code] as string
  const rising = clock.elapsed(x.min) < clock.elapsed(x.max)
  const [first, last] = rising ? [x.min, x.max] : [x.max, x.min]
  const edge =
    clock.elapsed(last) <= end_s ? last : clock.elapsed(first) >= end_s ? first : (clock.place(end_s) ?? last)
  const [from, to] = [Math.min(first, edge), Math.max(first, edge)]
  return Math.abs(shareOf(x, to) - shareOf(x, from)) > 0.01 ? { from, to, label } : null
}

/** Whether the method's clock runs along this axis. */
const showsPhase = (x: TimePlot['x'], clock: TimePlot['clock'], origin_s: number) =>
  clock.origin_s === origin_s && Number.isFinite(clock.elapsed(x.max))

function residuals({ plot, fit, inWindow }: Drawn): FitDrawing['residuals'] {
  const unit = residualUnit(plot.units.length)
  const length_m = unitById(plot.units.length).toSI
  const all = plot.wells.flatMap(({ wellId, points }) => {
    const curve = modelled(
      fit,
      wellId,
      points.map(({ elapsed_s }) => elapsed_s),
    )
    return points.flatMap((point, i) => {
      const value = curve[i]
      return value == null ? [] : [{ ...point, y: (point.y * length_m - value) / unitById(unit).toSI }]
    })
  })
  const pick = (wanted: boolean) =>
    all.filter((point: PlotPoint) => inWindow(point.elapsed_s) === wanted).map(({ x, y }): XY => [x, y])
  return { inside: pick(true), outside: pick(false), unit }
}
