import { AnalysisError } from './analysis-error.ts'
import type { Series } from './analysis.ts'

/** Stands in for an unknown radius of the pumped well, where T does not depend on it and S is not reported. */
const NOMINAL_RADIUS_M = 0.1

/** Relative error of a distance above which S is neither firm nor fair. */
export const DISTANCE_ERROR_LIMIT = 0.15

/** Distance at which a series was measured: the well radius in the pumped well. @throws AnalysisError at distance zero */
export function radiusOf(series: Series): number {
  if (series.role === 'pumped') return series.wellRadius_m ?? NOMINAL_RADIUS_M
  if (!(series.distance_m > 0) || !Number.isFinite(series.distance_m)) {
    throw new AnalysisError('analysis/zero-distance', { wellId: series.wellId, well: series.label })
  }
  return series.distance_m
}

/** Relative standard deviation of a distance, 0 for the pumped well itself. */
export function distanceError(series: Series): number {
  return series.role === 'pumped' ? 0 : series.distanceSd_m / radiusOf(series)
}
