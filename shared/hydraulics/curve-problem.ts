import type { LeastSquaresProblem } from '#shared/numerics/least-squares-problem.ts'
import type { RateIncrement } from './rates.ts'
import type { Selected } from './selection.ts'
import type { Solution } from './solution.ts'
import { superpose } from './superposition.ts'
import { radiusOf } from './wells.ts'

/** The readings of all wells end to end, as the fitter takes them. */
export interface CurveReadings {
  elapsed_s: Float64Array
  distance_m: Float64Array
  drawdown_m: Float64Array
}

export function curveReadings(
  wells: Selected[],
  distances = wells.map(({ series }) => radiusOf(series)),
): CurveReadings {
  return {
    elapsed_s: Float64Array.from(wells.flatMap((well) => well.elapsed_s)),
    distance_m: Float64Array.from(wells.flatMap((well, w) => well.elapsed_s.map(() => distances[w] as number))),
    drawdown_m: Float64Array.from(wells.flatMap((well) => well.drawdown_m)),
  }
}

/** Least squares of a solution on drawdown, or on its logarithm. */
export function curveProblem(
  { response, unknowns }: Solution,
  { elapsed_s, distance_m, drawdown_m }: CurveReadings,
  increments: RateIncrement[],
  logarithmic: boolean,
): LeastSquaresProblem {
  const size = unknowns.length
  const out = new Float64Array(size + 1)
  const scratch = new Float64Array(size + 1)
  const fill = (parameters: ArrayLike<number>, residuals: Float64Array, jacobian: Float64Array | null) => {
    for (let i = 0; i < elapsed_s.length; i++) {
      superpose(response, parameters, increments, elapsed_s[i] as number, distance_m[i] as number, out, scratch)
      const model = out[0] as number
      const measured = drawdown_m[i] as number
      residuals[i] = logarithmic ? Math.log(model / measured) : model - measured
      if (!jacobian) continue
      const scale = logarithmic ? 1 / model : 1
      for (let k = 0; k < size; k++) jacobian[i * size + k] = (out[k + 1] as number) * scale
    }
  }
  return {
    count: elapsed_s.length,
    unknowns: [...unknowns],
    residuals: (parameters, residuals) => fill(parameters, residuals, null),
    jacobian: fill,
  }
}
