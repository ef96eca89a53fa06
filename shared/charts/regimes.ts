import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import { DERIVATIVE_SMOOTHING } from '#shared/hydraulics/derivative.ts'
import { diagnose, type RegimeSpan } from '#shared/hydraulics/diagnosis.ts'
import { rateHistory, type RateHistory } from '#shared/hydraulics/rates.ts'
import { pumpingPhase, selectReadings } from '#shared/hydraulics/selection.ts'
import type { PlotClock } from './plot-clock.ts'

/** A span of the diagnosis with its place on the axis. */
export interface DrawnRegime extends RegimeSpan {
  from: number
  to: number
}

interface RegimesRequest {
  inputs: AnalysisInputs
  /** The one well whose derivative is read; null: none. */
  wellId: string | null
  clock: PlotClock
  smoothing?: number
}

/** A rate that changes by more ends the readings that a derivative can be read from (common practice). */
const ONE_RATE = 0.1

/** What the derivative of one well shows, from the same readings that the derivative on the plot is made of. */
export function drawnRegimes({
  inputs,
  wellId,
  clock,
  smoothing = DERIVATIVE_SMOOTHING,
}: RegimesRequest): DrawnRegime[] {
  if (wellId === null) return []
  const history = rateHistory(inputs.rates)
  const rule = { ...pumpingPhase(history, null), end_s: endOfOneRate(history) }
  const { wells } = selectReadings(inputs, { wellIds: [wellId], window: null }, rule)
  const place = (time_s: number) => clock.place(history.start_s + time_s)
  return wells
    .flatMap(({ series: { role }, time_s, drawdown_m }) =>
      diagnose(time_s, drawdown_m, { smoothing, aquifer: inputs.aquifer, role }),
    )
    .flatMap((span) => {
      const [from, to] = [place(span.from_s), place(span.to_s)]
      return from === null || to === null ? [] : [{ ...span, from, to }]
    })
}

function endOfOneRate({ increments }: RateHistory): number | null {
  const [first, ...later] = increments
  const change = later.find(({ change_m3_s }) => Math.abs(change_m3_s) > ONE_RATE * (first?.change_m3_s ?? 0))
  return change?.start_s ?? null
}
