import type { Point, Polyline } from './planar.ts'

const turn = (o: Point, a: Point, b: Point): number => (a.x - o.x) * (b.y - o.y) - (a.y - o.y) * (b.x - o.x)

function chain(points: Iterable<Point>): Point[] {
  const kept: Point[] = []
  for (const p of points) {
    while (kept.length > 1 && turn(kept[kept.length - 2] as Point, kept[kept.length - 1] as Point, p) <= 0) kept.pop()
    kept.push(p)
  }
  kept.pop()
  return kept
}

/** Convex hull, anticlockwise, first point not repeated (monotone chain; Andrew 1979). */
export function convexHull(points: readonly Point[]): Polyline {
  const sorted = [...points].sort((a, b) => a.x - b.x || a.y - b.y)
  if (sorted.length < 2) return sorted.map(({ x, y }) => [x, y] as const)
  return [...chain(sorted), ...chain(sorted.reverse())].map(({ x, y }) => [x, y] as const)
}
