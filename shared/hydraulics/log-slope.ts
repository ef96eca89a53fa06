import { linearRegression } from '#shared/numerics/linear-regression.ts'
import type { DerivativePoint } from './derivative.ts'

/** How far a slope looks to either side, factors of ten in time. */
const REACH = 0.2
const FEWEST = 3

/**
 * Slope of the derivative on the log–log plot, d ln(ds/d ln t) / d ln t, at each point, by regression over its neighbours.
 * Derivatives below the floor of their point count as the floor: a derivative of nothing has no logarithm.
 * NaN where there are too few neighbours.
 */
export function logSlopes(points: readonly DerivativePoint[], floor_m: readonly number[]): number[] {
  const x = points.map(({ time_s }) => Math.log(time_s))
  const y = points.map(({ derivative_m }, i) => Math.log(Math.max(derivative_m, floor_m[i] as number)))
  const reach = REACH * Math.LN10
  let from = 0
  let to = 0
  return x.map((here) => {
    while ((x[from] as number) < here - reach) from++
    while (to < x.length && (x[to] as number) <= here + reach) to++
    if (to - from < FEWEST || x[from] === x[to - 1]) return Number.NaN
    return linearRegression(x.slice(from, to), y.slice(from, to)).slope
  })
}
