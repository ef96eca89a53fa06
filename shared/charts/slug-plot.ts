import type { KindOutcome } from '#shared/hydraulics/kind.ts'
import type { FittedCurve } from '#shared/hydraulics/analysis.ts'
import type { SlugInputs, SlugRepeat } from '#shared/hydraulics/slug/slug-test.ts'
import { unitById } from '#shared/quantities/units.ts'
import { extentOf, linearAxis, logAxis, type Axis } from './axis.ts'
import type { XY } from './plot-wells.ts'
import { evenly, thinnedForScreen, type SimpleDots, type SimplePlot, type SimplePoint } from './simple-plot.ts'

export type SlugPlotKind = 'head-log' | 'head-linear'

export interface SlugPlotRequest {
  kind: SlugPlotKind
  inputs: SlugInputs
  /** Repeats shown; null: all. */
  repeatIds: readonly string[] | null
  /** Normalised heads between which the line is drawn, for methods that draw one. */
  heads: { from: number; to: number } | null
  outcome: Pick<KindOutcome, 'residuals'> | null
  /** Fitted displacement at times since the level was moved. */
  curve: (times_s: number[]) => FittedCurve[]
  /** Unit id of time. */
  timeUnit: string
}

/** The lowest head that a logarithmic plot goes down to: below it noise rules. */
const LOWEST_HEAD = 0.01

/** Heads of a slug test as shares of the first displacement, against time; the heads recommended are tinted. */
export function slugPlot(request: SlugPlotRequest): SimplePlot {
  const { kind, inputs, repeatIds, heads, timeUnit } = request
  const repeats = inputs.repeats.filter(({ id }) => repeatIds === null || repeatIds.includes(id))
  const unit_s = unitById(timeUnit).toSI
  const last_s = extentOf(repeats.flatMap(({ elapsed_s }) => extentOf(elapsed_s) ?? []))?.[1] ?? 1
  const times_s = evenly(0, last_s)
  const curves = request.curve(times_s)
  const dots = repeats.map((repeat) => dotsOf(repeat, request, unit_s))
  return {
    x: linearAxis(
      dots.flatMap(({ points }) => points.map(({ x }) => x)),
      `time since the level was moved, ${unitById(timeUnit).label}`,
    ),
    y: headAxis(kind, dots),
    dots,
    lines: repeats.flatMap(({ id, label, initial_m }) => {
      const curve = curves.find(({ wellId }) => wellId === id)
      return curve ? [{ label, points: lineOf(kind, times_s, curve, initial_m, unit_s) }] : []
    }),
    shades: heads && kind === 'head-log' ? [{ axis: 'y', ...heads, label: 'heads of the line' }] : [],
    moments: [],
  }
}

function headAxis(kind: SlugPlotKind, dots: SimpleDots[]): Axis {
  const values = dots.flatMap(({ points }) => points.map(({ y }) => y))
  const title = 'head over first displacement, H/H₀'
  if (kind === 'head-linear') return linearAxis(values, title)
  const axis = logAxis([1, ...values], title)
  return { ...axis, min: Math.max(axis.min, LOWEST_HEAD) }
}

const shown = (kind: SlugPlotKind, head: number) =>
  Number.isFinite(head) && (kind === 'head-linear' || head >= LOWEST_HEAD)

function dotsOf(repeat: SlugRepeat, { kind, outcome, curve }: SlugPlotRequest, unit_s: number): SimpleDots {
  const { id, label, initial_m, elapsed_s, displacement_m, included } = repeat
  const used = new Set(outcome?.residuals.filter(({ wellId }) => wellId === id).map((residual) => residual.elapsed_s))
  const all = elapsed_s.flatMap((time, i) => {
    const head = (displacement_m[i] as number) / initial_m
    return time >= 0 && shown(kind, head) ? [{ time, head, i }] : []
  })
  const drawn = thinnedForScreen(all)
  const model = curve(drawn.map(({ time }) => time)).find(({ wellId }) => wellId === id)
  const points = drawn.map(({ time, head, i }, k): SimplePoint => {
    const fitted = model?.drawdown_m[k]
    const state = included[i] ? (used.has(time) ? 'used' : 'outside') : 'left-out'
    return { x: time / unit_s, y: head, fitted: fitted == null ? null : fitted / initial_m, state }
  })
  return { label, points, of: all.length }
}

function lineOf(kind: SlugPlotKind, times_s: number[], curve: FittedCurve, initial_m: number, unit_s: number): XY[] {
  return times_s.flatMap((time, i): XY[] => {
    const value = curve.drawdown_m[i]
    const head = value == null ? Number.NaN : value / initial_m
    return shown(kind, head) ? [[time / unit_s, head]] : []
  })
}
