import { fromScale, toScale, type LeastSquaresProblem } from './least-squares-problem.ts'
import { levenbergMarquardt } from './levenberg-marquardt.ts'
import { unknownAt } from './marquardt-step.ts'

/** A minimum, and what is asked of one unknown of it. */
export interface Profiled {
  /** Natural parameters at the minimum, and the sum of squares there. */
  parameters: readonly number[]
  objective: number
  index: number
  /** How far the sum of squares may rise: that of the interval's half-width in a linear model. */
  rise: number
  /** That half-width, in the transformed unknown, from which the search sets out. */
  halfWidth: number
  /** How the transformed unknowns move with it in a linear model. */
  along: readonly number[]
}

/** The search ends when the rise is met within this share of the half-width. */
const NEAR_ENOUGH = 0.01
const MOST_STEPS = 12
/** Wider by this factor at a time while the rise is not reached. */
const WIDER = 1.7
/** Least share of a bracket that a step goes. */
const LEAST_SHARE = 0.2
/** The other unknowns are found again from nearby at each step. */
const REFIT = { mostIterations: 40, tolerance: 1e-7 }

/**
 * Interval of one unknown by its profile: where the sum of squares, least over all other unknowns, has risen by a given
 * amount. Where the model bends it is longer on one side, and holds the truth as often as it says; that of the
 * covariance, which takes the model for linear, does not. An end that the bounds of the search cut off lies there.
 * Source: Bates & Watts 1988, section 6.1 (from memory).
 */
export function profileInterval(problem: LeastSquaresProblem, profiled: Profiled): { low: number; high: number } {
  return { low: endOf(problem, profiled, -1), high: endOf(problem, profiled, 1) }
}

/** Follows √(rise), which is straight where the model is, outwards and then by false position. */
function endOf(problem: LeastSquaresProblem, profiled: Profiled, side: 1 | -1): number {
  const { parameters, objective, index, rise, halfWidth, along } = profiled
  const unknown = unknownAt(problem, index)
  const centre = toScale(parameters[index] as number, unknown)
  const edge = toScale(side > 0 ? unknown.high : unknown.low, unknown)
  const rest = withoutOne(problem, index)
  const others = problem.unknowns.filter((_, k) => k !== index)
  const moves = along.filter((_, k) => k !== index)
  let inner: Point = { distance: 0, height: 0, parameters: parameters.filter((_, k) => k !== index) }
  /** The profile at a distance, followed from the nearest point that is known to lie on it. */
  const pointAt = (distance: number): Point => {
    const start = inner.parameters.map((value, k) => {
      const other = others[k] as (typeof others)[number]
      return fromScale(toScale(value, other) + side * (distance - inner.distance) * (moves[k] as number), other)
    })
    const fit = levenbergMarquardt(rest(fromScale(centre + side * distance, unknown)), { starts: [start], ...REFIT })
    const height = Math.sqrt(Math.max(0, fit.objective - objective) / rise)
    return { distance, height, parameters: fit.parameters }
  }
  const farthest = Math.abs(edge - centre)
  let outer = pointAt(Math.min(halfWidth, farthest))
  for (let step = 0; step < MOST_STEPS && outer.height < 1 && outer.distance < farthest; step++) {
    inner = outer
    outer = pointAt(Math.min(outer.distance * WIDER, farthest))
  }
  for (let step = 0; step < MOST_STEPS && outer.height > 1 + NEAR_ENOUGH && inner.height < 1 - NEAR_ENOUGH; step++) {
    const share = (1 - inner.height) / (outer.height - inner.height)
    // A step that would hardly move is one towards a wall: half of the way is shorter then.
    const found = pointAt(inner.distance + Math.max(share, LEAST_SHARE) * (outer.distance - inner.distance))
    if (found.height < 1) inner = found
    else outer = found
  }
  const { distance } = outer.height < 1 || outer.height - 1 < 1 - inner.height ? outer : inner
  return fromScale(centre + side * distance, unknown)
}

/** A point of the profile: how far from the minimum, √(rise) there, and the other unknowns. */
interface Point {
  distance: number
  height: number
  parameters: number[]
}

/** The problem of all unknowns but one, whose value is given. */
function withoutOne(problem: LeastSquaresProblem, index: number): (value: number) => LeastSquaresProblem {
  const size = problem.unknowns.length
  const whole = new Float64Array(problem.count * size)
  return (value) => {
    const all = (parameters: ArrayLike<number>) => {
      const given = Array.from(parameters)
      return [...given.slice(0, index), value, ...given.slice(index)]
    }
    const { jacobian } = problem
    return {
      count: problem.count,
      unknowns: problem.unknowns.filter((_, k) => k !== index),
      residuals: (parameters, residuals) => problem.residuals(all(parameters), residuals),
      ...(jacobian && {
        jacobian: (parameters: ArrayLike<number>, residuals: Float64Array, out: Float64Array) => {
          jacobian(all(parameters), residuals, whole)
          let to = 0
          whole.forEach((derivative, at) => {
            if (at % size !== index) out[to++] = derivative
          })
        },
      }),
    }
  }
}
