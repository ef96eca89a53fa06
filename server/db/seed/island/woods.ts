import { distanceBetween } from './lines.ts'
import { fractalNoise } from './noise.ts'
import { ISLAND_SEED } from './seed.ts'
import { settlements } from './settlements.ts'

const stands = fractalNoise(ISLAND_SEED, 'woods/stands', 3_000, 5)

/** How wooded a place is: above 0 in a wood. Woods avoid heights, wet valley floors and built-up ground. */
export function woodland(x: number, y: number, height: number): number {
  const clearing = Math.max(...settlements.map(({ at, radius }) => 1.8 - distanceBetween(at, [x, y]) / radius), 0)
  const tooHigh = Math.max(0, height - 210) / 60
  const tooLow = Math.max(0, 30 - height) / 40
  return stands(x, y) - 0.42 - clearing - tooHigh - tooLow
}
