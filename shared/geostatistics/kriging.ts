import { backSolve, choleskyInPlace, dot, forwardSolve } from './cholesky.ts'
import { GeostatisticsError, requireFinite } from './errors.ts'
import { variogramModel } from './catalogue.ts'
import type { Point } from './planar.ts'
import { structureCovariance, totalSill, type Variogram } from './variogram.ts'

/** Values at places, one entry each. `errorVariance` is the known variance of each value's own error, null for none. */
export interface KrigingData {
  x: ArrayLike<number>
  y: ArrayLike<number>
  z: ArrayLike<number>
  errorVariance: ArrayLike<number> | null
}

export interface KrigingOptions {
  /**
   * true: a place that coincides with a value shares its nugget, so that error-free data are honoured exactly (the
   * convention of R gstat). false (default): the nugget is local to each value, and the map is smooth through the wells.
   */
  exact?: boolean
}

export interface KrigingResult {
  mean: number
  /** Variance of the true value at the place, nugget included, the values' own errors filtered out. */
  variance: number
  weights: Float64Array
}

/** Distances that several variograms can share: `between` is n × n (lower triangle), `to` leads to the place. */
export interface KrigingGeometry {
  n: number
  between: Float64Array
  to: Float64Array
}

export function krigingGeometry(place: Point, x: ArrayLike<number>, y: ArrayLike<number>): KrigingGeometry {
  const n = x.length
  const between = new Float64Array(n * n)
  const to = new Float64Array(n)
  for (let i = 0; i < n; i++) {
    to[i] = Math.hypot(x[i]! - place.x, y[i]! - place.y)
    for (let j = 0; j < i; j++) between[i * n + j] = Math.hypot(x[i]! - x[j]!, y[i]! - y[j]!)
  }
  return { n, between, to }
}

/** Covariance of the observations, lower triangle, the values' own errors on the diagonal. */
export function observationCovariance(
  geometry: Pick<KrigingGeometry, 'n' | 'between'>,
  v: Variogram,
  errorVariance: ArrayLike<number> | null,
  exact: boolean,
): Float64Array {
  const { n, between } = geometry
  // Looked up once: this is the innermost loop of every fit and estimate.
  const { correlation } = variogramModel(v.model)
  const { sill, range } = v
  const shared = exact ? v.nugget : 0
  const c = new Float64Array(n * n)
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) {
      const h = between[i * n + j]!
      c[i * n + j] = sill * correlation(h / range) + (h === 0 ? shared : 0)
    }
    c[i * n + i] = totalSill(v) + (errorVariance?.[i] ?? 0)
  }
  return c
}

/**
 * Ordinary kriging on distances already known: λ = C⁻¹(c + m·1), m = (1 − 1ᵀC⁻¹c) / 1ᵀC⁻¹1
 * (Journel & Huijbregts 1978, V.A; known error variances on the diagonal: Delhomme 1978).
 * @throws GeostatisticsError `singular` when values coincide without error or nugget.
 */
export function krigeGeometry(
  geometry: KrigingGeometry,
  z: ArrayLike<number>,
  errorVariance: ArrayLike<number> | null,
  v: Variogram,
  options: KrigingOptions = {},
): KrigingResult {
  const { n, to } = geometry
  const exact = options.exact ?? false
  const l = observationCovariance(geometry, v, errorVariance, exact)
  if (!choleskyInPlace(l, n)) throw new GeostatisticsError('singular', 'coincident values without error or nugget')
  const c = new Float64Array(n)
  for (let i = 0; i < n; i++) c[i] = structureCovariance(v, to[i]!) + (exact && to[i] === 0 ? v.nugget : 0)
  const one = new Float64Array(n).fill(1)
  forwardSolve(l, n, c)
  forwardSolve(l, n, one)
  const cc = dot(c, c, n)
  const c1 = dot(c, one, n)
  const oneOne = dot(one, one, n)
  const lagrange = (1 - c1) / oneOne
  const weights = new Float64Array(n)
  for (let i = 0; i < n; i++) weights[i] = c[i]! + lagrange * one[i]!
  backSolve(l, n, weights)
  let mean = 0
  for (let i = 0; i < n; i++) mean += weights[i]! * z[i]!
  return { mean, variance: Math.max(0, totalSill(v) - cc + (1 - c1) * lagrange), weights }
}

/** Ordinary kriging of one place from all the given values. */
export function ordinaryKriging(
  place: Point,
  data: KrigingData,
  v: Variogram,
  options: KrigingOptions = {},
): KrigingResult {
  if (data.z.length === 0) throw new GeostatisticsError('too-few', 'kriging needs a value')
  requireFinite('place', [place.x, place.y])
  for (const [name, values] of Object.entries(data)) if (values) requireFinite(name, values as ArrayLike<number>)
  return krigeGeometry(krigingGeometry(place, data.x, data.y), data.z, data.errorVariance, v, options)
}
