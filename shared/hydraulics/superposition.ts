import type { TimeSpan } from '#shared/numerics/laplace-inversion.ts'
import type { RateIncrement } from './rates.ts'

/**
 * Drawdown per unit rate at one place, as a function of the time since pumping began. Writes the value into `out`, then
 * its derivatives by the transformed unknowns (ln p on a log scale), in their order.
 */
export type Respond = (time_s: number, out: Float64Array) => void

/**
 * Drawdown of a rate history: each change of rate acts from its start onwards for ever.
 * Overwrites `out` with value and derivatives. Source: superposition in a linear system (Theis 1935 for recovery).
 */
export function superpose(
  respond: Respond,
  increments: RateIncrement[],
  elapsed_s: number,
  out: Float64Array,
  scratch: Float64Array,
): void {
  out.fill(0)
  for (const { start_s, change_m3_s } of increments) {
    if (elapsed_s <= start_s) break
    respond(elapsed_s - start_s, scratch)
    for (let k = 0; k < out.length; k++) out[k] = (out[k] as number) + change_m3_s * (scratch[k] as number)
  }
}

/** First and last of the times since a change of rate at which superposition asks for a response; null without any. */
export function askedSpan(increments: RateIncrement[], elapsed_s: readonly number[]): TimeSpan | null {
  let [from, to] = [Infinity, 0]
  for (const { start_s } of increments)
    for (const time of elapsed_s) {
      const since = time - start_s
      if (since > 0 && since < from) from = since
      if (since > to) to = since
    }
  return to > 0 ? { from, to } : null
}

/** Adds what a further source draws at a moment, value and derivatives. */
export type AddDrawdown = (elapsed_s: number, out: Float64Array) => void

/**
 * Drawdown alone, at several times.
 * @param unknowns how many derivatives `respond` writes
 */
export function drawdownHistory(
  respond: Respond,
  unknowns: number,
  increments: RateIncrement[],
  elapsed_s: number[],
  others: readonly AddDrawdown[] = [],
): number[] {
  const out = new Float64Array(unknowns + 1)
  const scratch = new Float64Array(unknowns + 1)
  return elapsed_s.map((time) => {
    superpose(respond, increments, time, out, scratch)
    for (const add of others) add(time, out)
    return out[0] as number
  })
}
