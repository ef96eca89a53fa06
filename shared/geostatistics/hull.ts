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

/** The eight corners farthest out along the axes and diagonals, anticlockwise. */
function farthest(points: readonly Point[]): Point[] {
  const directions = [[1, 0], [1, 1], [0, 1], [-1, 1], [-1, 0], [-1, -1], [0, -1], [1, -1]] as const // prettier-ignore
  return directions.map(([dx, dy]) => {
    let best = points[0] as Point
    for (const p of points) if (p.x * dx + p.y * dy > best.x * dx + best.y * dy) best = p
    return best
  })
}

/** Points that may lie on the hull: those strictly inside the octagon of the farthest ones cannot (Akl & Toussaint 1978). */
function candidates(points: readonly Point[]): Point[] {
  if (points.length < 100) return [...points]
  const corners = farthest(points)
  const sides = corners.map((a, i) => [a, corners[(i + 1) % 8] as Point] as const).filter(([a, b]) => a !== b)
  return points.filter((p) => corners.includes(p) || sides.some(([a, b]) => turn(a, b, p) <= 0))
}

/** Convex hull, anticlockwise, first point not repeated (monotone chain; Andrew 1979). */
export function convexHull(points: readonly Point[]): Polyline {
  const sorted = candidates(points).sort((a, b) => a.x - b.x || a.y - b.y)
  if (sorted.length < 2) return sorted.map(({ x, y }) => [x, y] as const)
  return [...chain(sorted), ...chain(sorted.reverse())].map(({ x, y }) => [x, y] as const)
}
