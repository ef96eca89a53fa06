import type { Point } from './frame.ts'
import { HALF } from './frame.ts'
import { elevation } from './terrain.ts'

/** Size of the squares in which a way is sought, in metres. */
const CELL = 250
const COLUMNS = (2 * HALF.x) / CELL + 1
const ROWS = (2 * HALF.y) / CELL + 1
const CLIMB_COST = 28

const heights = new Float32Array(COLUMNS * ROWS).fill(Number.NaN)

const cellOf = ([x, y]: Point) => Math.round((y + HALF.y) / CELL) * COLUMNS + Math.round((x + HALF.x) / CELL)
export const centreOf = (cell: number): Point => [
  (cell % COLUMNS) * CELL - HALF.x,
  Math.floor(cell / COLUMNS) * CELL - HALF.y,
]

function height(cell: number): number {
  const known = heights[cell]!
  if (!Number.isNaN(known)) return known
  return (heights[cell] = elevation(...centreOf(cell)))
}

const STEPS = [-1, 0, 1].flatMap((dj) => [-1, 0, 1].filter((di) => di !== 0 || dj !== 0).map((di) => ({ di, dj })))

/** Sea is impassable; where a way exists already, a new one joins it. */
function stepCost(from: number, to: number, length: number, used: ReadonlySet<number>): number {
  if (height(to) <= 0) return Infinity
  return (length + CLIMB_COST * Math.abs(height(to) - height(from))) * (used.has(to) ? 0.4 : 1)
}

/** Dijkstra (1959) with a bucket per 50 m of cost: exact enough for a road, and quick without a heap. */
function spread(start: number, goal: number, used: ReadonlySet<number>): Int32Array {
  const cost = new Float64Array(COLUMNS * ROWS).fill(Infinity)
  const before = new Int32Array(COLUMNS * ROWS).fill(-1)
  const buckets: number[][] = [[start]]
  cost[start] = 0
  for (let b = 0; b < buckets.length; b++) {
    for (const cell of buckets[b] ?? []) {
      if (cell === goal) return before
      if (Math.floor(cost[cell]! / 50) !== b) continue
      for (const { di, dj } of STEPS) {
        const next = cell + dj * COLUMNS + di
        const total = cost[cell]! + stepCost(cell, next, CELL * Math.hypot(di, dj), used)
        if (!(total < cost[next]!)) continue
        cost[next] = total
        before[next] = cell
        ;(buckets[Math.floor(total / 50)] ??= []).push(next)
      }
    }
  }
  throw new RangeError('no way over land between the two places')
}

/** Cuts corners twice (Chaikin 1974), ends kept. */
function rounded(line: readonly Point[], times = 3): Point[] {
  if (times === 0 || line.length < 3) return [...line]
  const cut = line.slice(1).flatMap((b, i): Point[] => {
    const a = line[i]!
    return [
      [0.75 * a[0] + 0.25 * b[0], 0.75 * a[1] + 0.25 * b[1]],
      [0.25 * a[0] + 0.75 * b[0], 0.25 * a[1] + 0.75 * b[1]],
    ]
  })
  return rounded([line[0]!, ...cut.slice(1, -1), line[line.length - 1]!], times - 1)
}

/** Squares of the least-effort way over land between two places, both ends included. */
export function cellsBetween(from: Point, to: Point, used: ReadonlySet<number>): number[] {
  const start = cellOf(from)
  const before = spread(start, cellOf(to), used)
  const cells: number[] = []
  for (let cell = cellOf(to); cell >= 0; cell = before[cell]!) cells.push(cell)
  return cells.reverse()
}

/** Smooth line from one point to another through the squares between them. */
export function lineThrough(from: Point, cells: readonly number[], to: Point): Point[] {
  return rounded([from, ...cells.filter((_, i) => i % 2 === 1).map(centreOf), to])
}
