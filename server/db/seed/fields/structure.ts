import { fractalNoise } from '../island/noise.ts'
import { ISLAND_SEED } from '../island/seed.ts'
import { elevation } from '../island/terrain.ts'
import type { UnitCode } from '../island/units.ts'
import { unitOf } from '../island/units.ts'
import { faultBlock } from '../island/fault.ts'

/** A unit's top and bottom at one place, in metres above the sea. */
export interface Layer {
  unit: UnitCode
  top: number
  bottom: number
}

const noise = {
  gravels: fractalNoise(ISLAND_SEED, 'structure/gravels', 3_500, 3),
  clay: fractalNoise(ISLAND_SEED, 'structure/clay', 5_000, 3),
  limestone: fractalNoise(ISLAND_SEED, 'structure/limestone', 8_000, 3),
  sandstone: fractalNoise(ISLAND_SEED, 'structure/sandstone', 8_000, 3),
}

/** 0 at a unit's edge, 1 from `reach` metres inside. */
function fullness(unit: UnitCode, x: number, y: number, reach: number): number {
  return Math.min(1, Math.max(0, unitOf(unit).extent(x, y) / reach))
}

type Thickness = (x: number, y: number) => number

/** Thickness in metres where the unit is present. */
const thickness: Record<UnitCode, Thickness> = {
  TG: (x, y) => 9 + 22 * fullness('TG', x, y, 1_800) * (1 + 0.3 * noise.gravels(x, y)),
  PC: (x, y) => 4 + 20 * fullness('PC', x, y, 3_000) * (1 + 0.5 * noise.clay(x, y)),
  FL: (x, y) => 24 + 34 * fullness('FL', x, y, 4_000) * (1 + 0.3 * noise.limestone(x, y)),
  BS: (x, y) => 40 + 50 * fullness('BS', x, y, 4_000) * (1 + 0.25 * noise.sandstone(x, y)),
}

/** Unnamed ground above a buried unit: soil and drift. */
const COVER = { PC: 3, FL: 6, BS: 14 } as const
/** How far the east block has been thrown down along the fault, in metres. */
const THROW = 22

const layerUnder = (unit: UnitCode, ceiling: number, x: number, y: number): Layer => ({
  unit,
  top: ceiling,
  bottom: ceiling - thickness[unit](x, y),
})

const thrown = (x: number, y: number) => (faultBlock(x, y) === 'east' ? THROW : 0)

/** Tops as the folds and the fault left them: they follow the hills, more gently. */
const foldedLimestone = (x: number, y: number) =>
  -14 + 0.68 * elevation(x, y) + 9 * noise.limestone(x, y) - thrown(x, y)

const foldedSandstone = (x: number, y: number) =>
  -22 + 0.74 * elevation(x, y) + 10 * noise.sandstone(x, y) - thrown(x, y)

const present = (unit: UnitCode, x: number, y: number) => unitOf(unit).extent(x, y) > 0

/** The units under a place, from the ground down; empty where none is present. */
export function layersAt(x: number, y: number): Layer[] {
  const layers: Layer[] = []
  const floor = () => layers[layers.length - 1]?.bottom ?? elevation(x, y)
  if (present('TG', x, y)) layers.push(layerUnder('TG', floor(), x, y))
  if (present('PC', x, y)) layers.push(layerUnder('PC', floor() - (layers.length > 0 ? 0 : COVER.PC), x, y))
  if (present('FL', x, y)) layers.push(layerUnder('FL', Math.min(floor() - 0.5, foldedLimestone(x, y)), x, y))
  if (present('BS', x, y)) layers.push(layerUnder('BS', Math.min(floor() - COVER.BS, foldedSandstone(x, y)), x, y))
  return layers
}

/** A unit's layer at a place, or null where the unit is absent. */
export const layerAt = (unit: UnitCode, x: number, y: number): Layer | null =>
  layersAt(x, y).find((layer) => layer.unit === unit) ?? null
