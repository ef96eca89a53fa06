import type { SKRSContext2D } from '@napi-rs/canvas'
import type { TileId, World } from './mercator.ts'
import { TILE, toPixel } from './mercator.ts'

const MARGIN = 24

type Box = readonly [west: number, north: number, east: number, south: number]

const boxes = new WeakMap<readonly World[], Box>()

function boxOf(line: readonly World[]): Box {
  const known = boxes.get(line)
  if (known) return known
  const box = line.reduce<Box>(
    ([west, north, east, south], [x, y]) => [
      Math.min(west, x),
      Math.min(north, y),
      Math.max(east, x),
      Math.max(south, y),
    ],
    [Infinity, Infinity, -Infinity, -Infinity],
  )
  boxes.set(line, box)
  return box
}

/** True when a line's box comes near the tile: far lines are not traced at all. */
function near(tile: TileId, line: readonly World[]): boolean {
  const [west, north, east, south] = boxOf(line)
  const [left, top] = toPixel(tile, [west, north])
  const [right, bottom] = toPixel(tile, [east, south])
  return left < TILE + MARGIN && right > -MARGIN && top < TILE + MARGIN && bottom > -MARGIN
}

/** Adds lines (open or closed) to one path. */
export function trace(
  context: SKRSContext2D,
  tile: TileId,
  lines: readonly (readonly World[])[],
  closed: boolean,
): void {
  context.beginPath()
  for (const line of lines) {
    if (!near(tile, line)) continue
    line.forEach((point, i) => {
      const [x, y] = toPixel(tile, point)
      if (i === 0) context.moveTo(x, y)
      else context.lineTo(x, y)
    })
    if (closed) context.closePath()
  }
}
