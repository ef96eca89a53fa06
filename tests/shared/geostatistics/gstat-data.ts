import type { KrigingData } from '#shared/geostatistics/kriging.ts'
import type { Point } from '#shared/geostatistics/planar.ts'
import reference from '../../reference/gstat-kriging.json'

/** Results of R gstat on its own data; tool, version and script are in the file's provenance. */
export const gstat = reference

interface Columns {
  x: number[]
  y: number[]
}

export const placesOf = ({ x, y }: Columns): Point[] => x.map((value, i) => ({ x: value, y: y[i] as number }))

export const dataOf = (columns: Columns & { z: number[] }): KrigingData => ({ ...columns, errorVariance: null })

/** Largest difference of two lists over the size of the second; NaN stays NaN, so that it can pass no comparison. */
export function largestDifference(ours: readonly number[], theirs: readonly number[]): number {
  if (ours.length !== theirs.length) return NaN
  return theirs.reduce((worst, value, i) => {
    const difference = Math.abs((ours[i] as number) - value) / Math.max(1e-3, Math.abs(value))
    return Number.isNaN(difference) || difference > worst ? difference : worst
  }, 0)
}
