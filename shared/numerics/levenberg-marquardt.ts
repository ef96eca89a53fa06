import {
  fromScale,
  numericJacobian,
  toScale,
  type FitUnknown,
  type LeastSquaresProblem,
} from './least-squares-problem.ts'
import { invertSymmetric, solveSymmetric } from './small-matrix.ts'

export interface LeastSquaresOptions {
  /** Starting points in natural parameters; each is followed to its end and the lowest objective wins. */
  starts: number[][]
  /** Longest way from one start, default 200 iterations. */
  mostIterations?: number
  /** A step shorter than this in every transformed parameter ends the search, default 1e-11. */
  tolerance?: number
}

export type LeastSquaresWarning = 'not-converged' | 'singular' | 'at-bound' | 'starts-disagree'

export interface LeastSquaresFit {
  parameters: number[]
  /** Inverse of J'J in the transformed parameters, pseudo-inverse over the determined directions when singular. */
  normalInverse: number[][]
  /** Covariance of the transformed parameters for independent residuals: normalInverse × objective / (count − unknowns). */
  covariance: number[][]
  /** Sum of squared residuals. */
  objective: number
  residuals: Float64Array
  /** Derivatives in the transformed parameters, row by row. */
  jacobian: Float64Array
  iterations: number
  converged: boolean
  singular: boolean
  /** Index of each parameter that ended on one of its bounds. */
  atBound: number[]
  warnings: LeastSquaresWarning[]
}

/** Objectives that differ by less than this relative amount belong to the same minimum. */
const SAME_MINIMUM = 1e-6
/** Once a step promises a smaller relative reduction than this, rounding decides whether the objective falls. */
const ROUNDING_FLOOR = 1e-12

interface State {
  x: number[]
  residuals: Float64Array
  jacobian: Float64Array
  objective: number
}

interface Path extends State {
  iterations: number
  converged: boolean
}

/**
 * Bounded nonlinear least squares from several starts.
 * Bounds are kept by projection: a parameter on a bound whose gradient points outwards takes no part in the step.
 * @throws RangeError without a start, with fewer residuals than unknowns, or when no start gives a finite objective
 * Source: Marquardt 1963, with the damping update of Nielsen 1999.
 */
export function levenbergMarquardt(problem: LeastSquaresProblem, options: LeastSquaresOptions): LeastSquaresFit {
  const { starts, mostIterations = 200, tolerance = 1e-11 } = options
  if (starts.length === 0) throw new RangeError('A fit needs a starting point')
  if (problem.count < problem.unknowns.length) throw new RangeError('A fit needs as many readings as unknowns')
  const paths = starts
    .map((start) => follow(problem, start, mostIterations, tolerance))
    .filter((path) => Number.isFinite(path.objective))
    .sort((a, b) => a.objective - b.objective)
  const best = paths[0]
  if (!best) throw new RangeError('The model gives no finite value at any starting point')
  return describe(problem, best, paths)
}

function follow(problem: LeastSquaresProblem, start: number[], mostIterations: number, tolerance: number): Path {
  let state = evaluate(
    problem,
    project(
      start.map((value, k) => toScale(value, unknownAt(problem, k))),
      problem,
    ),
  )
  let damping = 1e-3
  let growth = 2
  let lastStep = Infinity
  for (let iteration = 1; iteration <= mostIterations && Number.isFinite(state.objective); iteration++) {
    const move = step(problem, state, damping)
    if (move && move.length <= tolerance) return { ...state, iterations: iteration, converged: true }
    const next = move && evaluate(problem, move.x)
    const gain = next ? state.objective - next.objective : NaN
    const settling = move !== null && move.promised <= ROUNDING_FLOOR * state.objective
    if (settling && move.length >= lastStep) return { ...state, iterations: iteration, converged: true }
    if (next && (gain > 0 || (settling && Number.isFinite(next.objective)))) {
      const quality = move.promised > 0 ? gain / move.promised : 1
      damping = Math.max(1e-15, damping * Math.max(1 / 10, Math.min(2, 1 - (2 * quality - 1) ** 3)))
      growth = 2
      lastStep = move.length
      state = next
    } else {
      damping *= growth
      growth *= 2
      if (!(damping < 1e30)) return { ...state, iterations: iteration, converged: false }
    }
  }
  return { ...state, iterations: mostIterations, converged: false }
}

/** The damped step inside the bounds; null when the system is too ill to solve, so that damping grows. */
function step(problem: LeastSquaresProblem, state: State, damping: number) {
  const { gradient, normal } = normalEquations(state, problem.unknowns.length)
  const free = state.x
    .map((_, k) => k)
    .filter((k) => !pushedOut(state.x[k] as number, gradient[k] as number, unknownAt(problem, k)))
  // A direction without information must still be damped, else the system is singular exactly where help is needed.
  const largest = Math.max(...normal.map((row, k) => row[k] as number), Number.MIN_VALUE)
  const matrix = free.map((i) =>
    free.map((j) => {
      const value = (normal[i] as number[])[j] as number
      return i === j ? value + damping * Math.max(value, 1e-12 * largest) : value
    }),
  )
  const solved =
    free.length > 0
      ? solveSymmetric(
          matrix,
          free.map((k) => -(gradient[k] as number)),
        )
      : []
  const target = [...state.x]
  if (!solved) return null
  free.forEach((k, i) => (target[k] = (target[k] as number) + (solved[i] as number)))
  const x = project(target, problem)
  const delta = x.map((value, k) => value - (state.x[k] as number))
  const promised = delta.reduce((sum, d, i) => {
    const curved = delta.reduce((inner, e, j) => inner + ((normal[i] as number[])[j] as number) * e, 0)
    return sum - d * (2 * (gradient[i] as number) + curved)
  }, 0)
  return { x, promised, length: Math.max(0, ...delta.map(Math.abs)) }
}

function normalEquations({ residuals, jacobian }: State, size: number) {
  const gradient = new Array<number>(size).fill(0)
  const normal = Array.from({ length: size }, () => new Array<number>(size).fill(0))
  for (let j = 0; j < size; j++) {
    let sum = 0
    for (let i = 0, at = j; i < residuals.length; i++, at += size)
      sum += (residuals[i] as number) * (jacobian[at] as number)
    gradient[j] = sum
    for (let k = 0; k <= j; k++) {
      let product = 0
      for (let at = 0; at < jacobian.length; at += size)
        product += (jacobian[at + j] as number) * (jacobian[at + k] as number)
      ;(normal[j] as number[])[k] = product
      ;(normal[k] as number[])[j] = product
    }
  }
  return { gradient, normal }
}

function evaluate(problem: LeastSquaresProblem, x: number[]): State {
  const residuals = new Float64Array(problem.count)
  const jacobian = new Float64Array(problem.count * x.length)
  const parameters = x.map((value, k) => fromScale(value, unknownAt(problem, k)))
  if (problem.jacobian) problem.jacobian(parameters, residuals, jacobian)
  else numericJacobian(problem, parameters, residuals, jacobian)
  let objective = 0
  for (let i = 0; i < residuals.length; i++) objective += (residuals[i] as number) ** 2
  return { x, residuals, jacobian, objective }
}

function project(x: number[], problem: LeastSquaresProblem): number[] {
  return x.map((value, k) => {
    const unknown = unknownAt(problem, k)
    return Math.min(toScale(unknown.high, unknown), Math.max(toScale(unknown.low, unknown), value))
  })
}

/** Descent follows the negative gradient; on a bound that leads outwards the parameter is held. */
function pushedOut(value: number, gradient: number, unknown: FitUnknown): boolean {
  return (
    (value <= toScale(unknown.low, unknown) && gradient > 0) ||
    (value >= toScale(unknown.high, unknown) && gradient < 0)
  )
}

function describe(problem: LeastSquaresProblem, best: Path, paths: Path[]): LeastSquaresFit {
  const { unknowns, count } = problem
  const { inverse, singular } = invertSymmetric(normalEquations(best, unknowns.length).normal)
  const variance = best.objective / Math.max(1, count - unknowns.length)
  const atBound = best.x
    .map((_, k) => k)
    .filter((k) => {
      const unknown = unknownAt(problem, k)
      return best.x[k] === toScale(unknown.low, unknown) || best.x[k] === toScale(unknown.high, unknown)
    })
  const warnings: LeastSquaresWarning[] = []
  if (!best.converged) warnings.push('not-converged')
  if (singular) warnings.push('singular')
  if (atBound.length > 0) warnings.push('at-bound')
  if (paths.some((path) => path.objective > best.objective * (1 + SAME_MINIMUM) + Number.MIN_VALUE))
    warnings.push('starts-disagree')
  return {
    parameters: best.x.map((value, k) => fromScale(value, unknownAt(problem, k))),
    normalInverse: inverse,
    covariance: inverse.map((row) => row.map((value) => value * variance)),
    objective: best.objective,
    residuals: best.residuals,
    jacobian: best.jacobian,
    iterations: best.iterations,
    converged: best.converged,
    singular,
    atBound,
    warnings,
  }
}

function unknownAt(problem: LeastSquaresProblem, index: number): FitUnknown {
  const unknown = problem.unknowns[index]
  if (!unknown) throw new RangeError(`The model has no unknown number ${index + 1}`)
  return unknown
}
