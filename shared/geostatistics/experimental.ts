import { GeostatisticsError, requireFinite } from './errors.ts'
import type { KrigingData } from './kriging.ts'

/** One lag of an experimental variogram. `gamma` is free of the known errors and may be below zero. */
export interface Lag {
  pairs: number
  /** Mean distance of the pairs, metres. */
  distance: number
  gamma: number
  /** Mean of (e_i² + e_j²)/2 over the pairs, which was taken off. */
  error: number
}

export type Estimator = 'matheron' | 'cressie-hawkins'

export interface ExperimentalOptions {
  /** Longest distance, metres; default a third of the diagonal of the data's rectangle. */
  cutoff?: number
  /** Width of a lag, metres; default a fifteenth of the cutoff. */
  width?: number
  estimator?: Estimator
  /** Pairs for which this says false are left out (across a barrier). */
  pair?: (i: number, j: number) => boolean
}

interface Sums {
  pairs: number
  distance: number
  value: number
  error: number
}

const emptySums = (): Sums => ({ pairs: 0, distance: 0, value: 0, error: 0 })

/** What each estimator adds up per pair and how the sum becomes a semivariance. */
const ESTIMATORS: Record<Estimator, { term: (d: number) => number; gamma: (mean: number, pairs: number) => number }> = {
  // Matheron 1963; Cressie 1993, 2.4.1
  matheron: { term: (d) => d * d, gamma: (mean) => mean / 2 },
  // Cressie & Hawkins 1980; Cressie 1993, 2.4.12
  'cressie-hawkins': {
    term: (d) => Math.sqrt(Math.abs(d)),
    gamma: (mean, pairs) => mean ** 4 / (0.457 + 0.494 / pairs) / 2,
  },
}

/** Diagonal of the rectangle around the data. */
export function diagonalOf(data: Pick<KrigingData, 'x' | 'y'>): number {
  const span = (v: ArrayLike<number>): number => {
    let low = Infinity
    let high = -Infinity
    for (let i = 0; i < v.length; i++) {
      low = Math.min(low, v[i]!)
      high = Math.max(high, v[i]!)
    }
    return high - low
  }
  return Math.hypot(span(data.x), span(data.y))
}

function addUp(data: KrigingData, cutoff: number, width: number, options: ExperimentalOptions): Sums[] {
  const { x, y, z, errorVariance } = data
  const term = ESTIMATORS[options.estimator ?? 'matheron'].term
  const lags = Array.from({ length: Math.ceil(cutoff / width - 1e-9) }, emptySums)
  for (let i = 0; i < z.length; i++) {
    for (let j = 0; j < i; j++) {
      const h = Math.hypot(x[i]! - x[j]!, y[i]! - y[j]!)
      if (h > cutoff || (options.pair && !options.pair(i, j))) continue
      // Lags are open on the left and closed on the right; coincident values belong to the first.
      const lag = lags[Math.max(0, Math.ceil(h / width) - 1)]
      if (!lag) continue
      lag.pairs++
      lag.distance += h
      lag.value += term(z[i]! - z[j]!)
      lag.error += ((errorVariance?.[i] ?? 0) + (errorVariance?.[j] ?? 0)) / 2
    }
  }
  return lags
}

/** Experimental variogram; lags without pairs are left out. Time grows with the square of the number of values. */
export function experimentalVariogram(data: KrigingData, options: ExperimentalOptions = {}): Lag[] {
  if (data.z.length < 2) throw new GeostatisticsError('too-few', 'a variogram needs two values')
  requireFinite('z', data.z)
  const cutoff = options.cutoff ?? diagonalOf(data) / 3
  const width = options.width ?? cutoff / 15
  if (!(cutoff > 0) || !(width > 0)) throw new GeostatisticsError('bad-input', 'cutoff and width must be above zero')
  const { gamma } = ESTIMATORS[options.estimator ?? 'matheron']
  return addUp(data, cutoff, width, options)
    .filter((lag) => lag.pairs > 0)
    .map(({ pairs, distance, value, error }) => ({
      pairs,
      distance: distance / pairs,
      gamma: gamma(value / pairs, pairs) - error / pairs,
      error: error / pairs,
    }))
}
