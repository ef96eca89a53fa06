import type { RateIncrement } from './rates.ts'

/**
 * Drawdown per unit rate of a solution at one time and distance, written into `out`: the value, then its derivatives
 * with respect to the transformed unknowns (ln p on a log scale), in their order.
 */
export type UnitResponse = (
  parameters: ArrayLike<number>,
  time_s: number,
  distance_m: number,
  out: Float64Array,
) => void

/**
 * Drawdown of a rate history: each change of rate acts from its start onwards for ever.
 * Overwrites `out` with value and derivatives. Source: superposition in a linear system (Theis 1935 for recovery).
 */
export function superpose(
  response: UnitResponse,
  parameters: ArrayLike<number>,
  increments: RateIncrement[],
  elapsed_s: number,
  distance_m: number,
  out: Float64Array,
  scratch: Float64Array,
): void {
  out.fill(0)
  for (const { start_s, change_m3_s } of increments) {
    if (elapsed_s <= start_s) break
    response(parameters, elapsed_s - start_s, distance_m, scratch)
    for (let k = 0; k < out.length; k++) out[k] = (out[k] as number) + change_m3_s * (scratch[k] as number)
  }
}

/** Drawdown alone, at several times. */
export function drawdownHistory(
  response: UnitResponse,
  parameters: number[],
  increments: RateIncrement[],
  elapsed_s: number[],
  distance_m: number,
): number[] {
  const out = new Float64Array(parameters.length + 1)
  const scratch = new Float64Array(parameters.length + 1)
  return elapsed_s.map((time) => {
    superpose(response, parameters, increments, time, distance_m, out, scratch)
    return out[0] as number
  })
}
