import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { SKRSContext2D } from '@napi-rs/canvas'
import { feature } from 'topojson-client'
import type { GeometryCollection, Topology } from 'topojson-specification'
import type { TileId, World } from './mercator.ts'
import { toWorld } from './mercator.ts'
import { trace } from './path.ts'
import type { Theme } from './theme.ts'
import { css } from './theme.ts'

type Ring = readonly (readonly number[])[]

const require = createRequire(import.meta.url)

function readRings(): Ring[] {
  const topology = JSON.parse(readFileSync(require.resolve('world-atlas/land-50m.json'), 'utf8')) as Topology<{
    land: GeometryCollection
  }>
  return feature(topology, topology.objects.land).features.flatMap(({ geometry }) => {
    if (geometry.type === 'MultiPolygon') return geometry.coordinates.flat()
    return geometry.type === 'Polygon' ? geometry.coordinates : []
  })
}

/** Rings are stitched across the antimeridian: follow the shorter way round, past ±180°. */
function unwrapped(ring: Ring): [number, number][] {
  let turn = 0
  return ring.map(([lon = 0, lat = 0], i) => {
    const before = ring[i - 1]?.[0] ?? lon
    if (lon - before > 180) turn -= 360
    if (lon - before < -180) turn += 360
    return [lon + turn, lat]
  })
}

/** A ring that goes once round the world holds the pole: close it along the foot of the map. */
function closedOverPole(ring: [number, number][]): [number, number][] {
  const first = ring[0]!
  const last = ring[ring.length - 1]!
  if (Math.abs(last[0] - first[0]) < 180) return ring
  return [...ring, [last[0], -89], [first[0], -89]]
}

const moved = (ring: World[], by: number) => ring.map(([x, y]): World => [x + by, y])

/** Land of the world as closed rings in world coordinates, with copies one world to the east and west. */
export function makeWorldLand(): World[][] {
  return readRings().flatMap((ring) => {
    const drawn = closedOverPole(unwrapped(ring)).map(toWorld)
    return [drawn, moved(drawn, 1), moved(drawn, -1)]
  })
}

export function drawWorld(context: SKRSContext2D, tile: TileId, theme: Theme, land: readonly World[][]): void {
  trace(context, tile, land, true)
  context.fillStyle = css(theme.land)
  context.fill('evenodd')
  context.strokeStyle = theme.coast
  context.lineWidth = 0.7
  context.stroke()
}
