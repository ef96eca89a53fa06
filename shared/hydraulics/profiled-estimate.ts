import type { LeastSquaresProblem } from '#shared/numerics/least-squares-problem.ts'
import { normalQuantile } from '#shared/numerics/normal.ts'
import { profileInterval } from '#shared/numerics/profile-interval.ts'
import type { RobustFit } from '#shared/numerics/robust-least-squares.ts'
import { studentQuantile } from '#shared/numerics/student.ts'
import { linearEstimate, type LogUncertainty } from './parameter-estimate.ts'

const TWO_SIDED = 0.975

/**
 * A quantity on a linear scale, such as skin, with the 95 % interval that its profile gives: skin and S of a pumped well
 * move together far beyond where the model is straight. Scatter that strays together widens the profile as it does the
 * variance; errors of rate and distance are added in quadrature on each side.
 */
export function profiledEstimate(problem: LeastSquaresProblem, fit: RobustFit, index: number, known: LogUncertainty) {
  const linear = linearEstimate(fit.parameters[index] as number, known)
  const halfWidth = studentQuantile(TWO_SIDED, known.freedom) * known.fitSd
  // A fit that weighs some readings less is no least of this sum of squares.
  if (fit.limit !== null || !(halfWidth > 0) || !Number.isFinite(halfWidth)) return linear
  const column = fit.normalInverse.map((row) => row[index] as number)
  const unit = column[index] as number
  const along = column.map((value) => value / unit)
  const rise = halfWidth ** 2 / unit
  const { parameters, objective } = fit
  const { low, high } = profileInterval(problem, { parameters, objective, index, rise, halfWidth, along })
  const other = normalQuantile(TWO_SIDED) * known.otherSd
  const { value } = linear
  return { ...linear, low: value - Math.hypot(value - low, other), high: value + Math.hypot(high - value, other) }
}
