import KDBush from 'kdbush'
import { extent, type Point } from './planar.ts'

/** How many values to take around a place, and which ones must not be taken. */
export interface NeighbourOptions {
  /** Values per octant of the compass before the rest is filled up by distance. */
  perOctant: number
  max: number
  /** Left out when this says false: across a barrier, or held back in cross-validation. */
  keep?: (index: number) => boolean
}

export interface Neighbourhood {
  readonly size: number
  /** Indices by rising distance: at most `max`, spread over the octants (Deutsch & Journel 1998, II.4). */
  around(place: Point, options: NeighbourOptions): number[]
  /** The `k` nearest indices by rising distance. */
  nearest(place: Point, k: number, keep?: (index: number) => boolean): number[]
  /** All indices within `radius`, in no order. */
  within(place: Point, radius: number): number[]
}

/** Candidates gathered per wanted value, so that sparse octants find something without reading the whole region. */
const GENEROSITY = 4

const octant = (place: Point, p: Point): number =>
  Math.min(7, Math.floor(((Math.atan2(p.y - place.y, p.x - place.x) + Math.PI) / (2 * Math.PI)) * 8))

function spread(place: Point, sorted: number[], points: readonly Point[], options: NeighbourOptions): number[] {
  const counts = new Array<number>(8).fill(0)
  const chosen = new Set<number>()
  for (const i of sorted) {
    const o = octant(place, points[i]!)
    if (counts[o]! < options.perOctant && chosen.size < options.max) {
      chosen.add(i)
      counts[o]!++
    }
  }
  for (const i of sorted) if (chosen.size < options.max) chosen.add(i)
  return sorted.filter((i) => chosen.has(i))
}

/** Index over fixed points; building is n log n, a search reads only the surroundings. */
export function createNeighbourhood(points: readonly Point[]): Neighbourhood {
  const index = new KDBush(points.length)
  for (const { x, y } of points) index.add(x, y)
  index.finish()
  const diagonal = extent(points)
  // Squared distances of the search under way, by index: sorting on them needs no other bookkeeping.
  const squared = new Float64Array(points.length)

  const within = (place: Point, radius: number): number[] => index.within(place.x, place.y, radius)

  function gather(place: Point, wanted: number, keep: (i: number) => boolean): number[] {
    let radius = Math.max(1, diagonal) * Math.sqrt(Math.min(1, wanted / Math.max(1, points.length)))
    for (;;) {
      const raw = within(place, radius)
      const found = raw.filter(keep)
      if (found.length >= wanted || raw.length === points.length) {
        for (const i of found) squared[i] = (points[i]!.x - place.x) ** 2 + (points[i]!.y - place.y) ** 2
        return found.sort((a, b) => squared[a]! - squared[b]! || a - b)
      }
      radius *= 2
    }
  }

  return {
    size: points.length,
    within,
    nearest: (place, k, keep = () => true) => gather(place, k, keep).slice(0, k),
    around: (place, options) =>
      spread(place, gather(place, options.max * GENEROSITY, options.keep ?? (() => true)), points, options),
  }
}
