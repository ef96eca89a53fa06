import type { LonLat, Point } from '../../server/db/seed/island/frame.ts'
import { toLonLat } from '../../server/db/seed/island/frame.ts'

export const TILE = 256

/** Spherical Mercator position as shares of the world's width, from the north-west corner. */
export type World = readonly [x: number, y: number]

export function toWorld([lon, lat]: Readonly<LonLat>): World {
  const sine = Math.sin((Math.max(-85.06, Math.min(85.06, lat)) * Math.PI) / 180)
  return [lon / 360 + 0.5, 0.5 - Math.log((1 + sine) / (1 - sine)) / (4 * Math.PI)]
}

export function fromWorld([x, y]: World): LonLat {
  return [(x - 0.5) * 360, (Math.atan(Math.sinh(Math.PI * (1 - 2 * y))) * 180) / Math.PI]
}

export const localToWorld = (point: Point): World => toWorld(toLonLat(point))

export interface TileId {
  z: number
  x: number
  y: number
}

/** World position in pixels of a tile's own canvas. */
export function toPixel({ z, x, y }: TileId, [wx, wy]: World): [number, number] {
  const size = TILE * 2 ** z
  return [wx * size - x * TILE, wy * size - y * TILE]
}
