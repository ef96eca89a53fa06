import { fromScale, toScale, type LeastSquaresProblem } from './least-squares-problem.ts'
import type { LeastSquaresFit } from './levenberg-marquardt.ts'
import { evaluate, normalEquations, unknownAt } from './marquardt-step.ts'
import { invertSymmetric } from './small-matrix.ts'

/**
 * A model described at given natural parameters, of the shape of a fit: nothing is searched.
 * @throws RangeError when the model gives no finite value there, or with fewer residuals than unknowns
 */
export function laidFit(problem: LeastSquaresProblem, parameters: readonly number[]): LeastSquaresFit {
  const { unknowns, count } = problem
  if (count < unknowns.length) throw new RangeError('A fit needs as many readings as unknowns')
  const x = parameters.map((value, k) => toScale(value, unknownAt(problem, k)))
  const state = evaluate(problem, x)
  if (!Number.isFinite(state.objective)) throw new RangeError('The model gives no finite value at these parameters')
  const { inverse, singular } = invertSymmetric(normalEquations(state, unknowns.length).normal)
  const variance = state.objective / Math.max(1, count - unknowns.length)
  return {
    parameters: x.map((value, k) => fromScale(value, unknownAt(problem, k))),
    normalInverse: inverse,
    covariance: inverse.map((row) => row.map((value) => value * variance)),
    objective: state.objective,
    residuals: state.residuals,
    jacobian: state.jacobian,
    iterations: 0,
    converged: true,
    singular,
    atBound: [],
    warnings: singular ? ['singular'] : [],
  }
}
