import type { Canvas, SKRSContext2D } from '@napi-rs/canvas'
import { createCanvas } from '@napi-rs/canvas'
import { toLocal } from '../../server/db/seed/island/frame.ts'
import type { Level, Place } from './grid.ts'
import { levelFor, locate, read } from './grid.ts'
import type { TileId } from './mercator.ts'
import { fromWorld, TILE } from './mercator.ts'
import type { Rgb, Theme } from './theme.ts'

/** Metres offshore where the lighter water ends. */
export const SHELF = 1_800
const NODES = 16
const mix = (a: number, b: number, t: number) => a + (b - a) * t

/** Local metres of the pixels' lattice nodes: projecting every pixel would cost a minute for nothing visible. */
function lattice({ z, x, y }: TileId): Float64Array {
  const nodes = new Float64Array((NODES + 1) ** 2 * 2)
  for (let j = 0; j <= NODES; j++) {
    for (let i = 0; i <= NODES; i++) {
      const local = toLocal(fromWorld([(x + i / NODES) / 2 ** z, (y + j / NODES) / 2 ** z]))
      nodes.set(local, (j * (NODES + 1) + i) * 2)
    }
  }
  return nodes
}

function within(nodes: Float64Array, px: number, py: number, axis: 0 | 1): number {
  const fx = ((px + 0.5) / TILE) * NODES
  const fy = ((py + 0.5) / TILE) * NODES
  const i = Math.floor(fx)
  const j = Math.floor(fy)
  const at = (j * (NODES + 1) + i) * 2 + axis
  const below = at + (NODES + 1) * 2
  return mix(mix(nodes[at]!, nodes[at + 2]!, fx - i), mix(nodes[below]!, nodes[below + 2]!, fx - i), fy - j)
}

function landColour(theme: Theme, level: Level, place: Place, out: Uint8ClampedArray, at: number): void {
  const rise = Math.min(1, read(level.height, place) / 320)
  const wood = 0.85 * read(level.wood, place)
  const shade = read(level.shade, place)
  const gain = 1 + shade * 2 * (shade > 0 ? theme.relief.light : theme.relief.shade) * 2
  for (let k = 0; k < 3; k++) {
    out[at + k] = mix(mix(theme.land[k]!, theme.upland[k]!, rise), theme.wood[k]!, wood) * gain
  }
}

function seaColour(theme: Theme, offshore: number, out: Uint8ClampedArray, at: number): void {
  const near = Math.max(0, 1 - offshore / SHELF)
  const share = Math.min(1, near) ** 2 * (3 - 2 * Math.min(1, near))
  for (let k = 0; k < 3; k++) out[at + k] = mix(theme.sea[k]!, theme.shelf[k]!, share)
}

type Colour = (level: Level, place: Place, out: Uint8ClampedArray, at: number) => void

function paint(tile: TileId, level: Level, empty: Rgb, colour: Colour): Canvas {
  const canvas = createCanvas(TILE, TILE)
  const context = canvas.getContext('2d')
  const image = context.createImageData(TILE, TILE)
  const nodes = lattice(tile)
  const place: Place = { a: 0, b: 0, c: 0, d: 0, u: 0, v: 0 }
  for (let py = 0; py < TILE; py++) {
    for (let px = 0; px < TILE; px++) {
      const at = (py * TILE + px) * 4
      if (locate(level, within(nodes, px, py, 0), within(nodes, px, py, 1), place)) colour(level, place, image.data, at)
      else image.data.set(empty, at)
      image.data[at + 3] = 255
    }
  }
  context.putImageData(image, 0, 0)
  return canvas
}

/** Sea everywhere, then the land inside the coast's path, so that the coast's edge is smooth at every zoom. */
export function drawRelief(
  context: SKRSContext2D,
  tile: TileId,
  theme: Theme,
  pyramid: readonly Level[],
  coast: (context: SKRSContext2D) => void,
): void {
  const pixel = (40_075_017 * Math.cos((38.4 * Math.PI) / 180)) / (TILE * 2 ** tile.z)
  const level = levelFor(pyramid, pixel)
  const sea = paint(tile, level, theme.sea, (at, place, out, i) => seaColour(theme, read(at.offshore, place), out, i))
  const land = paint(tile, level, theme.land, (at, place, out, i) => landColour(theme, at, place, out, i))
  context.drawImage(sea, 0, 0)
  context.save()
  coast(context)
  context.clip()
  context.drawImage(land, 0, 0)
  context.restore()
}
