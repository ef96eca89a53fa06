import { GeostatisticsError } from './errors.ts'
import { extent, type Point } from './planar.ts'

export interface Declustered {
  /** One per value, summing to 1. */
  weights: number[]
  /** Side of the cells, metres; 0 when the values lie at one place. */
  cellSize: number
  mean: number
}

const ORIGINS = 8
const SIZES = 20

/** Weights that give every occupied cell the same say, averaged over shifted grids (Deutsch 1989, 2). Sum 1. */
export function cellWeights(points: readonly Point[], cellSize: number): number[] {
  if (!(cellSize > 0)) throw new GeostatisticsError('bad-input', 'cell size must be above zero')
  const weights = new Array<number>(points.length).fill(0)
  for (let origin = 0; origin < ORIGINS; origin++) {
    const shift = (origin / ORIGINS) * cellSize
    const keys = points.map((p) => `${Math.floor((p.x + shift) / cellSize)},${Math.floor((p.y + shift) / cellSize)}`)
    const counts = new Map<string, number>()
    for (const key of keys) counts.set(key, (counts.get(key) ?? 0) + 1)
    keys.forEach((key, i) => (weights[i]! += 1 / (ORIGINS * counts.size * counts.get(key)!)))
  }
  return weights
}

/**
 * Declustering with the cell size whose mean differs most from the plain one: it is the lowest mean where wells crowd
 * on high values and the highest where they crowd on low ones (Deutsch 1989).
 */
export function decluster(points: readonly Point[], z: readonly number[]): Declustered {
  const n = z.length
  if (n === 0) throw new GeostatisticsError('too-few', 'declustering needs a value')
  const plain = z.reduce((sum, v) => sum + v, 0) / n
  const whole = extent(points)
  const even = { weights: z.map(() => 1 / n), cellSize: 0, mean: plain }
  if (whole === 0) return even
  const tried = Array.from({ length: SIZES }, (_, i) => {
    const cellSize = whole * 0.01 * 50 ** (i / (SIZES - 1))
    const weights = cellWeights(points, cellSize)
    return { weights, cellSize, mean: weights.reduce((sum, w, j) => sum + w * z[j]!, 0) }
  })
  return tried.reduce((best, next) => (Math.abs(next.mean - plain) > Math.abs(best.mean - plain) ? next : best), even)
}
