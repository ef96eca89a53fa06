import type { FittedCurve } from '#shared/hydraulics/analysis.ts'
import type { KindOutcome } from '#shared/hydraulics/kind.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { lossOf } from '#shared/hydraulics/step/step-method.ts'
import type { StepInputs } from '#shared/hydraulics/step/step-test.ts'
import { lossDrawdown } from '#shared/hydraulics/step/well-loss.ts'
import { unitById } from '#shared/quantities/units.ts'
import { linearAxis } from './axis.ts'
import { evenly, thinnedForScreen, type SimplePlot, type SimplePoint } from './simple-plot.ts'

export type StepPlotKind = 'per-rate' | 'step-time'

interface Units {
  time: string
  length: string
  discharge: string
}

type Found = Pick<KindOutcome, 'extras' | 'residuals'> | null

/** Drawdown per unit of rate, in the reader's length over the reader's rate. */
const perRateTitle = ({ length, discharge }: Units) =>
  `drawdown over rate, ${unitById(length).label} per ${unitById(discharge).label}`

/** The steps as the analysis read them: rate and the drawdown that it alone would have caused. */
function pointsOf(extras: Record<string, number>): { rate_m3_s: number; drawdown_m: number }[] {
  const points = []
  for (let i = 1; extras[`rate_${i}_m3_s`] !== undefined; i += 1) {
    points.push({ rate_m3_s: extras[`rate_${i}_m3_s`] as number, drawdown_m: extras[`drawdown_${i}_m`] as number })
  }
  return points
}

/** s/Q against Q with the losses fitted to it; its line begins at rate zero, where B is read. */
export function perRatePlot(found: Found, units: Units): SimplePlot {
  const rate = unitById(units.discharge).toSI
  const perRate = unitById(units.length).toSI / rate
  const steps = found ? pointsOf(found.extras) : []
  const loss = found && steps.length > 0 ? lossOf(found.extras) : null
  const model = (rate_m3_s: number) =>
    loss ? (rate_m3_s > 0 ? lossDrawdown(loss, rate_m3_s) / rate_m3_s : loss.B) / perRate : null
  const points = steps.map(({ rate_m3_s, drawdown_m }): SimplePoint => ({
    x: rate_m3_s / rate,
    y: drawdown_m / rate_m3_s / perRate,
    fitted: model(rate_m3_s),
    state: 'used',
  }))
  const x = linearAxis(
    points.map((point) => point.x),
    `rate, ${unitById(units.discharge).label}`,
  )
  return {
    x,
    y: linearAxis(
      points.flatMap(({ y, fitted }) => [y, fitted ?? y]),
      perRateTitle(units),
    ),
    dots: [{ label: 'steps', points, of: points.length }],
    lines: loss ? [{ label: 'losses', points: evenly(0, x.max).flatMap((q) => ownPoint(q, model(q * rate))) }] : [],
    shades: [],
    moments: [],
  }
}

const ownPoint = (x: number, y: number | null): [number, number][] => (y === null ? [] : [[x, y]])

interface StepTimeRequest {
  inputs: StepInputs
  /** Fitted drawdown at times on the clock of the rates. */
  curve: (times_s: number[]) => FittedCurve[]
  units: Units
  direction: 'down' | 'up'
}

/** Drawdown against time with an upright line wherever the rate changed. */
export function stepTimePlot({ inputs, curve, units, direction }: StepTimeRequest): SimplePlot {
  const { well, rates } = inputs
  const unit_s = unitById(units.time).toSI
  const length_m = unitById(units.length).toSI
  const { start_s, stop_s } = rateHistory(rates)
  const all = well.elapsed_s.flatMap((time, i) => {
    const drawdown = well.drawdown_m[i] as number
    return time >= start_s && Number.isFinite(drawdown) ? [{ time, drawdown, i }] : []
  })
  const drawn = thinnedForScreen(all)
  const model = curve(drawn.map(({ time }) => time))[0]?.drawdown_m
  const points = drawn.map(({ time, drawdown, i }, k): SimplePoint => {
    const fitted = model?.[k]
    const during = stop_s === null || time <= stop_s
    return {
      x: (time - start_s) / unit_s,
      y: drawdown / length_m,
      fitted: fitted == null ? null : fitted / length_m,
      state: well.included[i] ? (during ? 'used' : 'outside') : 'left-out',
    }
  })
  const x = linearAxis(
    points.map((point) => point.x),
    `time since pumping began, ${unitById(units.time).label}`,
  )
  const times_s = evenly(start_s, start_s + x.max * unit_s, 400)
  const line = curve(times_s)[0]?.drawdown_m ?? []
  return {
    x,
    y: linearAxis(
      points.map(({ y }) => y),
      `drawdown, ${unitById(units.length).label}`,
      { inverse: direction === 'down' },
    ),
    dots: [{ label: well.label, points, of: all.length }],
    lines: [
      {
        label: 'fitted',
        points: times_s.flatMap((time, i): [number, number][] => {
          const value = line[i]
          return value == null || value < 0 ? [] : [[(time - start_s) / unit_s, value / length_m]]
        }),
      },
    ],
    shades: [],
    moments: rates.filter((step) => step.start_s > start_s).map((step) => (step.start_s - start_s) / unit_s),
  }
}
