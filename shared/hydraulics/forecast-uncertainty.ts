import { normalQuantile } from '#shared/numerics/normal.ts'
import { invertSymmetric } from '#shared/numerics/small-matrix.ts'
import type { AnalysisInputs, AnalysisOptions, AnalysisResult, Residual } from './analysis.ts'
import { fittedCurve, methods } from './catalogue.ts'
import { distanceError } from './wells.ts'

/** An analysis by a curve, as it was kept. */
export interface AnalysedCurve {
  inputs: AnalysisInputs
  options: AnalysisOptions
  result: AnalysisResult
}

/** A fitted unknown on the scale on which it was fitted: ln p, or p itself. */
export interface FittedUnknown {
  id: string
  value: number
  scale: 'log' | 'linear'
}

/** Step of a transformed unknown for the slope of a curve. */
const STEP = 1e-4
const HALF_INTERVAL = normalQuantile(0.975)
const PREFIX = 'fitted_'

export function fittedUnknowns({ result: { method, extras } }: Pick<AnalysedCurve, 'result'>): FittedUnknown[] {
  return Object.keys(extras)
    .filter((name) => name.startsWith(PREFIX))
    .map((name) => {
      const id = name.slice(PREFIX.length)
      // Distances to boundaries, which no method lists among its unknowns, are fitted on a log scale.
      const scale = methods[method].unknowns.find((unknown) => unknown.id === id)?.scale ?? 'log'
      return { id, value: extras[name] as number, scale }
    })
}

/** The analysis with one unknown moved by a step on its own scale. */
export function moved<Analysed extends AnalysedCurve>(
  analysed: Analysed,
  { id, value, scale }: FittedUnknown,
  step: number,
): Analysed {
  const changed = scale === 'log' ? value * Math.exp(step) : value + step
  const extras = { ...analysed.result.extras, [PREFIX + id]: changed }
  return { ...analysed, result: { ...analysed.result, extras } }
}

/** Slope of a curve by each unknown, central differences; rows are the curve's points. */
export function slopesOf<Analysed extends AnalysedCurve>(
  analysed: Analysed,
  curve: (analysed: Analysed) => number[],
): number[][] {
  const columns = fittedUnknowns(analysed).map((unknown) => {
    const above = curve(moved(analysed, unknown, STEP))
    const below = curve(moved(analysed, unknown, -STEP))
    return above.map((value, i) => (value - (below[i] as number)) / (2 * STEP))
  })
  return (columns[0] ?? []).map((_, i) => columns.map((column) => column[i] as number))
}

/** Readings of one well that the fit rests on; each may stand for others that were thinned away. */
interface WellRows {
  wellId: string
  weights: number[]
  model: number[]
  slopes: number[][]
  /** Change of the curve with ln r. */
  byDistance: number[]
}

/**
 * Covariance of the fitted unknowns, on their own scales, first order. Variances are those of the intervals that the
 * analysis states; how the unknowns move together comes from the curve's slopes at the fitted readings (scatter), and
 * from the errors of the test's rate and of the distances.
 * @throws AnalysisError when the inputs no longer hold the wells that were fitted
 */
export function unknownsCovariance(analysed: AnalysedCurve): number[][] {
  const rows = wellRows(analysed)
  const sds = statedSds(analysed)
  const joint = jointCovariance(analysed, rows)
  return joint.map((row, i) =>
    row.map((value, j) => {
      const own = (joint[i]?.[i] as number) * (joint[j]?.[j] as number)
      const correlation = i === j ? 1 : own > 0 ? value / Math.sqrt(own) : 0
      return correlation * (sds[i] as number) * (sds[j] as number)
    }),
  )
}

function statedSds(analysed: AnalysedCurve): number[] {
  const { T, S, others = [] } = analysed.result
  return fittedUnknowns(analysed).map(({ id, scale }) => {
    const other = others.find((candidate) => candidate.id === id)
    if (!other) return ((id === 'T' ? T : S)?.logSd ?? Infinity) * Math.LN10
    const width = scale === 'log' ? Math.log(other.high / other.low) : other.high - other.low
    return width / (2 * HALF_INTERVAL)
  })
}

const isLogarithmic = ({ options }: AnalysedCurve) => options.objective === 'log-drawdown'

function wellRows(analysed: AnalysedCurve): WellRows[] {
  const wells = [...new Set(analysed.result.residuals.map(({ wellId }) => wellId))]
  return wells.map((wellId) => {
    const kept = analysed.result.residuals.filter((residual) => residual.wellId === wellId)
    const curve = curveAt(wellId, kept)
    const stretched = (step: number) => curve(withDistance(analysed, wellId, Math.exp(step)))
    const [longer, shorter] = [stretched(STEP), stretched(-STEP)]
    return {
      wellId,
      weights: kept.map(({ standsFor = 1 }) => standsFor),
      model: curve(analysed),
      slopes: slopesOf(analysed, curve),
      byDistance: longer.map((value, i) => (value - (shorter[i] as number)) / (2 * STEP)),
    }
  })
}

const curveAt =
  (wellId: string, kept: readonly Residual[]) =>
  ({ inputs, options, result }: AnalysedCurve): number[] =>
    (
      fittedCurve(
        result.method,
        inputs,
        { ...options, wellIds: [wellId] },
        result,
        kept.map(({ elapsed_s }) => elapsed_s),
      )[0]?.drawdown_m ?? []
    ).map((value) => value ?? 0)

function withDistance(analysed: AnalysedCurve, wellId: string, factor: number): AnalysedCurve {
  const series = analysed.inputs.series.map((one) =>
    one.wellId === wellId ? { ...one, distance_m: one.distance_m * factor } : one,
  )
  return { ...analysed, inputs: { ...analysed.inputs, series } }
}

/** Scatter by the readings, and shifts of the minimum by one standard deviation of rate and of each distance. */
function jointCovariance(analysed: AnalysedCurve, wells: WellRows[]): number[][] {
  const size = fittedUnknowns(analysed).length
  const { n, effectiveN, objective } = analysed.result.fit
  const variance = (objective / Math.max(1, n - size)) * (n / Math.max(1, effectiveN))
  const inverse = invertSymmetric(normalMatrix(analysed, wells, size)).inverse
  const shift = (effects: (well: WellRows, i: number) => number) => {
    const projected = projection(analysed, wells, size, effects)
    return inverse.map((row) => row.reduce((sum, value, k) => sum + value * (projected[k] as number), 0))
  }
  const shifts = [
    shift((well, i) => well.model[i] as number).map((value) => value * analysed.inputs.rateError),
    ...analysed.inputs.series.map((series) => {
      const error = distanceError(series)
      const moves = shift((well, i) => (well.wellId === series.wellId ? (well.byDistance[i] as number) : 0))
      return moves.map((value) => value * error)
    }),
  ]
  return inverse.map((row, a) =>
    row.map((value, b) => shifts.reduce((sum, one) => sum + (one[a] as number) * (one[b] as number), value * variance)),
  )
}

/** Weight of a reading in the objective: that of its logarithm falls with the square of drawdown. */
const weightOf = (analysed: AnalysedCurve, { weights, model }: WellRows, i: number) => {
  const value = model[i] as number
  return (weights[i] as number) / (isLogarithmic(analysed) ? value * value : 1)
}

const normalMatrix = (analysed: AnalysedCurve, wells: WellRows[], size: number): number[][] =>
  Array.from({ length: size }, (_, a) => projection(analysed, wells, size, ({ slopes }, i) => slopes[i]?.[a] as number))

/** Weighted product of the slopes with an effect on the curve. */
function projection(
  analysed: AnalysedCurve,
  wells: WellRows[],
  size: number,
  effect: (well: WellRows, i: number) => number,
): number[] {
  return Array.from({ length: size }, (_, k) =>
    wells.reduce(
      (total, well) =>
        well.slopes.reduce(
          (sum, row, i) => sum + weightOf(analysed, well, i) * (row[k] as number) * effect(well, i),
          total,
        ),
      0,
    ),
  )
}
