import { HALF } from '../../server/db/seed/island/frame.ts'
import { inland } from '../../server/db/seed/island/shape.ts'
import { elevation } from '../../server/db/seed/island/terrain.ts'
import { woodland } from '../../server/db/seed/island/woods.ts'

/** One level of the island's rasters: rows from south to north, values at cell centres. */
export interface Level {
  cell: number
  columns: number
  rows: number
  height: Float32Array
  /** Light on the ground, 0 on the flat, positive towards the north-west. */
  shade: Float32Array
  wood: Float32Array
  /** Metres offshore from the nearest land, 0 on land. */
  offshore: Float32Array
}

const CELL = 30
const LEVELS = 9
/** How much steeper the land is drawn than it is. */
const EXAGGERATION = 2.4

function blank(cell: number, columns: number, rows: number): Level {
  const raster = () => new Float32Array(columns * rows)
  return { cell, columns, rows, height: raster(), shade: raster(), wood: raster(), offshore: raster() }
}

function fill(level: Level): void {
  for (let j = 0; j < level.rows; j++) {
    for (let i = 0; i < level.columns; i++) {
      const at = j * level.columns + i
      const x = (i + 0.5) * level.cell - HALF.x
      const y = (j + 0.5) * level.cell - HALF.y
      level.offshore[at] = inland(x, y) > 0 ? 0 : Infinity
      if (level.offshore[at] !== 0) continue
      const height = elevation(x, y)
      level.height[at] = height
      level.wood[at] = Math.max(0, Math.min(1, woodland(x, y, height) * 9))
    }
  }
}

const FORWARD = [
  [-1, 0],
  [-1, -1],
  [0, -1],
  [1, -1],
] as const

/** Distances to the nearest land by two sweeps (chamfer distance; Borgefors 1986), within about 8 %. */
function spreadOffshore({ cell, columns, rows, offshore }: Level): void {
  const sweep = (at: number, i: number, j: number, sign: 1 | -1) => {
    for (const [di, dj] of FORWARD) {
      const [ni, nj] = [i + sign * di, j + sign * dj]
      if (ni < 0 || nj < 0 || ni >= columns || nj >= rows) continue
      const through = offshore[nj * columns + ni]! + cell * (di !== 0 && dj !== 0 ? Math.SQRT2 : 1)
      if (through < offshore[at]!) offshore[at] = through
    }
  }
  for (let at = 0; at < offshore.length; at++) sweep(at, at % columns, Math.floor(at / columns), 1)
  for (let at = offshore.length - 1; at >= 0; at--) sweep(at, at % columns, Math.floor(at / columns), -1)
}

/** Lambert shading from the north-west at 45°, less what level ground receives. */
function light(level: Level): void {
  const { columns, rows, cell, height } = level
  for (let j = 1; j < rows - 1; j++) {
    for (let i = 1; i < columns - 1; i++) {
      const at = j * columns + i
      const east = (EXAGGERATION * (height[at + 1]! - height[at - 1]!)) / (2 * cell)
      const north = (EXAGGERATION * (height[at + columns]! - height[at - columns]!)) / (2 * cell)
      const flat = Math.SQRT1_2
      level.shade[at] = (0.5 * (east - north) + flat) / Math.sqrt(1 + east * east + north * north) - flat
    }
  }
}

function halved(level: Level): Level {
  const half = blank(level.cell * 2, Math.ceil(level.columns / 2), Math.ceil(level.rows / 2))
  for (const name of ['height', 'shade', 'wood', 'offshore'] as const) {
    const from = level[name]
    for (let j = 0; j < half.rows; j++) {
      for (let i = 0; i < half.columns; i++) {
        const right = Math.min(2 * i + 1, level.columns - 1)
        const up = Math.min(2 * j + 1, level.rows - 1) * level.columns
        const low = 2 * j * level.columns
        half[name][j * half.columns + i] =
          (from[low + 2 * i]! + from[low + right]! + from[up + 2 * i]! + from[up + right]!) / 4
      }
    }
  }
  return half
}

/** The island's rasters at 30 m and, halved again and again, down to a few cells. */
export function makePyramid(): Level[] {
  const finest = blank(CELL, Math.ceil((2 * HALF.x) / CELL), Math.ceil((2 * HALF.y) / CELL))
  fill(finest)
  spreadOffshore(finest)
  light(finest)
  const levels = [finest]
  while (levels.length < LEVELS) levels.push(halved(levels[levels.length - 1]!))
  return levels
}

/** The coarsest level that is still finer than a pixel of the given size in metres. */
export function levelFor(pyramid: readonly Level[], pixel: number): Level {
  return pyramid.reduce((chosen, level) => (level.cell <= pixel ? level : chosen))
}

export interface Place {
  a: number
  b: number
  c: number
  d: number
  u: number
  v: number
}

/** Corner indices and shares for bilinear reading; false outside the raster. */
export function locate(level: Level, x: number, y: number, place: Place): boolean {
  const fx = (x + HALF.x) / level.cell - 0.5
  const fy = (y + HALF.y) / level.cell - 0.5
  const i = Math.floor(fx)
  const j = Math.floor(fy)
  if (i < 0 || j < 0 || i >= level.columns - 1 || j >= level.rows - 1) return false
  place.a = j * level.columns + i
  place.b = place.a + 1
  place.c = place.a + level.columns
  place.d = place.c + 1
  place.u = fx - i
  place.v = fy - j
  return true
}

export function read(raster: Float32Array, { a, b, c, d, u, v }: Place): number {
  const south = raster[a]! + u * (raster[b]! - raster[a]!)
  const north = raster[c]! + u * (raster[d]! - raster[c]!)
  return south + v * (north - south)
}
