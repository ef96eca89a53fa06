import type { AquiferCode } from '../fields/models.ts'
import { headAt } from '../fields/heads.ts'
import type { Layer } from '../fields/structure.ts'
import { layersAt } from '../fields/structure.ts'
import type { Point } from '../island/frame.ts'
import { CENTRE, EPSG, toLonLat } from '../island/frame.ts'
import { elevation } from '../island/terrain.ts'
import type { Draws } from '../random.ts'
import type { DemoPick, DemoScreen, DemoWell } from './types.ts'

export interface Drilled {
  unit: AquiferCode
  at: Point
  kind: DemoWell['kind']
  year: number
  /** Radius of the drilled hole at the screen; null lets the driller choose. */
  wellRadius: number | null
}

const OWNERS = {
  well: ['Farm supply', 'Town waterworks', 'Dairy', 'Market garden', 'Quarry', 'School', 'Harbour works', 'Brewery'],
  piezometer: ['Observation network', 'Test site'],
} as const

const round = (value: number, decimals: number) => Number(value.toFixed(decimals))

/** Open stretch of the well: the lower part of the gravels, nearly all of a confined unit. */
function screenOf(layer: Layer, ground: number, water: number): DemoScreen {
  const [top, bottom] = [ground - layer.top, ground - layer.bottom]
  const from = layer.unit === 'TG' ? Math.max(ground - water + 0.8, top + 0.35 * (bottom - top)) : top + 1
  return { topM: round(Math.min(from, bottom - 1), 1), bottomM: round(bottom - 0.3, 1), validFrom: null, validTo: null }
}

/** An older and shallower screen that a relined well had before. */
function relined(screen: DemoScreen, year: number): DemoScreen[] {
  const moment = `${year + 9}-01-01`
  const before = { ...screen, topM: round(screen.topM + 0.25 * (screen.bottomM - screen.topM), 1) }
  return [
    { ...before, validTo: moment },
    { ...screen, validFrom: moment },
  ]
}

/** Picks of the aquifers that the hole went through, as depths below ground. */
function picksOf(layers: readonly Layer[], ground: number, depth: number, year: number): DemoPick[] {
  return layers
    .filter(({ top }) => ground - top < depth)
    .map(({ unit, top, bottom }) => ({
      unit,
      topM: round(Math.max(0, ground - top), 1),
      bottomM: ground - bottom <= depth ? round(ground - bottom, 1) : null,
      source: `Driller’s log, ${year}`,
    }))
}

function visibilityOf({ chance }: Draws): Pick<DemoWell, 'visibility' | 'embargoUntil'> {
  if (chance(0.03)) return { visibility: 'published', embargoUntil: '2028-06-30' }
  return { visibility: chance(0.88) ? 'published' : 'internal', embargoUntil: null }
}

/** A well as drilled into its unit: depths from the layers and the ground, water from the unit's head. */
export function construct(stream: Draws, code: string, { unit, at, kind, year, wellRadius }: Drilled): DemoWell {
  const layers = layersAt(...at)
  const layer = layers.find((candidate) => candidate.unit === unit)
  if (!layer) throw new RangeError('the unit is absent here')
  const ground = round(elevation(...at), 2)
  const water = headAt[unit](...at)
  const stickUp = round(stream.uniform(0.2, 0.8), 2)
  const screen = screenOf(layer, ground, water)
  const depth = round(screen.bottomM + stream.uniform(0.2, 1.2), 1)
  const radius = wellRadius ?? (kind === 'piezometer' ? 0.03 : stream.pick([0.075, 0.1, 0.125, 0.15]))
  const [lon, lat] = toLonLat(at)
  return {
    code,
    name: null,
    kind,
    unit,
    lon: round(lon, 7),
    lat: round(lat, 7),
    original: { epsg: EPSG, x: round(at[0] + CENTRE.easting, 1), y: round(at[1] + CENTRE.northing, 1) },
    positionAccuracyM: kind === 'piezometer' || year > 2000 ? stream.pick([0.5, 1, 2]) : stream.pick([5, 10, 25]),
    groundElevationM: ground,
    measuringPointM: stickUp,
    depthM: depth,
    wellRadiusM: radius,
    casingRadiusM: radius,
    staticDepthM: round(ground + stickUp - water, 2),
    drilledYear: year,
    ownerLabel: stream.pick(OWNERS[kind]),
    screens: kind === 'well' && year < 1990 && stream.chance(0.15) ? relined(screen, year) : [screen],
    picks: stream.chance(0.93) ? picksOf(layers, ground, depth, year) : [],
    ...visibilityOf(stream),
  }
}
