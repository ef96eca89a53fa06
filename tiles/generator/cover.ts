import KDBush from 'kdbush'
import type { Point } from '../../server/db/seed/island/frame.ts'
import { HALF } from '../../server/db/seed/island/frame.ts'
import { inland } from '../../server/db/seed/island/shape.ts'
import { WORLD_ZOOM } from './draw.ts'
import type { TileId, World } from './mercator.ts'
import { localToWorld } from './mercator.ts'
import { SHELF } from './relief.ts'

export const ISLAND_ZOOM = 14
const SPACING = 400

/** Places on the island or the shallow water round it, closer together than the smallest tile is wide. */
function places(): World[] {
  const steps = (half: number) =>
    Array.from({ length: Math.floor((2 * half) / SPACING) + 1 }, (_, k) => k * SPACING - half)
  const grid = steps(HALF.x).flatMap((x) => steps(HALF.y).map((y): Point => [x, y]))
  const land = grid.filter(([x, y]) => inland(x, y) > 0)
  const index = new KDBush(land.length)
  for (const [x, y] of land) index.add(x, y)
  index.finish()
  return grid.filter(([x, y]) => index.within(x, y, SHELF + SPACING).length > 0).map(localToWorld)
}

function worldTiles(): TileId[] {
  return Array.from({ length: WORLD_ZOOM + 1 }, (_, z) =>
    Array.from({ length: 4 ** z }, (_unused, i): TileId => ({ z, x: i % 2 ** z, y: Math.floor(i / 2 ** z) })),
  ).flat()
}

function islandTiles(z: number, touched: readonly World[]): TileId[] {
  const keys = new Set(touched.map(([x, y]) => Math.floor(y * 2 ** z) * 2 ** z + Math.floor(x * 2 ** z)))
  return [...keys].sort((a, b) => a - b).map((key) => ({ z, x: key % 2 ** z, y: Math.floor(key / 2 ** z) }))
}

/** Every tile that is kept: the whole world to zoom 5, then only what shows the island and its shallows. */
export function allTiles(): TileId[] {
  const touched = places()
  const zooms = Array.from({ length: ISLAND_ZOOM - WORLD_ZOOM }, (_, k) => WORLD_ZOOM + 1 + k)
  return [...worldTiles(), ...zooms.flatMap((z) => islandTiles(z, touched))]
}
