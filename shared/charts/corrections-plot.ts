import type { OutsideQuantity } from '#shared/hydraulics/corrections/kinds.ts'
import { outsideQuantities } from '#shared/hydraulics/corrections/kinds.ts'
import { unitById } from '#shared/quantities/units.ts'
import { linearAxis, type Axis } from './axis.ts'
import { thinnedForScreen, type SimplePlot, type SimplePoint } from './simple-plot.ts'

export interface CorrectedWell {
  label: string
  elapsed_s: readonly number[]
  drawdown_m: readonly number[]
  included: readonly boolean[]
  /** Drawdown before corrections; null where there are none. */
  uncorrected_m: readonly number[] | null
}

interface Units {
  time: string
  length: string
}

/** A test of more than this reads better in days. */
const LONG_S = 2 * 86_400

/** Unit of the time axis: the reader's, days over a long record. */
export const timeUnitOf = (elapsed_s: readonly number[], unit: string) => {
  const [from, to] = elapsed_s.reduce(([low, high], time) => [Math.min(low, time), Math.max(high, time)], [0, 0])
  return to - from > LONG_S ? 'd' : unit
}

const timeAxis = (times: number[], unit: string): Axis =>
  linearAxis(times, `time since pumping began, ${unitById(unit).label}`)

/** Drawdown of a well as measured, faint, and corrected. */
export function correctedPlot(well: CorrectedWell, units: Units, direction: 'down' | 'up'): SimplePlot {
  const time = timeUnitOf(well.elapsed_s, units.time)
  const [unit_s, unit_m] = [unitById(time).toSI, unitById(units.length).toSI]
  const pointsOf = (values: readonly number[], shown: SimplePoint['state']) =>
    thinnedForScreen(
      values.flatMap((value, i): SimplePoint[] => {
        const elapsed = well.elapsed_s[i] as number
        if (!Number.isFinite(value) || !Number.isFinite(elapsed)) return []
        const state = well.included[i] ? shown : 'left-out'
        return [{ x: elapsed / unit_s, y: value / unit_m, fitted: null, state }]
      }),
    )
  const of = well.elapsed_s.length
  const corrected = {
    label: well.uncorrected_m ? 'corrected' : 'as measured',
    points: pointsOf(well.drawdown_m, 'used'),
    of,
  }
  const measured = well.uncorrected_m
    ? [{ label: 'as measured', points: pointsOf(well.uncorrected_m, 'outside'), of }]
    : []
  const dots = [corrected, ...measured]
  const points = dots.flatMap((each) => each.points)
  return {
    x: timeAxis(
      points.map(({ x }) => x),
      time,
    ),
    y: linearAxis(
      points.map(({ y }) => y),
      `drawdown, ${unitById(units.length).label}`,
      { inverse: direction === 'down', parts: 6 },
    ),
    dots,
    lines: [],
    shades: [],
    moments: [0],
  }
}

interface Outside {
  label: string
  quantity: OutsideQuantity
  elapsed_s: readonly number[]
  /** In SI. */
  value: readonly number[]
}

/** The series that caused it, over the time of the readings. */
export function outsidePlot(
  { label, quantity, elapsed_s, value }: Outside,
  { x }: SimplePlot,
  well: Pick<CorrectedWell, 'elapsed_s'>,
  units: Units & { pressure: string },
): SimplePlot {
  const unit_s = unitById(timeUnitOf(well.elapsed_s, units.time)).toSI
  const unit = unitById(units[outsideQuantities[quantity].dimension])
  const points = elapsed_s.flatMap((time, i): [number, number][] => {
    const at = time / unit_s
    return at >= x.min && at <= x.max ? [[at, (value[i] as number) / unit.toSI]] : []
  })
  return {
    x,
    y: linearAxis(
      points.map(([, y]) => y),
      `${outsideQuantities[quantity].label.toLowerCase()}, ${unit.label}`,
      { fromZero: false, parts: 3 },
    ),
    dots: [],
    lines: [{ label, points }],
    shades: [],
    moments: [0],
  }
}
