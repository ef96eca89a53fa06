import { distanceTo, footOn } from '../island/lines.ts'
import { fractalNoise } from '../island/noise.ts'
import { ISLAND_SEED } from '../island/seed.ts'
import { inland } from '../island/shape.ts'
import { river } from '../island/streams.ts'
import { elevation, riverBed } from '../island/terrain.ts'
import type { AquiferCode } from './models.ts'
import { layerAt } from './structure.ts'

const swell = fractalNoise(ISLAND_SEED, 'heads/swell', 9_000, 2)

/** Water table of the gravels: the river's level, rising gently away from it, always under the ground. */
function gravelHead(x: number, y: number): number {
  const foot = footOn(river.line, [x, y])
  const table = riverBed(foot.along) + 0.6 + 0.0022 * foot.distance
  const layer = layerAt('TG', x, y)
  const lowest = layer ? layer.bottom + 0.55 * (layer.top - layer.bottom) : -Infinity
  return Math.min(Math.max(table, lowest), elevation(x, y) - 1.2)
}

/** Head of a confined unit: near the sea's level at the coast, higher inland and under hills, above the unit's top. */
function confinedHead(unit: 'FL' | 'BS', gain: number) {
  return (x: number, y: number) => {
    const ground = elevation(x, y)
    const inner = 1 - Math.exp(-Math.max(0, inland(x, y)) / 5_000)
    const hills = 0.62 * Math.max(0, ground - 30)
    const valley = 6 * Math.exp(-distanceTo(river.line, x, y) / 2_500)
    const head = 1.5 + gain * inner * (1 + 0.25 * swell(x, y)) + hills - valley
    const top = layerAt(unit, x, y)?.top ?? -Infinity
    return Math.min(Math.max(head, top + 4), ground - 1.5)
  }
}

/** Height of the undisturbed water level of each aquifer, in metres above the sea. */
export const headAt: Record<AquiferCode, (x: number, y: number) => number> = {
  TG: gravelHead,
  FL: confinedHead('FL', 16),
  BS: confinedHead('BS', 20),
}
