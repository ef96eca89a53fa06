import type { Point } from '../../server/db/seed/island/frame.ts'
import { makeCoast } from '../../server/db/seed/island/coast.ts'
import { footOn } from '../../server/db/seed/island/lines.ts'
import { makeSummits, waters } from '../../server/db/seed/island/names.ts'
import type { Settlement } from '../../server/db/seed/island/settlements.ts'
import { settlements } from '../../server/db/seed/island/settlements.ts'
import { ISLAND_SEED } from '../../server/db/seed/island/seed.ts'
import { inland } from '../../server/db/seed/island/shape.ts'
import { streams } from '../../server/db/seed/island/streams.ts'
import { makeWays } from '../../server/db/seed/island/ways.ts'
import { draws } from '../../server/db/seed/random.ts'
import type { World } from './mercator.ts'
import { localToWorld } from './mercator.ts'

export interface IslandMap {
  coast: World[][]
  streams: { name: string; order: 1 | 2; line: World[] }[]
  ways: { kind: 'road' | 'track'; line: World[] }[]
  built: World[][]
  buildings: World[][]
  settlements: { name: string; kind: Settlement['kind']; at: World }[]
  waters: { name: string; at: World }[]
  summits: { name: string; height: number; at: World }[]
}

const project = (line: readonly Point[]) => line.map(localToWorld)

const HOUSES = { town: 520, village: 150, hamlet: 40 } as const

/** Outline of the built-up ground: a circle that swells along the roads' directions. */
function builtRing({ name, at, radius }: Settlement): Point[] {
  const { uniform } = draws(ISLAND_SEED, `built/${name}`)
  const phases = [uniform(0, 6), uniform(0, 6), uniform(0, 6)] as const
  return Array.from({ length: 48 }, (_, k): Point => {
    const angle = (k / 48) * 2 * Math.PI
    const swell = 0.16 * Math.sin(2 * angle + phases[0]) + 0.14 * Math.sin(3 * angle + phases[1])
    const far = radius * (0.72 + swell + 0.06 * Math.sin(7 * angle + phases[2]))
    return [at[0] + far * Math.cos(angle), at[1] + far * Math.sin(angle)]
  })
}

function house([x, y]: Point, angle: number, length: number, width: number): Point[] {
  const [c, s] = [Math.cos(angle), Math.sin(angle)]
  const corners = [
    [-1, -1],
    [1, -1],
    [1, 1],
    [-1, 1],
  ] as const
  return corners.map(([u, v]): Point => [
    x + (u * length * c - v * width * s) / 2,
    y + (u * length * s + v * width * c) / 2,
  ])
}

const awayFromStreams = (at: Point) => streams.every(({ line }) => footOn(line, at).distance > 45)

/** Houses stand nearer together towards the middle of a place, square to the nearest way. */
function houses({ name, kind, at, radius }: Settlement, ways: readonly Point[][]): Point[][] {
  const { normal, uniform } = draws(ISLAND_SEED, `houses/${name}`)
  const near = ways.filter((line) => footOn(line, at).distance < radius)
  return Array.from({ length: HOUSES[kind] }, (): Point => [
    at[0] + normal(0, radius * 0.34),
    at[1] + normal(0, radius * 0.34),
  ])
    .filter((spot) => inland(...spot) > 60 && awayFromStreams(spot))
    .map((spot) => {
      const feet = near.map((line) => footOn(line, spot)).sort((a, b) => a.distance - b.distance)
      return house(spot, feet[0]?.heading ?? 0, uniform(14, 30), uniform(9, 16))
    })
}

/** Everything that is drawn as lines, areas and names, in world coordinates. */
export function makeIslandMap(): IslandMap {
  const ways = makeWays()
  const lines = ways.map((way) => way.line)
  return {
    coast: makeCoast().map(project),
    streams: streams.map(({ name, order, line }) => ({ name, order, line: project(line) })),
    ways: ways.map(({ kind, line }) => ({ kind, line: project(line) })),
    built: settlements.map((place) => project(builtRing(place))),
    buildings: settlements.flatMap((place) => houses(place, lines).map(project)),
    settlements: settlements.map(({ name, kind, at }) => ({ name, kind, at: localToWorld(at) })),
    waters: waters.map(({ name, at }) => ({ name, at: localToWorld(at) })),
    summits: makeSummits().map(({ name, height, at }) => ({ name, height, at: localToWorld(at) })),
  }
}
