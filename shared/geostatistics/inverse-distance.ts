import { GeostatisticsError } from './errors.ts'

/**
 * Inverse-distance weighted mean (Shepard 1968), `power` 2 by default. Distances in metres; a value at the place itself
 * is the answer, several there are averaged.
 */
export function inverseDistance(distances: ArrayLike<number>, z: ArrayLike<number>, power = 2): number {
  if (z.length === 0) throw new GeostatisticsError('too-few', 'inverse distance needs a value')
  const here = Array.from({ length: z.length }, (_, i) => i).filter((i) => distances[i] === 0)
  if (here.length > 0) return here.reduce((sum, i) => sum + z[i]!, 0) / here.length
  let sum = 0
  let total = 0
  for (let i = 0; i < z.length; i++) {
    const weight = distances[i]! ** -power
    sum += weight * z[i]!
    total += weight
  }
  return sum / total
}
