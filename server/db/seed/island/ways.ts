import { draws } from '../random.ts'
import type { Point } from './frame.ts'
import { footOn } from './lines.ts'
import { cellsBetween, centreOf, lineThrough } from './route.ts'
import { ISLAND_SEED } from './seed.ts'
import { settlements } from './settlements.ts'
import { inland } from './shape.ts'

export interface Way {
  kind: 'road' | 'track'
  line: Point[]
}

const ROADS: readonly (readonly [string, string])[] = [
  ['Port Ansel', 'Orrick Cross'],
  ['Orrick Cross', 'Upper Tarrow'],
  ['Orrick Cross', 'Hallin Bay'],
  ['Port Ansel', 'Kelderth'],
  ['Kelderth', 'Brannet'],
  ['Kelderth', 'Lanmere'],
  ['Kelderth', 'Sandry'],
  ['Orrick Cross', 'Fennick'],
  ['Fennick', 'Pellow Green'],
  ['Upper Tarrow', 'Brannet'],
  ['Fennick', 'Port Ansel'],
  ['Orrick Cross', 'Brannet'],
]

function placeOf(name: string): Point {
  const found = settlements.find((settlement) => settlement.name === name)
  if (!found) throw new RangeError(`no settlement called ${name}`)
  return found.at
}

/** Ends of tracks: from each settlement to farms and shores nearby. */
function trackEnds(): [Point, Point][] {
  const { uniform } = draws(ISLAND_SEED, 'tracks')
  return settlements
    .flatMap(({ at }) =>
      Array.from({ length: 5 }, (_, k): [Point, Point] => {
        const angle = uniform(k, k + 0.8) * ((2 * Math.PI) / 5)
        const far = uniform(2_200, 5_200)
        return [at, [at[0] + far * Math.cos(angle), at[1] + far * Math.sin(angle)]]
      }),
    )
    .filter(([, to]) => inland(...to) > 250)
}

/** Stretches of squares that no way uses yet, each with the square before and after it. */
function newStretches(cells: readonly number[], used: ReadonlySet<number>): number[][] {
  const stretches: number[][] = []
  let current: number[] = []
  cells.forEach((cell, i) => {
    const free = !used.has(cell)
    if (free && current.length === 0) current = i > 0 ? [cells[i - 1]!] : []
    if (free || current.length > 0) current.push(cell)
    if ((!free || i === cells.length - 1) && current.length > 1) stretches.push(current)
    if (!free) current = []
  })
  return stretches
}

/** The nearest point of the ways drawn so far, so that a new way ends on one and not beside it. */
function onWays(ways: readonly Way[], at: Point): Point {
  const feet = ways.map(({ line }) => footOn(line, at))
  const nearest = feet.reduce((a, b) => (b.distance < a.distance ? b : a))
  return nearest.distance < 400 ? nearest.point : at
}

/** Roads first, then tracks; each joins what is there already. */
export function makeWays(): Way[] {
  const used = new Set<number>()
  const ways: Way[] = []
  const add = (kind: Way['kind'], from: Point, to: Point) => {
    const cells = cellsBetween(from, to, used)
    for (const stretch of newStretches(cells, used)) {
      const end = (cell: number, exact: Point, last: number) => {
        if (used.has(cell)) return onWays(ways, centreOf(cell))
        return cell === last ? exact : centreOf(cell)
      }
      const start = end(stretch[0]!, from, cells[0]!)
      const finish = end(stretch[stretch.length - 1]!, to, cells[cells.length - 1]!)
      ways.push({ kind, line: lineThrough(start, stretch.slice(1, -1), finish) })
    }
    for (const cell of cells) used.add(cell)
  }
  for (const [from, to] of ROADS) add('road', placeOf(from), placeOf(to))
  for (const [from, to] of trackEnds()) add('track', from, to)
  return ways
}
