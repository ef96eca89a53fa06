export type ScreenPoint = readonly [x: number, y: number]

export interface PathStep {
  x: number
  y: number
  /** Direction of the path, radians clockwise from the positive x axis (y points down). */
  angle: number
}

export interface Box {
  left: number
  top: number
  right: number
  bottom: number
}

const outside = ([ax, ay]: ScreenPoint, [bx, by]: ScreenPoint, { left, top, right, bottom }: Box) =>
  (ax < left && bx < left) || (ax > right && bx > right) || (ay < top && by < top) || (ay > bottom && by > bottom)

/** The parts of a path that may be seen in a box: close to the map, most of an outline lies far outside the window. */
export function visibleRuns(points: readonly ScreenPoint[], box: Box): ScreenPoint[][] {
  const runs: ScreenPoint[][] = []
  let open: ScreenPoint[] | null = null
  for (let i = 1; i < points.length; i += 1) {
    const [a, b] = [points[i - 1]!, points[i]!]
    if (outside(a, b, box)) {
      open = null
      continue
    }
    if (!open) runs.push((open = [a]))
    open.push(b)
  }
  return runs
}

/** Points at equal distances along a path on the screen, beginning half a step in. */
export function resample(points: readonly ScreenPoint[], step: number): PathStep[] {
  const steps: PathStep[] = []
  let ahead = step / 2
  for (let i = 1; i < points.length; i += 1) {
    const [ax, ay] = points[i - 1]!
    const [bx, by] = points[i]!
    const length = Math.hypot(bx - ax, by - ay)
    const angle = Math.atan2(by - ay, bx - ax)
    for (; ahead <= length; ahead += step) {
      const share = ahead / length
      steps.push({ x: ax + share * (bx - ax), y: ay + share * (by - ay), angle })
    }
    ahead -= length
  }
  return steps
}

/** Distance in pixels from a point to a path. */
export function distanceToPath([x, y]: ScreenPoint, points: readonly ScreenPoint[]): number {
  let nearest = Infinity
  for (let i = 1; i < points.length; i += 1) {
    const [ax, ay] = points[i - 1]!
    const [bx, by] = points[i]!
    const squared = (bx - ax) ** 2 + (by - ay) ** 2
    const share = squared === 0 ? 0 : Math.min(1, Math.max(0, ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / squared))
    nearest = Math.min(nearest, Math.hypot(ax + share * (bx - ax) - x, ay + share * (by - ay) - y))
  }
  return nearest
}
