import { fromScale, toScale } from '#shared/numerics/least-squares-problem.ts'
import type { Unknown } from './method.ts'
import type { ResponsePlace } from './place.ts'
import type { Respond } from './superposition.ts'

/** Step in a transformed unknown: the cube root of the error of a solution that is good to about ten digits. */
const STEP = 3e-4

/** Unit-rate drawdown at a place for given parameters, as a function of time. */
export type UnitValue = (parameters: ArrayLike<number>, place: ResponsePlace) => (time_s: number) => number

/** A solution's `respond` by central differences, for solutions whose derivatives are not worth a formula. */
export const numericDerivatives =
  (unknowns: readonly Unknown[], value: UnitValue) =>
  (parameters: ArrayLike<number>, place: ResponsePlace): Respond => {
    const centre = value(parameters, place)
    const pairs = unknowns.map((unknown, k) => {
      const at = toScale(parameters[k] as number, unknown)
      const high = Math.min(at + STEP, toScale(unknown.high, unknown))
      const low = Math.max(at - STEP, toScale(unknown.low, unknown))
      const moved = (to: number) => value(replaced(parameters, k, fromScale(to, unknown)), place)
      return { above: moved(high), below: moved(low), width: high - low }
    })
    return (time_s, out) => {
      out[0] = centre(time_s)
      pairs.forEach(({ above, below, width }, k) => {
        out[k + 1] = (above(time_s) - below(time_s)) / width
      })
    }
  }

const replaced = (values: ArrayLike<number>, index: number, value: number): number[] =>
  Array.from(values, (old, i) => (i === index ? value : old))
