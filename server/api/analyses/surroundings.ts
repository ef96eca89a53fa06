import { lineString, nearestPointOnLine, point } from '@turf/turf'
import type { Surrounding } from '#shared/contracts/surroundings.ts'
import { bearing, geodesicDistance } from '#shared/geodesy/index.ts'
import type { Position } from '../../db/spatial.ts'

/** A line of the map that bounds an aquifer or feeds it. */
export interface MapEdge {
  kind: Surrounding['kind']
  name: string
  path: Position[]
}

/** More than two of a kind no solution reckons with. */
const MOST_OF_A_KIND = 2

/** What water passes: a fault counts as tight, a coast or a lake keeps its level. */
const kinds = { fault: 'barrier', barrier: 'barrier', coast: 'recharge', 'constant-head': 'recharge' } as const

export const edgeOfBoundary = ({ kind, name, path }: { kind: keyof typeof kinds; name: string; path: Position[] }) => ({
  kind: kinds[kind],
  name,
  path,
})

/** The edges nearest to a place, at most two of a kind, with distance and direction of their nearest points. */
export function surroundingsOf(place: Position, edges: readonly MapEdge[]): Surrounding[] {
  const near = edges
    .map((edge) => seenFrom(place, edge))
    .filter(({ distance_m }) => distance_m > 0)
    .sort((a, b) => a.distance_m - b.distance_m)
  return (['recharge', 'barrier'] as const).flatMap((kind) =>
    near.filter((one) => one.kind === kind).slice(0, MOST_OF_A_KIND),
  )
}

function seenFrom(place: Position, { kind, name, path }: MapEdge): Surrounding {
  const [lon, lat] = nearestPointOnLine(lineString(path), point(place)).geometry.coordinates as Position
  const [from, to] = [
    { lon: place[0], lat: place[1] },
    { lon, lat },
  ]
  return { kind, name, distance_m: geodesicDistance(from, to), bearing_deg: bearing(from, to) }
}
