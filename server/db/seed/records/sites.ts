import type { AquiferCode } from '../fields/models.ts'
import { layerAt } from '../fields/structure.ts'
import type { Point } from '../island/frame.ts'
import { HALF } from '../island/frame.ts'
import { distanceBetween, distanceTo } from '../island/lines.ts'
import { settlements } from '../island/settlements.ts'
import { inland } from '../island/shape.ts'
import { streams } from '../island/streams.ts'
import { unitOf } from '../island/units.ts'
import type { Draws } from '../random.ts'
import { draws } from '../random.ts'

/** A place where a well may stand, in one unit. */
export interface Site {
  unit: AquiferCode
  at: Point
}

/** Wells that are not made for a test, by unit; test wells come on top. */
const COUNTS: Record<AquiferCode, number> = { TG: 118, FL: 76, BS: 62 }
/** Wells crowd around towns: this share of them. */
const NEAR_TOWN = 0.45
const APART = 140
const FROM_STREAM = 60
const TRIES = 20_000

function candidate({ normal, uniform, pick, chance }: Draws, unit: AquiferCode): Point {
  const extent = unitOf(unit).extent
  const towns = settlements.filter(({ at }) => extent(...at) > -800)
  if (towns.length === 0 || !chance(NEAR_TOWN)) return [uniform(-HALF.x, HALF.x), uniform(-HALF.y, HALF.y)]
  const { at, radius } = pick(towns)
  return [at[0] + normal(0, 700 + radius), at[1] + normal(0, 700 + radius)]
}

/** True where a well of the unit can be drilled: inside the unit, on dry ground, not in a stream's bed. */
export function isDrillable(unit: AquiferCode, at: Point, fromStream = FROM_STREAM): boolean {
  if (unitOf(unit).extent(...at) < 120 || inland(...at) < 150) return false
  if (streams.some(({ line }) => distanceTo(line, ...at) < fromStream)) return false
  return layerAt(unit, ...at) !== null
}

function sitesOf(seed: number, unit: AquiferCode): Site[] {
  const stream = draws(seed, `sites/${unit}`)
  const sites: Site[] = []
  for (let tries = 0; sites.length < COUNTS[unit]; tries++) {
    if (tries > TRIES) throw new Error(`no room for ${COUNTS[unit]} wells in ${unit}`)
    const at = candidate(stream, unit)
    if (sites.some((site) => distanceBetween(site.at, at) < APART)) continue
    if (isDrillable(unit, at)) sites.push({ unit, at })
  }
  return sites
}

/** Places of production wells in the three aquifers: crowded round towns, scattered elsewhere. */
export const makeSites = (seed: number): Record<AquiferCode, Site[]> => ({
  TG: sitesOf(seed, 'TG'),
  FL: sitesOf(seed, 'FL'),
  BS: sitesOf(seed, 'BS'),
})
