/** Quantile by linear interpolation between order statistics (type 7 of Hyndman & Fan 1996). `sorted` rises. */
export function quantileOf(sorted: readonly number[], p: number): number {
  const at = (sorted.length - 1) * p
  const below = sorted[Math.floor(at)] ?? NaN
  const above = sorted[Math.ceil(at)] ?? NaN
  return below + (at - Math.floor(at)) * (above - below)
}

export const rising = (values: readonly number[]): number[] => [...values].sort((a, b) => a - b)

export const medianOf = (values: readonly number[]): number => quantileOf(rising(values), 0.5)

export const meanOf = (values: readonly number[]): number => values.reduce((sum, v) => sum + v, 0) / values.length

/** Standard deviation with n − 1; 0 for a single value. */
export function deviationOf(values: readonly number[]): number {
  const mean = meanOf(values)
  return values.length < 2 ? 0 : Math.sqrt(values.reduce((sum, v) => sum + (v - mean) ** 2, 0) / (values.length - 1))
}

/**
 * Robust z of each value, 0.6745 (x − median) / MAD (Iglewicz & Hoaglin 1993); above 3.5 in size it is an outlier. All
 * zeros when more than half of the values are equal.
 */
export function robustScores(values: readonly number[]): number[] {
  const median = medianOf(values)
  const spread = medianOf(values.map((v) => Math.abs(v - median)))
  return values.map((v) => (spread > 0 ? (0.6745 * (v - median)) / spread : 0))
}

export const OUTLIER_SCORE = 3.5
