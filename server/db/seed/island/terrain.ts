import type { Point } from './frame.ts'
import { fractalNoise } from './noise.ts'
import { ISLAND_SEED } from './seed.ts'
import { inland } from './shape.ts'
import { brooks, river } from './streams.ts'
import type { Valley } from './valleys.ts'
import { bedAlong, makeValley, valleyHeight } from './valleys.ts'

/** Broad uplands: centre, half-widths in metres, height in metres above the coast. */
const UPLANDS: readonly { at: Point; wide: Point; height: number }[] = [
  { at: [-13_500, 8_600], wide: [4_200, 3_000], height: 250 },
  { at: [-1_500, 10_200], wide: [5_600, 2_800], height: 285 },
  { at: [9_500, 7_200], wide: [5_200, 3_600], height: 215 },
  { at: [-11_500, -5_200], wide: [5_800, 4_200], height: 150 },
  { at: [-2_500, -9_600], wide: [4_600, 2_600], height: 120 },
  { at: [15_500, -1_500], wide: [3_600, 3_600], height: 120 },
]

const rolling = fractalNoise(ISLAND_SEED, 'terrain/rolling', 5_200, 6)
const ridged = fractalNoise(ISLAND_SEED, 'terrain/ridged', 3_400, 4)

/** Land before the streams cut it, in metres above the sea. */
function uncut(x: number, y: number): number {
  const coast = Math.max(0, inland(x, y))
  let upland = 0
  for (const { at, wide, height } of UPLANDS) {
    upland += height * Math.exp(-(((x - at[0]) / wide[0]) ** 2) - ((y - at[1]) / wide[1]) ** 2)
  }
  const ridge = 1 - Math.min(1, 1.5 * Math.sqrt(ridged(x, y) ** 2 + 0.01))
  const base = 40 + 48 * (1 - Math.exp(-coast / 6_000))
  return (1 - Math.exp(-coast / 1_500)) * (base + upland * (0.85 + 0.25 * ridge) + 30 * rolling(x, y) + 12 * ridge)
}

/** Half the width of the Tarrow's flat valley floor, in metres, by distance from its source. */
export function plainHalfWidth(along: number): number {
  const t = Math.min(1, along / river.length)
  return 220 + 2_000 * Math.sin(Math.PI * Math.min(0.82, 0.9 * t)) ** 1.2
}

const riverValley = makeValley(river, uncut, 0.3, plainHalfWidth)
const brookValleys = brooks.map((brook) => {
  const mouth = brook.joinsAt === null ? 0.3 : bedAlong(riverValley, brook.joinsAt)
  return makeValley(brook, uncut, mouth, (along) => 50 + (130 * along) / brook.length)
})
const valleys: readonly Valley[] = [riverValley, ...brookValleys]

/** Height of the river's bed at a distance from its source, in metres. */
export const riverBed = (along: number): number => bedAlong(riverValley, along)

/** The lower of two surfaces with the edge between them rounded over about `k` metres. */
function roundedMin(a: number, b: number, k: number): number {
  const h = Math.max(0, k - Math.abs(a - b)) / k
  return Math.min(a, b) - (h * h * k) / 4
}

/** Ground elevation in metres above the sea; 0 at sea. Local metres from the island's centre. */
export function elevation(x: number, y: number): number {
  if (inland(x, y) <= 0) return 0
  let height = uncut(x, y)
  for (const valley of valleys) {
    const [west, south, east, north] = valley.box
    if (x < west || x > east || y < south || y > north) continue
    height = roundedMin(height, valleyHeight(valley, x, y), 12)
  }
  return Math.max(0.4, height)
}
