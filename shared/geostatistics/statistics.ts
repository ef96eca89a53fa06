import { choleskyInPlace, dot, forwardSolve } from './cholesky.ts'
import { decluster } from './declustering.ts'
import { GeostatisticsError } from './errors.ts'
import { krigingGeometry, observationCovariance, type KrigingData } from './kriging.ts'
import { mixtureQuantile } from './mixture.ts'
import { deviationOf, meanOf, OUTLIER_SCORE, quantileOf, rising, robustScores } from './robust.ts'
import type { Variogram } from './variogram.ts'

/** Statistics of log10 values; the geometric mean is 10 to the power of `mean`. */
export interface Summary {
  n: number
  mean: number
  median: number
  deviation: number
  p10: number
  p90: number
}

export interface Interval {
  low: number
  high: number
}

export interface Statistics extends Summary {
  least: number
  most: number
  /** Each cell of the map has the same say. */
  declustered: Summary & { cellSize: number }
  /** 95 % interval of the mean if wells were independent; null for fewer than two values. */
  meanIfIndependent: Interval | null
  /** 95 % interval of the regional mean by kriging of the mean; null without a variogram. */
  meanByKriging: (Interval & { mean: number; effectiveN: number }) | null
  /** Indices of values whose robust z exceeds 3.5. */
  outliers: number[]
}

const MOST_FOR_MEAN = 800

/** Weighted quantile: linear between the middles of the weights' steps. */
function weightedQuantile(sorted: readonly { z: number; weight: number }[], p: number): number {
  let passed = 0
  let before: { z: number; at: number } | null = null
  for (const { z, weight } of sorted) {
    const at = passed + weight / 2
    if (at >= p) return before ? before.z + ((p - before.at) / (at - before.at)) * (z - before.z) : z
    before = { z, at }
    passed += weight
  }
  return before?.z ?? NaN
}

function declusteredSummary({ x, y, z }: KrigingData): Statistics['declustered'] {
  const points = Array.from({ length: z.length }, (_, i) => ({ x: x[i]!, y: y[i]! }))
  const { weights, mean, cellSize } = decluster(points, Array.from(z))
  const sorted = weights.map((weight, i) => ({ weight, z: z[i]! })).sort((a, b) => a.z - b.z)
  const variance = sorted.reduce((sum, s) => sum + s.weight * (s.z - mean) ** 2, 0)
  const at = (p: number): number => weightedQuantile(sorted, p)
  return { n: z.length, mean, median: at(0.5), deviation: Math.sqrt(variance), p10: at(0.1), p90: at(0.9), cellSize }
}

/** 95 % interval of a mean of independent values by Student's t; null for fewer than two. */
export function independentInterval(mean: number, deviation: number, n: number): Interval | null {
  if (n < 2) return null
  const sd = deviation / Math.sqrt(n)
  const at = (p: number): number => mixtureQuantile([{ weight: 1, mean, sd, df: n - 1 }], p)
  return { low: at(0.025), high: at(0.975) }
}

export interface KrigedMean {
  mean: number
  variance: number
  /** As many independent values, with the same errors, would give a mean as sure (Bayley & Hammersley 1946). */
  effectiveN: number
}

/**
 * Mean by generalised least squares and its variance 1 / 1ᵀC⁻¹1 (kriging of the mean; Wackernagel 2003, 4). Above 800
 * values an even selection is used, which can only widen the interval.
 */
export function krigedMean(data: KrigingData, v: Variogram): KrigedMean {
  const step = Math.max(1, data.z.length / MOST_FOR_MEAN)
  const kept = Array.from({ length: Math.min(data.z.length, MOST_FOR_MEAN) }, (_, i) => Math.floor(i * step))
  const at = (values: ArrayLike<number>): number[] => kept.map((i) => values[i]!)
  const n = kept.length
  const geometry = krigingGeometry({ x: 0, y: 0 }, at(data.x), at(data.y))
  const l = observationCovariance(geometry, v, data.errorVariance && at(data.errorVariance), false)
  const ifIndependent = Array.from({ length: n }, (_, i) => 1 / l[i * n + i]!).reduce((sum, one) => sum + one, 0)
  if (!choleskyInPlace(l, n)) throw new GeostatisticsError('singular', 'coincident values without error or nugget')
  const z = Float64Array.from(at(data.z))
  const one = new Float64Array(n).fill(1)
  forwardSolve(l, n, z)
  forwardSolve(l, n, one)
  const information = dot(one, one, n)
  return {
    mean: dot(z, one, n) / information,
    variance: 1 / information,
    effectiveN: (n * information) / ifIndependent,
  }
}

function krigedInterval(data: KrigingData, v: Variogram | null): Statistics['meanByKriging'] {
  if (!v) return null
  const { mean, variance, effectiveN } = krigedMean(data, v)
  const half = 1.959964 * Math.sqrt(variance)
  return { mean, low: mean - half, high: mean + half, effectiveN }
}

/** Plain and declustered statistics of log10 values. @throws GeostatisticsError without values. */
export function statisticsOf(data: KrigingData, v: Variogram | null = null): Statistics {
  const z = Array.from(data.z)
  if (z.length === 0) throw new GeostatisticsError('too-few', 'statistics need a value')
  const sorted = rising(z)
  const mean = meanOf(z)
  const deviation = deviationOf(z)
  const scores = robustScores(z)
  return {
    n: z.length,
    mean,
    median: quantileOf(sorted, 0.5),
    deviation,
    p10: quantileOf(sorted, 0.1),
    p90: quantileOf(sorted, 0.9),
    least: sorted[0]!,
    most: sorted[sorted.length - 1]!,
    declustered: declusteredSummary(data),
    meanIfIndependent: independentInterval(mean, deviation, z.length),
    meanByKriging: krigedInterval(data, v),
    outliers: scores.flatMap((score, i) => (Math.abs(score) > OUTLIER_SCORE ? [i] : [])),
  }
}
