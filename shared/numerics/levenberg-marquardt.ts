import { fromScale, toScale, type LeastSquaresProblem } from './least-squares-problem.ts'
import { dampedSteps, evaluate, normalEquations, project, unknownAt, type Move, type State } from './marquardt-step.ts'
import { invertSymmetric } from './small-matrix.ts'

export interface LeastSquaresOptions {
  /** Starting points in natural parameters; each is followed to a minimum and the lowest objective wins. */
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
/** A search this near to a minimum in every transformed parameter, and higher by no more than this share, would end in it. */
const NEARLY = 0.05
/** Once a step promises a smaller relative reduction than this, rounding decides whether the objective falls. */
const ROUNDING_FLOOR = 1e-12

const LEAST_DAMPING = 1e-15

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
  const found: Path[] = []
  for (const start of starts) found.push(follow(problem, start, found, mostIterations, tolerance))
  const paths = found.filter((path) => Number.isFinite(path.objective)).sort((a, b) => a.objective - b.objective)
  const best = paths[0]
  if (!best) throw new RangeError('The model gives no finite value at any starting point')
  return describe(problem, best, paths)
}

/** One start to its end, or to a minimum that an earlier one has found, so that no way is gone twice. */
function follow(
  problem: LeastSquaresProblem,
  start: number[],
  found: readonly Path[],
  mostIterations: number,
  tolerance: number,
): Path {
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
  let undamped = false
  for (let iteration = 1; iteration <= mostIterations && Number.isFinite(state.objective); iteration++) {
    const moves = dampedSteps(problem, state, damping)
    if (moves[0] && moves[0].length <= tolerance) return { ...state, iterations: iteration, converged: true }
    const { move, next } = better(problem, moves)
    const gain = next ? state.objective - next.objective : NaN
    const settling = move !== null && move.promised <= ROUNDING_FLOOR * state.objective
    if (settling && move.length >= lastStep) {
      if (undamped) return { ...state, iterations: iteration, converged: true }
      // Damping may have held the last step short, so that only one without it tells that rounding is reached.
      undamped = true
      damping = LEAST_DAMPING
      lastStep = Infinity
      continue
    }
    if (next && (gain > 0 || (settling && Number.isFinite(next.objective)))) {
      const quality = move.promised > 0 ? gain / move.promised : 1
      damping = Math.max(LEAST_DAMPING, damping * Math.max(1 / 10, Math.min(2, 1 - (2 * quality - 1) ** 3)))
      growth = 2
      lastStep = move.length
      state = next
      const met = found.find((path) => path.converged && meets(next, path))
      if (met) return met
    } else {
      damping *= growth
      growth *= 2
      if (!(damping < 1e30)) return { ...state, iterations: iteration, converged: false }
    }
  }
  return { ...state, iterations: mostIterations, converged: false }
}

const noMove = { move: null, next: null }

/** The move that leads lowest, and where. */
function better(problem: LeastSquaresProblem, moves: Move[]): { move: Move; next: State } | typeof noMove {
  const [first, ...others] = moves.map((move) => ({ move, next: evaluate(problem, move.x) }))
  if (!first) return noMove
  return others.reduce((best, tried) => (tried.next.objective < best.next.objective ? tried : best), first)
}

const meets = (state: State, { x, objective }: Path) =>
  state.objective >= objective &&
  state.objective <= (1 + NEARLY) * objective &&
  state.x.every((value, k) => Math.abs(value - (x[k] as number)) <= NEARLY)

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
