import { invertSymmetric } from '#shared/numerics/small-matrix.ts'
import { studentQuantile } from '#shared/numerics/student.ts'
import type { AnalysisInputs, AnalysisOptions, AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { fittedCurve } from '#shared/hydraulics/catalogue.ts'

/** Relative step of a parameter for the slope of the curve. */
const STEP = 1e-4
const TWO_SIDED = 0.975

export interface Fit {
  inputs: AnalysisInputs
  options: AnalysisOptions
  result: AnalysisResult
}

/** Parameters that the fit found; their names are those of the method's extras. */
const parametersOf = ({ extras }: AnalysisResult) =>
  Object.keys(extras).filter((name) => name === 'slope_m' || name === 'intercept_m' || name.startsWith('fitted_'))

/**
 * A line or a curve laid by hand has no scatter of its own, and a fit of logarithms, or by Huber, weighs readings unlike
 * this band.
 */
const hasBand = ({ options, result }: Fit) =>
  !options.line &&
  !options.match &&
  options.objective !== 'log-drawdown' &&
  options.weighting !== 'huber' &&
  result.fit.n > parametersOf(result).length

/** Modelled drawdown of one well; null where the model says nothing. */
export function modelled({ inputs, options, result }: Fit, wellId: string, times_s: number[]): (number | null)[] {
  const curves = fittedCurve(result.method, inputs, { ...options, wellIds: [wellId] }, result, times_s)
  return curves.find((curve) => curve.wellId === wellId)?.drawdown_m ?? times_s.map(() => null)
}

/** Change of the curve with each parameter, by central differences; rows are times. */
function slopes(fit: Fit, wellId: string, times_s: number[]): number[][] {
  const columns = parametersOf(fit.result).map((name) => {
    const value = fit.result.extras[name] as number
    const step = STEP * (Math.abs(value) || 1)
    const at = (changed: number) => {
      const result = { ...fit.result, extras: { ...fit.result.extras, [name]: changed } }
      return modelled({ ...fit, result }, wellId, times_s)
    }
    const [above, below] = [at(value + step), at(value - step)]
    // Scaled by the parameter, so that T and S of very different size make a well-conditioned matrix.
    return above.map((high, i) => (((high ?? 0) - (below[i] ?? 0)) / (2 * step)) * (Math.abs(value) || 1))
  })
  return times_s.map((_, i) => columns.map((column) => column[i] as number))
}

interface Weighed {
  row: number[]
  /** How many readings the row counts for. */
  weight: number
}

/** Change of the curve at each kept residual, which may stand for others that were thinned away. */
function weighedSlopes(fit: Fit): Weighed[] {
  const wells = [...new Set(fit.result.residuals.map(({ wellId }) => wellId))]
  return wells.flatMap((id) => {
    const kept = fit.result.residuals.filter(({ wellId }) => wellId === id)
    const times = kept.map(({ elapsed_s }) => elapsed_s)
    return slopes(fit, id, times).map((row, i) => ({ row, weight: kept[i]?.standsFor ?? 1 }))
  })
}

/** Covariance of the parameters, widened for residuals that are not independent. */
function covariance(fit: Fit): number[][] {
  const { fit: summary } = fit.result
  const rows = weighedSlopes(fit)
  const size = parametersOf(fit.result).length
  const normal = Array.from({ length: size }, (_, a) =>
    Array.from({ length: size }, (_, b) =>
      rows.reduce((sum, { row, weight }) => sum + weight * (row[a] as number) * (row[b] as number), 0),
    ),
  )
  const squares = summary.rmse_m ** 2 * summary.n
  const variance = (squares / (summary.n - size)) * (summary.n / Math.max(1, summary.effectiveN))
  return invertSymmetric(normal).inverse.map((row) => row.map((value) => value * variance))
}

/** Half-widths (m) of the 95 % band of the fitted curve in one well, at elapsed times. */
export type HalfWidths = (wellId: string, times_s: number[]) => number[]

/**
 * The 95 % band of a fitted curve, by the curve's change with each parameter. It shows the scatter of the readings alone:
 * errors of rate and distance move the parameters, not the curve. Null for a fit that has no band.
 * Source: first-order propagation (Seber & Wild 1989, from memory).
 */
export function bandOf(fit: Fit): HalfWidths | null {
  if (!hasBand(fit)) return null
  const matrix = covariance(fit)
  const quantile = studentQuantile(TWO_SIDED, Math.max(1, fit.result.fit.effectiveN - matrix.length))
  return (wellId, times_s) =>
    slopes(fit, wellId, times_s).map((row) => {
      const spread = row.reduce(
        (sum, a, i) => sum + row.reduce((inner, b, j) => inner + a * b * (matrix[i]?.[j] ?? 0), 0),
        0,
      )
      return quantile * Math.sqrt(Math.max(0, spread))
    })
}
