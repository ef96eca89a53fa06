import type { Canvas } from '@napi-rs/canvas'
import { createCanvas } from '@napi-rs/canvas'
import { coastPath, drawFeatures } from './features.ts'
import type { Level } from './grid.ts'
import { makePyramid } from './grid.ts'
import type { IslandMap } from './island.ts'
import { makeIslandMap } from './island.ts'
import type { Label } from './labels.ts'
import { drawLabels, placeLabels } from './labels.ts'
import type { TileId, World } from './mercator.ts'
import { TILE } from './mercator.ts'
import { drawRelief } from './relief.ts'
import type { Theme } from './theme.ts'
import { css } from './theme.ts'
import { drawWorld, makeWorldLand } from './world.ts'

/** The last zoom at which the whole world is drawn; deeper tiles show the island only. */
export const WORLD_ZOOM = 5

export interface Atelier {
  world: World[][]
  island: IslandMap
  pyramid: Level[]
  labels: Map<number, Label[]>
}

export function makeAtelier(): Atelier {
  return { world: makeWorldLand(), island: makeIslandMap(), pyramid: makePyramid(), labels: new Map() }
}

function labelsOf(atelier: Atelier, z: number): Label[] {
  const placed = atelier.labels.get(z) ?? placeLabels(z, atelier.island)
  atelier.labels.set(z, placed)
  return placed
}

export function drawTile(atelier: Atelier, tile: TileId, theme: Theme): Canvas {
  const canvas = createCanvas(TILE, TILE)
  const context = canvas.getContext('2d')
  if (tile.z <= WORLD_ZOOM) {
    context.fillStyle = css(theme.sea)
    context.fillRect(0, 0, TILE, TILE)
    drawWorld(context, tile, theme, [...atelier.world, ...atelier.island.coast])
    return canvas
  }
  drawRelief(context, tile, theme, atelier.pyramid, (at) => coastPath(at, tile, atelier.island))
  drawFeatures(context, tile, theme, atelier.island)
  drawLabels(context, tile, theme, labelsOf(atelier, tile.z))
  return canvas
}
