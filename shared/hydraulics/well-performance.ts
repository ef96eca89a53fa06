import { exponentialIntegral, exponentialIntegralDerivative } from '#shared/numerics/exponential-integral.ts'
import type { ParameterEstimate } from './analysis.ts'
import { parameterEstimate } from './parameter-estimate.ts'
import { theisU } from './small-u.ts'

/** An efficiency whose interval spans more than this factor says little. */
const WIDEST_EFFICIENCY = 3
/** Freedom of a normal distribution: the errors entering here are all known beforehand. */
const NORMAL = 1e9

export interface PumpedState {
  rate_m3_s: number
  /** Time since pumping began. */
  time_s: number
  wellRadius_m: number
  /** Drawdown measured in the pumped well, already corrected for thinning. */
  drawdown_m: number
  /** Extra drawdown from partial penetration, which is not the well's fault. Default 0. */
  penetrationExcess_m?: number
}

/**
 * Drawdown that the aquifer alone causes at the face of the well: Q·W(r_w²S/(4Tt))/(4πT). Source: Theis 1935.
 */
export function expectedDrawdown({ rate_m3_s, time_s, wellRadius_m }: PumpedState, T: number, S: number): number {
  return (rate_m3_s * exponentialIntegral(theisU(T, S, wellRadius_m, time_s))) / (4 * Math.PI * T)
}

/**
 * Well efficiency: expected over measured drawdown at the well radius at one time, T and S from an observation well.
 * The interval carries the errors of T and S; above 1 the well is better than its bore (development, fractures) or T, S
 * or the drawdown are wrong.
 * @throws RangeError when the measured drawdown leaves nothing after the penetration correction
 * Source: Walton 1962; Kruseman & de Ridder, ILRI 47, from memory.
 */
export function wellEfficiency(state: PumpedState, T: ParameterEstimate, S: ParameterEstimate): ParameterEstimate {
  const measured = state.drawdown_m - (state.penetrationExcess_m ?? 0)
  if (!(measured > 0)) throw new RangeError(`No drawdown to compare: ${measured} m`)
  const u = theisU(T.value, S.value, state.wellRadius_m, state.time_s)
  // d ln s/d ln S = u·W'/W, and d ln s/d ln T = -1 minus that.
  const byS = (u * exponentialIntegralDerivative(u)) / exponentialIntegral(u)
  const otherSd = Math.LN10 * Math.hypot((1 + byS) * T.logSd, byS * S.logSd)
  const efficiency = expectedDrawdown(state, T.value, S.value) / measured
  return parameterEstimate(efficiency, { fitSd: 0, freedom: NORMAL, otherSd }, WIDEST_EFFICIENCY)
}

/** Skin σ from s_w = Q/(4πT)·(W(u_w) + 2σ); negative for a well better than its bore. Source: van Everdingen 1953. */
export function skin(state: PumpedState, T: number, S: number): number {
  const measured = state.drawdown_m - (state.penetrationExcess_m ?? 0)
  return (2 * Math.PI * T * (measured - expectedDrawdown(state, T, S))) / state.rate_m3_s
}

/** Rate per metre of drawdown at a stated time; means little without the time and the rate. Source: ASTM D5472. */
export function specificCapacity(rate_m3_s: number, drawdown_m: number): number {
  if (!(rate_m3_s > 0) || !(drawdown_m > 0)) throw new RangeError('Specific capacity needs a rate and a drawdown')
  return rate_m3_s / drawdown_m
}

/**
 * Final specific capacity of a well beside a straight connected stream: Q/s = 2πT/ln(2L/r_w), times the well's
 * efficiency where it is measured. Source: image well at 2L (Ferris et al. 1962; Theis 1941).
 * @throws RangeError when the stream is not beyond the well's face
 */
export function steadySpecificCapacity(
  T: ParameterEstimate,
  { streamDistance_m, wellRadius_m }: { streamDistance_m: number; wellRadius_m: number },
  efficiency?: ParameterEstimate,
): ParameterEstimate {
  if (!(wellRadius_m > 0) || !(2 * streamDistance_m > wellRadius_m))
    throw new RangeError('The stream lies inside the well')
  const ideal = (2 * Math.PI * T.value) / Math.log((2 * streamDistance_m) / wellRadius_m)
  const otherSd = Math.LN10 * Math.hypot(T.logSd, efficiency?.logSd ?? 0)
  return parameterEstimate(ideal * (efficiency?.value ?? 1), { fitSd: 0, freedom: NORMAL, otherSd }, 10)
}
