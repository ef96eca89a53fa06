/** Plane geometry in a projected system, metres. */
export interface Point {
  x: number
  y: number
}

/** A line as pairs of easting and northing. */
export type Polyline = readonly (readonly [number, number])[]

export const distance = (a: Point, b: Point): number => Math.hypot(a.x - b.x, a.y - b.y)

/** Grid bearing from `a` to `b`, degrees clockwise from north, 0 ≤ bearing < 360. */
export function bearing(a: Point, b: Point): number {
  const degrees = (Math.atan2(b.x - a.x, b.y - a.y) * 180) / Math.PI
  return (degrees + 360) % 360
}

type Pair = readonly [number, number]

const turn = (a: Pair, b: Pair, c: Pair): number => (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])

/** True when the two closed segments have a point in common; touching counts, because a barrier does not leak. */
function segmentsMeet(a: Pair, b: Pair, c: Pair, d: Pair): boolean {
  if (Math.max(a[0], b[0]) < Math.min(c[0], d[0]) || Math.max(c[0], d[0]) < Math.min(a[0], b[0])) return false
  if (Math.max(a[1], b[1]) < Math.min(c[1], d[1]) || Math.max(c[1], d[1]) < Math.min(a[1], b[1])) return false
  return turn(a, b, c) * turn(a, b, d) <= 0 && turn(c, d, a) * turn(c, d, b) <= 0
}

/** True when the straight line from `from` to `to` meets any of the lines. */
export function crosses(from: Point, to: Point, lines: readonly Polyline[]): boolean {
  const a: Pair = [from.x, from.y]
  const b: Pair = [to.x, to.y]
  return lines.some((line) => line.some((vertex, i) => i > 0 && segmentsMeet(a, b, line[i - 1] ?? vertex, vertex)))
}

/** Even-odd rule over all rings, so that holes and separate parts need no bookkeeping. */
export function insideRings(p: Point, rings: readonly Polyline[]): boolean {
  let inside = false
  for (const ring of rings) {
    for (let i = 0; i < ring.length; i++) {
      const a = ring[i] as Pair
      const b = ring[(i + 1) % ring.length] as Pair
      if (a[1] > p.y !== b[1] > p.y && p.x < a[0] + ((p.y - a[1]) / (b[1] - a[1])) * (b[0] - a[0])) inside = !inside
    }
  }
  return inside
}

function distanceToSegment(p: Point, a: Pair, b: Pair): number {
  const dx = b[0] - a[0]
  const dy = b[1] - a[1]
  const squared = dx * dx + dy * dy
  const along = squared === 0 ? 0 : Math.min(1, Math.max(0, ((p.x - a[0]) * dx + (p.y - a[1]) * dy) / squared))
  return Math.hypot(p.x - a[0] - along * dx, p.y - a[1] - along * dy)
}

/** Shortest distance to any of the lines; infinite when there are none. */
export function distanceToLines(p: Point, lines: readonly Polyline[]): number {
  let best = Infinity
  for (const line of lines) {
    line.forEach((vertex, i) => {
      best = Math.min(best, distanceToSegment(p, line[i - 1] ?? vertex, vertex))
    })
  }
  return best
}

/** Rings as closed lines, whether or not the first point is repeated at the end. */
export const closeRings = (rings: readonly Polyline[]): Polyline[] =>
  rings.filter((ring) => ring.length > 0).map((ring) => [...ring, ring[0] as Pair])

/** Diagonal of the smallest upright rectangle around the points; 0 for none. */
export function extent(points: readonly Point[]): number {
  let west = Infinity
  let east = -Infinity
  let south = Infinity
  let north = -Infinity
  for (const { x, y } of points) {
    west = Math.min(west, x)
    east = Math.max(east, x)
    south = Math.min(south, y)
    north = Math.max(north, y)
  }
  return points.length === 0 ? 0 : Math.hypot(east - west, north - south)
}
