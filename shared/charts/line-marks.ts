import { formatNumber } from '#shared/quantities/format.ts'
import { unitById } from '#shared/quantities/units.ts'
import type { Axis } from './axis.ts'
import type { Fit } from './fit-band.ts'
import { drawsLine, type PlotKind } from './plot-kinds.ts'
import type { XY } from './plot-wells.ts'

/** Where a straight line meets zero, and its fall in one factor of ten. */
export interface LineMarks {
  zero: { at: XY; label: string } | null
  cycle: { corner: [XY, XY, XY]; label: string } | null
}

interface MarkedPlot {
  kind: PlotKind
  x: Axis
  y: Axis
  units: { time: string; length: string }
}

/** The abscissa of each straight-line plot: its unit in SI, and how its zero is named. */
function abscissaOf({ kind, units }: MarkedPlot) {
  const time = unitById(units.time)
  const length = unitById(units.length)
  if (kind === 'semi-log') return { toSI: time.toSI, zero: (x: number) => `t₀ ${formatNumber(x)} ${time.label}` }
  if (kind === 'distance') return { toSI: length.toSI, zero: (x: number) => `r₀ ${formatNumber(x)} ${length.label}` }
  return { toSI: 1, zero: (x: number) => `t/t' ${formatNumber(x)}` }
}

const isOn = ({ min, max }: Axis, value: number) => value >= min && value <= max

export function lineMarks(plot: MarkedPlot, { result: { extras, method } }: Fit): LineMarks | null {
  const { slope_m: slope, intercept_m: intercept } = extras
  if (slope === undefined || intercept === undefined || !drawsLine(method, plot.kind)) return null
  const { toSI, zero } = abscissaOf(plot)
  const length = unitById(plot.units.length)
  const y = (x: number) => (intercept + slope * Math.log10(x * toSI)) / length.toSI
  const x0 = 10 ** (-intercept / slope) / toSI
  const within = isOn(plot.x, x0) && isOn(plot.y, 0)
  const fall = `Δs ${formatNumber(Math.abs(slope) / length.toSI)} ${length.label} in one log cycle`
  return { zero: within ? { at: [x0, 0], label: zero(x0) } : null, cycle: cycleMark(plot, y, fall) }
}

/** The last whole factor of ten on the axis in which the line lies below zero drawdown at neither end. */
function cycleMark(
  { x: { min, max }, y: upright }: MarkedPlot,
  y: (x: number) => number,
  label: string,
): LineMarks['cycle'] {
  for (let power = Math.floor(Math.log10(max)) - 1; 10 ** power >= min; power--) {
    const [a, b] = [10 ** power, 10 ** (power + 1)]
    const [ya, yb] = [y(a), y(b)]
    if (ya >= 0 && yb >= 0 && isOn(upright, Math.max(ya, yb)))
      return {
        corner:
          ya < yb
            ? [
                [a, ya],
                [a, yb],
                [b, yb],
              ]
            : [
                [a, ya],
                [b, ya],
                [b, yb],
              ],
        label,
      }
  }
  return null
}
