import type { LeastSquaresProblem } from '#shared/numerics/least-squares-problem.ts'
import { otherDrawdown, type OtherSource } from './other-wells.ts'
import type { ResponsePlace } from './place.ts'
import type { RateIncrement } from './rates.ts'
import type { Selected } from './selection.ts'
import type { Solution } from './solution.ts'
import { askedSpan, superpose } from './superposition.ts'

/** The readings of one well with their place, as the fitter takes them. */
export interface PlacedReadings {
  place: ResponsePlace
  /** Other pumping wells as this place feels them. */
  others?: readonly OtherSource[]
  elapsed_s: readonly number[]
  drawdown_m: readonly number[]
}

export const placed = (
  wells: readonly Selected[],
  places: readonly ResponsePlace[],
  others: readonly OtherSource[][] = [],
): PlacedReadings[] =>
  wells.map(({ elapsed_s, drawdown_m }, w) => ({
    place: places[w] as ResponsePlace,
    others: others[w] ?? [],
    elapsed_s,
    drawdown_m,
  }))

/** Least squares of a solution on drawdown, or on its logarithm; wells end to end. */
export function curveProblem(
  { respond, unknowns }: Solution,
  wells: PlacedReadings[],
  increments: RateIncrement[],
  logarithmic: boolean,
): LeastSquaresProblem {
  const size = unknowns.length
  const out = new Float64Array(size + 1)
  const scratch = new Float64Array(size + 1)
  const spans = wells.map(({ elapsed_s }) => askedSpan(increments, elapsed_s))
  const fill = (parameters: ArrayLike<number>, residuals: Float64Array, jacobian: Float64Array | null) => {
    let row = 0
    for (const [w, { place, others = [], elapsed_s, drawdown_m }] of wells.entries()) {
      const atPlace = respond(parameters, place, spans[w])
      const addOthers = others.map((other) => otherDrawdown(other, parameters, elapsed_s))
      for (let i = 0; i < elapsed_s.length; i++, row++) {
        superpose(atPlace, increments, elapsed_s[i] as number, out, scratch)
        for (const add of addOthers) add(elapsed_s[i] as number, out)
        const model = out[0] as number
        const measured = drawdown_m[i] as number
        residuals[row] = logarithmic ? Math.log(model / measured) : model - measured
        if (!jacobian) continue
        const scale = logarithmic ? 1 / model : 1
        for (let k = 0; k < size; k++) jacobian[row * size + k] = (out[k + 1] as number) * scale
      }
    }
  }
  return {
    count: wells.reduce((sum, { elapsed_s }) => sum + elapsed_s.length, 0),
    unknowns: [...unknowns],
    residuals: (parameters, residuals) => fill(parameters, residuals, null),
    jacobian: fill,
  }
}
