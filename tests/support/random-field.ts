import { CholeskyDecomposition, Matrix } from 'ml-matrix'
import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64'
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus'
import type { Point } from '#shared/geostatistics/planar.ts'
import { structureCovariance, type Variogram } from '#shared/geostatistics/variogram.ts'

export interface Draws {
  uniform: () => number
  /** Standard normal, by Box and Muller's rule. */
  normal: () => number
}

export function seededDraws(seed: number): Draws {
  const generator = xoroshiro128plus(seed)
  // Neighbouring seeds begin alike; a jump carries them apart.
  generator.jump()
  const uniform = (): number => uniformFloat64(generator)
  const normal = (): number => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform())
  return { uniform, normal }
}

/** Covariances among places, the nugget local to each. */
export function fieldCovariance(places: readonly Point[], variogram: Variogram): Matrix {
  const c = Matrix.zeros(places.length, places.length)
  places.forEach((a, i) =>
    places.forEach((b, j) => {
      const structure = structureCovariance(variogram, Math.hypot(a.x - b.x, a.y - b.y))
      c.set(i, j, structure + (i === j ? variogram.nugget : 0))
    }),
  )
  return c
}

/** One Gaussian field, exactly, at the places: mean + L·(independent normals), L the Cholesky factor of the covariance. */
export function randomField(places: readonly Point[], variogram: Variogram, mean: number, draws: Draws): number[] {
  const covariance = fieldCovariance(places, variogram)
  for (let i = 0; i < places.length; i++) covariance.set(i, i, covariance.get(i, i) + 1e-10)
  const factor = new CholeskyDecomposition(covariance).lowerTriangularMatrix
  const noise = Matrix.columnVector(places.map(() => draws.normal()))
  return factor
    .mmul(noise)
    .getColumn(0)
    .map((value) => mean + value)
}
