import type { LeastSquaresProblem } from './least-squares-problem.ts'
import { levenbergMarquardt, type LeastSquaresFit, type LeastSquaresOptions } from './levenberg-marquardt.ts'
import { normalEquations } from './marquardt-step.ts'
import { invertSymmetric } from './small-matrix.ts'

/** A fit in which residuals beyond a limit count by their size, not by its square. */
export interface RobustFit extends Omit<LeastSquaresFit, 'covariance'> {
  /** The limit; null where all residuals count by their squares, as those of exact readings do. */
  limit: number | null
}

/** Limit in standard deviations, at which normal errors cost 5 % of the precision. Source: Holland & Welsch 1977. */
const LIMIT = 1.345
/** Standard deviation of a normal distribution over its median absolute deviation. */
const PER_MEDIAN = 1.4826
/** Limit and fit follow each other until the limit stays within this share. */
const SETTLED = 1e-7
const MOST_ROUNDS = 50

/**
 * Least squares that readings far off do not pull: the sum of ρ(r) = r² up to a limit c and 2c|r| − c² beyond is least,
 * with c at 1.345 standard deviations by the median size of the fit's own residuals.
 * `residuals` and `jacobian` are those of the model, `normalInverse` the inverse of J'J over the residuals within the
 * limit, which alone move with the model; `objective` is the sum of ρ.
 * @throws RangeError as `levenbergMarquardt`
 * Sources: Huber 1964, 1981 (objective and scale from the median); Holland & Welsch 1977 (limit).
 */
export function robustLeastSquares(problem: LeastSquaresProblem, options: LeastSquaresOptions): RobustFit {
  let fit: Omit<RobustFit, 'limit'> = levenbergMarquardt(problem, options)
  let limit: number | null = null
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const next = LIMIT * PER_MEDIAN * medianSize(fit.residuals)
    if (!(next > 0)) return { ...fit, limit: null }
    if (limit !== null && Math.abs(next / limit - 1) < SETTLED) break
    limit = next
    fit = unlimited(
      problem,
      levenbergMarquardt(limited(problem, limit), { ...options, starts: [fit.parameters] }),
      limit,
    )
  }
  return { ...fit, limit }
}

/** Residuals whose squares add up to the sum of ρ: sign(r)·√ρ(r). */
function limited(problem: LeastSquaresProblem, limit: number): LeastSquaresProblem {
  const size = problem.unknowns.length
  const shorten = (residuals: Float64Array, jacobian: Float64Array | null) =>
    residuals.forEach((residual, i) => {
      if (Math.abs(residual) <= limit) return
      const root = Math.sqrt(2 * limit * Math.abs(residual) - limit * limit)
      residuals[i] = Math.sign(residual) * root
      for (let k = i * size; jacobian && k < (i + 1) * size; k++) jacobian[k] = ((jacobian[k] as number) * limit) / root
    })
  return {
    ...problem,
    residuals: (parameters, residuals) => {
      problem.residuals(parameters, residuals)
      shorten(residuals, null)
    },
    ...(problem.jacobian && {
      jacobian: (parameters, residuals, jacobian) => {
        problem.jacobian?.(parameters, residuals, jacobian)
        shorten(residuals, jacobian)
      },
    }),
  }
}

/** The fit with the model's own residuals and derivatives. */
function unlimited(problem: LeastSquaresProblem, fit: LeastSquaresFit, limit: number): Omit<RobustFit, 'limit'> {
  const size = problem.unknowns.length
  const residuals = fit.residuals.map((shortened) =>
    Math.abs(shortened) <= limit
      ? shortened
      : (Math.sign(shortened) * (shortened * shortened + limit * limit)) / (2 * limit),
  )
  const jacobian = fit.jacobian.map((derivative, at) => {
    const shortened = fit.residuals[Math.floor(at / size)] as number
    return Math.abs(shortened) <= limit ? derivative : (derivative * Math.abs(shortened)) / limit
  })
  const within = jacobian.map((value, at) =>
    Math.abs(residuals[Math.floor(at / size)] as number) <= limit ? value : 0,
  )
  const { inverse, singular } = invertSymmetric(normalEquations({ residuals, jacobian: within }, size).normal)
  return { ...fit, residuals, jacobian, normalInverse: inverse, singular }
}

function medianSize(residuals: Float64Array): number {
  const sizes = residuals.map(Math.abs).sort()
  const middle = sizes.length >> 1
  return sizes.length % 2 === 1
    ? (sizes[middle] as number)
    : ((sizes[middle - 1] as number) + (sizes[middle] as number)) / 2
}
