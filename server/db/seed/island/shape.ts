import type { Point } from './frame.ts'
import { fractalNoise } from './noise.ts'
import { ISLAND_SEED } from './seed.ts'

/** Bays, and one headland (negative depth), that the outline does not leave to chance: centre, radius, depth. */
const BAYS: readonly { at: Point; radius: number; depth: number }[] = [
  { at: [13_400, -10_200], radius: 2_300, depth: 4_200 },
  { at: [-21_000, 2_600], radius: 2_400, depth: 3_000 },
  { at: [3_500, 14_800], radius: 2_600, depth: 2_400 },
  { at: [-7_000, -14_600], radius: 2_200, depth: 2_000 },
  { at: [17_600, -8_200], radius: 2_000, depth: -3_400 },
]

const bendX = fractalNoise(ISLAND_SEED, 'coast/x', 10_000, 5)
const bendY = fractalNoise(ISLAND_SEED, 'coast/y', 10_000, 5)
const crinkle = fractalNoise(ISLAND_SEED, 'coast/crinkle', 2_600, 4)

/** Roughly the distance from the coast in metres: positive on land, negative at sea, zero at the coastline. */
export function inland(x: number, y: number): number {
  const u = (x + 3_400 * bendX(x, y)) / 21_400
  const v = (y + 3_400 * bendY(x, y)) / 14_400
  const radius = (Math.abs(u) ** 2.3 + Math.abs(v) ** 2.3) ** (1 / 2.3)
  let bays = 0
  for (const { at, radius: wide, depth } of BAYS) {
    bays += depth * Math.exp(-((x - at[0]) ** 2 + (y - at[1]) ** 2) / wide ** 2)
  }
  return 15_000 * (1 - radius) - bays + 300 * crinkle(x, y)
}
