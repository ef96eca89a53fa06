import { simplify } from '@turf/turf'
import type { Ring } from './contour.ts'
import { signedArea, zeroRings } from './contour.ts'
import type { Point } from './frame.ts'
import { distanceTo } from './lines.ts'
import { fractalNoise } from './noise.ts'
import { ISLAND_SEED } from './seed.ts'
import { inland } from './shape.ts'
import { river } from './streams.ts'
import { elevation } from './terrain.ts'

export type UnitCode = 'TG' | 'PC' | 'FL' | 'BS'

export interface Unit {
  code: UnitCode
  name: string
  kind: 'aquifer' | 'aquitard'
  /** How its water stands where it is tested. */
  setting: 'unconfined' | 'leaky' | 'confined' | 'aquitard'
  /** Codes of streams that exchange water with it. */
  connectedStreams: readonly string[]
  /** Inside where positive; metres from the edge, roughly. */
  extent: (x: number, y: number) => number
}

const edge = fractalNoise(ISLAND_SEED, 'units/edge', 5_000, 3)

const metresInside = (x: number, y: number, squaredRadius: number, size: number) =>
  size * (1 - Math.sqrt(squaredRadius)) + 900 * edge(x, y)

const ellipse = (at: Point, wide: Point) => (x: number, y: number) =>
  metresInside(x, y, ((x - at[0]) / wide[0]) ** 2 + ((y - at[1]) / wide[1]) ** 2, Math.min(...wide))

/** The river's deposits begin where its valley opens. */
const gravelReach = river.line.filter(([x]) => x > -10_600)

const gravels = (x: number, y: number) => {
  const valley = 2_650 + 650 * edge(x, y) - distanceTo(gravelReach, x, y)
  const plain = 26 * (92 - elevation(x, y))
  return Math.min(valley, plain, inland(x, y))
}
const limestone = (x: number, y: number) =>
  Math.min(ellipse([-1_500, -4_600], [16_500, 9_000])(x, y), inland(x, y) - 250)
const clay = (x: number, y: number) => Math.min(ellipse([-1_300, -4_400], [16_900, 9_300])(x, y), inland(x, y) - 150)
const sandstone = (x: number, y: number) => Math.min(ellipse([0, 8_200], [17_500, 8_200])(x, y), inland(x, y) - 200)

export const units: readonly Unit[] = [
  {
    code: 'TG',
    name: 'Tarrow Gravels',
    kind: 'aquifer',
    setting: 'unconfined',
    connectedStreams: ['TAR', 'LIN', 'SAL', 'KEL', 'MER'],
    extent: gravels,
  },
  { code: 'PC', name: 'Pellow Clay', kind: 'aquitard', setting: 'aquitard', connectedStreams: [], extent: clay },
  { code: 'FL', name: 'Fennick Limestone', kind: 'aquifer', setting: 'leaky', connectedStreams: [], extent: limestone },
  {
    code: 'BS',
    name: 'Brannet Sandstone',
    kind: 'aquifer',
    setting: 'confined',
    connectedStreams: [],
    extent: sandstone,
  },
]

export function unitOf(code: UnitCode): Unit {
  const found = units.find((unit) => unit.code === code)
  if (!found) throw new RangeError(`no unit ${code}`)
  return found
}

function thinned(ring: Ring, tolerance: number): Ring {
  const closed = [...ring, ring[0]!].map(([x, y]) => [x, y])
  const { geometry } = simplify(
    { type: 'Feature', properties: {}, geometry: { type: 'LineString', coordinates: closed } },
    { tolerance, highQuality: true },
  )
  return geometry.coordinates.slice(0, -1).map(([x, y]): Point => [x!, y!])
}

/** Outlines larger than one square kilometre, anticlockwise, open rings; gaps smaller than that are filled. */
export function outlines(extent: Unit['extent'], cell = 200, tolerance = 25): Ring[] {
  return zeroRings(extent, cell)
    .filter((ring) => signedArea(ring) > 1e6)
    .map((ring) => thinned(ring, tolerance))
}
