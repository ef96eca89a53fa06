/** One parameter of a fit. On a `log` scale the fitter works on its natural logarithm, and `low` must be positive. */
export interface FitUnknown {
  low: number
  high: number
  scale: 'log' | 'linear'
}

export interface LeastSquaresProblem {
  /** Number of residuals. */
  count: number
  unknowns: FitUnknown[]
  /** Writes model − data for natural parameter values. */
  residuals(parameters: ArrayLike<number>, residuals: Float64Array): void
  /**
   * Writes residuals and, row by row, their derivatives with respect to the *transformed* parameters (ln p on a log
   * scale). Left out, derivatives are taken numerically.
   */
  jacobian?(parameters: ArrayLike<number>, residuals: Float64Array, jacobian: Float64Array): void
}

export const toScale = (value: number, { scale }: FitUnknown) => (scale === 'log' ? Math.log(value) : value)
export const fromScale = (value: number, { scale }: FitUnknown) => (scale === 'log' ? Math.exp(value) : value)

/** Step of central differences in the transformed parameter: the cube root of the rounding error. */
const DIFFERENCE_STEP = 6e-6

/** Derivatives by central differences in the transformed parameters, one-sided at a bound. */
export function numericJacobian(
  problem: LeastSquaresProblem,
  parameters: ArrayLike<number>,
  residuals: Float64Array,
  jacobian: Float64Array,
): void {
  const { unknowns, count } = problem
  problem.residuals(parameters, residuals)
  const above = new Float64Array(count)
  const below = new Float64Array(count)
  unknowns.forEach((unknown, k) => {
    const centre = toScale(parameters[k] as number, unknown)
    const step = DIFFERENCE_STEP * (unknown.scale === 'log' ? 1 : Math.abs(centre) || 1)
    const high = Math.min(centre + step, toScale(unknown.high, unknown))
    const low = Math.max(centre - step, toScale(unknown.low, unknown))
    problem.residuals(replaced(parameters, k, fromScale(high, unknown)), above)
    problem.residuals(replaced(parameters, k, fromScale(low, unknown)), below)
    for (let i = 0; i < count; i++) {
      jacobian[i * unknowns.length + k] = ((above[i] as number) - (below[i] as number)) / (high - low)
    }
  })
}

function replaced(values: ArrayLike<number>, index: number, value: number): number[] {
  return Array.from(values, (old, i) => (i === index ? value : old))
}
