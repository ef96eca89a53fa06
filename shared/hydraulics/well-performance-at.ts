import { AnalysisError } from './analysis-error.ts'
import type { AnalysisInputs, ParameterEstimate } from './analysis.ts'
import { interpolated } from './interpolate.ts'
import { meanRate, rateHistory } from './rates.ts'
import { pumpingPhase, selectReadings } from './selection.ts'
import { thinningCorrection, THINNING_REFUSED_ABOVE } from './unconfined.ts'
import { skin, specificCapacity, steadySpecificCapacity, wellEfficiency, type PumpedState } from './well-performance.ts'

export interface WellPerformance {
  time_s: number
  rate_m3_s: number
  /** As measured. */
  drawdown_m: number
  specificCapacity: number
  /** Null where T and S of an observation well, or the well's radius, are missing. */
  efficiency: ParameterEstimate | null
  skin: number | null
  /** Beside a connected stream: final specific capacity of a perfect well, and of this one. Null without a stream. */
  steadyIdeal: ParameterEstimate | null
  steadyReal: ParameterEstimate | null
}

/** What the aquifer is known to be from an observation well, never from the pumped well itself. */
export interface AquiferKnown {
  T: ParameterEstimate | null
  S: ParameterEstimate | null
}

/**
 * Performance of the pumped well at a time since pumping began, the last reading by default.
 * @throws AnalysisError when the well has no reading of pumping, or none around that time, or no drawdown then
 */
export function wellPerformanceAt(
  inputs: AnalysisInputs,
  { T, S }: AquiferKnown,
  { wellId, time_s }: { wellId: string; time_s?: number },
): WellPerformance {
  const { series, at_s, drawdown_m, rate } = stateAt(inputs, wellId, time_s)
  const radius = series.wellRadius_m
  const state: PumpedState | null =
    radius === null
      ? null
      : { rate_m3_s: rate, time_s: at_s, wellRadius_m: radius, drawdown_m: withoutThinning(drawdown_m, inputs) }
  const efficiency = state && T && S ? wellEfficiency(state, T, S) : null
  const stream = inputs.streamDistance_m
  const place = stream === null || radius === null ? null : { streamDistance_m: stream, wellRadius_m: radius }
  return {
    time_s: at_s,
    rate_m3_s: rate,
    drawdown_m,
    specificCapacity: specificCapacity(rate, drawdown_m),
    efficiency,
    skin: state && T && S ? skin(state, T.value, S.value) : null,
    steadyIdeal: place && T ? steadySpecificCapacity(T, place) : null,
    steadyReal: place && T && efficiency ? steadySpecificCapacity(T, place, efficiency) : null,
  }
}

function stateAt(inputs: AnalysisInputs, wellId: string, time_s: number | undefined) {
  const history = rateHistory(inputs.rates)
  const options = { wellIds: [wellId], window: null, readingsPerCycle: null }
  const well = selectReadings(inputs, options, pumpingPhase(history, null)).wells[0]
  const [from_s, to_s] = [well?.time_s[0], well?.time_s.at(-1)]
  if (!well || from_s === undefined || to_s === undefined) {
    throw new AnalysisError('analysis/too-few-readings', { needed: 1, found: 0 })
  }
  const at_s = time_s ?? to_s
  if (!(at_s >= from_s && at_s <= to_s))
    throw new AnalysisError('analysis/no-common-time', { from_s, to_s, time_s: at_s })
  const drawdown_m = interpolated(well.time_s, well.drawdown_m, at_s)
  if (!(drawdown_m > 0)) throw new AnalysisError('analysis/no-drawdown')
  return { series: well.series, at_s, drawdown_m, rate: meanRate(history, history.start_s + at_s) }
}

/** Drawdown a confined aquifer would show; left as measured where the correction does not hold. */
function withoutThinning(drawdown_m: number, { aquifer, thickness_m }: AnalysisInputs): number {
  if (aquifer !== 'unconfined' || thickness_m === null || !(thickness_m > 0)) return drawdown_m
  return drawdown_m > THINNING_REFUSED_ABOVE * thickness_m ? drawdown_m : thinningCorrection(drawdown_m, thickness_m)
}
