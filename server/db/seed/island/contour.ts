import type { Point } from './frame.ts'
import { HALF } from './frame.ts'

export type Ring = Point[]
type Field = (x: number, y: number) => number

interface Grid {
  cell: number
  columns: number
  rows: number
  values: Float64Array
}

function sample(field: Field, cell: number): Grid {
  const columns = Math.round((2 * HALF.x) / cell) + 1
  const rows = Math.round((2 * HALF.y) / cell) + 1
  const values = new Float64Array(columns * rows)
  for (let j = 0; j < rows; j++) {
    for (let i = 0; i < columns; i++) {
      const edge = i === 0 || j === 0 || i === columns - 1 || j === rows - 1
      // A frame of "outside" closes every ring inside the box.
      values[j * columns + i] = edge ? -1 : field(-HALF.x + i * cell, -HALF.y + j * cell)
    }
  }
  return { cell, columns, rows, values }
}

/** Edges crossed inside a cell, inside kept on the left: bits south-west 1, south-east 2, north-east 4, north-west 8. */
const CROSSINGS: readonly (readonly [from: number, to: number][])[] = [
  [],
  [[0, 3]],
  [[1, 0]],
  [[1, 3]],
  [[2, 1]],
  [
    [0, 3],
    [2, 1],
  ],
  [[2, 0]],
  [[2, 3]],
  [[3, 2]],
  [[0, 2]],
  [
    [1, 0],
    [3, 2],
  ],
  [[1, 2]],
  [[3, 1]],
  [[0, 1]],
  [[3, 0]],
  [],
]

/** Ends of cell edge 0 south, 1 east, 2 north, 3 west, as column and row offsets, always listed from low to high. */
const EDGES: readonly (readonly [number, number, number, number])[] = [
  [0, 0, 1, 0],
  [1, 0, 1, 1],
  [0, 1, 1, 1],
  [0, 0, 0, 1],
]

function crossing(grid: Grid, i: number, j: number, edge: number): { key: string; point: Point } {
  const [di, dj, ei, ej] = EDGES[edge]!
  const a = grid.values[(j + dj) * grid.columns + i + di]!
  const b = grid.values[(j + ej) * grid.columns + i + ei]!
  const t = a / (a - b)
  const x = -HALF.x + (i + di + t * (ei - di)) * grid.cell
  const y = -HALF.y + (j + dj + t * (ej - dj)) * grid.cell
  return { key: `${i + di},${j + dj},${ei - di}`, point: [x, y] }
}

function collect(grid: Grid): Map<string, { next: string; point: Point }> {
  const links = new Map<string, { next: string; point: Point }>()
  const inside = (i: number, j: number) => (grid.values[j * grid.columns + i]! > 0 ? 1 : 0)
  for (let j = 0; j < grid.rows - 1; j++) {
    for (let i = 0; i < grid.columns - 1; i++) {
      const code = inside(i, j) + 2 * inside(i + 1, j) + 4 * inside(i + 1, j + 1) + 8 * inside(i, j + 1)
      for (const [from, to] of CROSSINGS[code]!) {
        const start = crossing(grid, i, j, from)
        links.set(start.key, { next: crossing(grid, i, j, to).key, point: start.point })
      }
    }
  }
  return links
}

export function signedArea(ring: readonly Point[]): number {
  return ring.reduce((sum, [x, y], i) => {
    const [nx, ny] = ring[(i + 1) % ring.length]!
    return sum + (x * ny - nx * y) / 2
  }, 0)
}

/** Rings where a field of the island's box crosses zero (marching squares), open lists, largest area first. */
export function zeroRings(field: Field, cell: number): Ring[] {
  const links = collect(sample(field, cell))
  const rings: Ring[] = []
  while (links.size > 0) {
    const ring: Ring = []
    let key = links.keys().next().value as string
    for (let link = links.get(key); link; link = links.get(key)) {
      links.delete(key)
      ring.push(link.point)
      key = link.next
    }
    rings.push(ring)
  }
  return rings.sort((a, b) => Math.abs(signedArea(b)) - Math.abs(signedArea(a)))
}
