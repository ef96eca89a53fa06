import {
  fromScale,
  numericJacobian,
  toScale,
  type FitUnknown,
  type LeastSquaresProblem,
} from './least-squares-problem.ts'
import { solveSymmetric } from './small-matrix.ts'

/** Farthest step in ln of an unknown: a longer one leaves the neighbourhood that the slopes tell about. */
const FARTHEST_STEP = 1

/** Where a search stands; `x` are transformed parameters. */
export interface State {
  x: number[]
  residuals: Float64Array
  jacobian: Float64Array
  objective: number
}

export interface Move {
  x: number[]
  /** By how much the objective would fall if the model were linear. */
  promised: number
  length: number
}

/**
 * The damped step inside the bounds; none when the system is too ill to solve, so that damping grows. A step too far is
 * shortened in two ways, of which the caller takes the better: as a whole, which keeps its direction along a valley; and
 * in each unknown by itself, so that one that hardly matters yet does not hold the others back, nor goes where nothing
 * answers at all and no way leads back.
 */
export function dampedSteps(problem: LeastSquaresProblem, state: State, damping: number): Move[] {
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
  if (!solved) return []
  const far = free.map((k, i) => farness(unknownAt(problem, k), solved[i] as number) / FARTHEST_STEP)
  const whole = Math.max(1, ...far)
  const shortened =
    whole > 1
      ? [solved.map((step) => step / whole), solved.map((step, i) => step / Math.max(1, far[i] as number))]
      : [solved]
  return shortened.map((steps) =>
    moveBy(problem, state, { gradient, normal }, new Map(free.map((k, i) => [k, steps[i] as number]))),
  )
}

function moveBy(
  problem: LeastSquaresProblem,
  state: State,
  { gradient, normal }: ReturnType<typeof normalEquations>,
  steps: Map<number, number>,
): Move {
  const x = project(
    state.x.map((value, k) => value + (steps.get(k) ?? 0)),
    problem,
  )
  const delta = x.map((value, k) => value - (state.x[k] as number))
  const promised = delta.reduce((sum, d, i) => {
    const curved = delta.reduce((inner, e, j) => inner + ((normal[i] as number[])[j] as number) * e, 0)
    return sum - d * (2 * (gradient[i] as number) + curved)
  }, 0)
  return { x, promised, length: Math.max(0, ...delta.map(Math.abs)) }
}

/** How far a step goes in an unknown that may change by factors. */
const farness = ({ scale }: FitUnknown, step: number) => (scale === 'log' ? Math.abs(step) : 0)

export function normalEquations({ residuals, jacobian }: Pick<State, 'residuals' | 'jacobian'>, size: number) {
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

export function evaluate(problem: LeastSquaresProblem, x: number[]): State {
  const residuals = new Float64Array(problem.count)
  const jacobian = new Float64Array(problem.count * x.length)
  const parameters = x.map((value, k) => fromScale(value, unknownAt(problem, k)))
  if (problem.jacobian) problem.jacobian(parameters, residuals, jacobian)
  else numericJacobian(problem, parameters, residuals, jacobian)
  let objective = 0
  for (let i = 0; i < residuals.length; i++) objective += (residuals[i] as number) ** 2
  return { x, residuals, jacobian, objective }
}

export function project(x: number[], problem: LeastSquaresProblem): number[] {
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

/** @throws RangeError where the model takes more parameters than it declares */
export function unknownAt(problem: LeastSquaresProblem, index: number): FitUnknown {
  const unknown = problem.unknowns[index]
  if (!unknown) throw new RangeError(`The model has no unknown number ${index + 1}`)
  return unknown
}
