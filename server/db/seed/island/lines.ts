import type { Point } from './frame.ts'

export interface Foot {
  /** Metres from the line. */
  distance: number
  /** Metres along the line from its first point to the foot. */
  along: number
  /** The nearest point of the line. */
  point: Point
  /** Direction of the line there, radians anticlockwise from east. */
  heading: number
}

export const distanceBetween = (a: Point, b: Point) => Math.hypot(b[0] - a[0], b[1] - a[1])

export function lineLength(line: readonly Point[]): number {
  return line.slice(1).reduce((sum, point, i) => sum + distanceBetween(line[i]!, point), 0)
}

interface Nearest {
  squared: number
  /** Index of the segment's second point, and the share of the segment before the foot. */
  segment: number
  share: number
}

function nearest(line: readonly Point[], x: number, y: number): Nearest {
  const best: Nearest = { squared: Infinity, segment: 1, share: 0 }
  for (let i = 1; i < line.length; i++) {
    const a = line[i - 1]!
    const b = line[i]!
    const dx = b[0] - a[0]
    const dy = b[1] - a[1]
    const t = ((x - a[0]) * dx + (y - a[1]) * dy) / (dx * dx + dy * dy || 1)
    const share = t < 0 ? 0 : t > 1 ? 1 : t
    const squared = (x - a[0] - share * dx) ** 2 + (y - a[1] - share * dy) ** 2
    if (squared < best.squared) {
      best.squared = squared
      best.segment = i
      best.share = share
    }
  }
  return best
}

export const distanceTo = (line: readonly Point[], x: number, y: number) => Math.sqrt(nearest(line, x, y).squared)

/** Foot of the perpendicular from a point to the nearest segment of a line. */
export function footOn(line: readonly Point[], [x, y]: Point): Foot {
  const { squared, segment, share } = nearest(line, x, y)
  const a = line[segment - 1]!
  const b = line[segment]!
  return {
    distance: Math.sqrt(squared),
    along: lineLength(line.slice(0, segment)) + share * distanceBetween(a, b),
    point: [a[0] + share * (b[0] - a[0]), a[1] + share * (b[1] - a[1])],
    heading: Math.atan2(b[1] - a[1], b[0] - a[0]),
  }
}

/** Point at a given distance along a line. */
export function pointAlong(line: readonly Point[], along: number): Point {
  let left = along
  for (let i = 1; i < line.length; i++) {
    const [ax, ay] = line[i - 1]!
    const [bx, by] = line[i]!
    const length = Math.hypot(bx - ax, by - ay)
    if (left <= length) return [ax + ((bx - ax) * left) / length, ay + ((by - ay) * left) / length]
    left -= length
  }
  return line[line.length - 1]!
}

function splinePoint(p: readonly [Point, Point, Point, Point], t: number): Point {
  const axis = (k: 0 | 1) => {
    const [a, b, c, d] = [p[0][k], p[1][k], p[2][k], p[3][k]]
    return 0.5 * (2 * b + (c - a) * t + (2 * a - 5 * b + 4 * c - d) * t * t + (3 * b - a - 3 * c + d) * t * t * t)
  }
  return [axis(0), axis(1)]
}

/** Smooth line through the given points (Catmull & Rom 1974), `steps` segments between two of them. */
export function smoothLine(through: readonly Point[], steps = 12): Point[] {
  const at = (i: number) => through[Math.min(through.length - 1, Math.max(0, i))]!
  const line: Point[] = []
  for (let i = 0; i < through.length - 1; i++) {
    for (let k = 0; k < steps; k++) {
      line.push(splinePoint([at(i - 1), at(i), at(i + 1), at(i + 2)], k / steps))
    }
  }
  return [...line, at(through.length - 1)]
}
