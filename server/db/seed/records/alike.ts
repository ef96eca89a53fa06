import type { Curve } from './drawdown.ts'

/** Times are tried at this ratio, from here on. */
const RATIO = 1.15
const FIRST_S = 60

const differ = (one: number, other: number, share: number) => !(Math.abs(one - other) <= share * Math.abs(other))

/** Last time, up to `last_s`, at which one curve is within a share of another; the first one tried where it never is. */
export function alikeUntil(one: Curve, other: Curve, last_s: number, share: number): number {
  for (let time = last_s; time > FIRST_S; time /= RATIO) if (!differ(one(time), other(time), share)) return time
  return FIRST_S
}

/** Time from which one curve stays within a share of another up to `last_s`; infinite where it is not then. */
export function alikeFrom(one: Curve, other: Curve, last_s: number, share: number): number {
  let from = Infinity
  for (let time = last_s; time > FIRST_S && !differ(one(time), other(time), share); time /= RATIO) from = time
  return from
}

/** What is added while time doubles: the slope of a straight line on the logarithm of time. */
export const growth =
  (curve: Curve): Curve =>
  (time_s) =>
    curve(2 * time_s) - curve(time_s)
