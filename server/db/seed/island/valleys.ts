import type { Point } from './frame.ts'
import { pointAlong } from './lines.ts'
import { fractalNoise } from './noise.ts'
import { ISLAND_SEED } from './seed.ts'
import type { Stream } from './streams.ts'

export interface Valley {
  /** The stream's line at even steps: coarse, so that the valley does not follow every bend. */
  axis: Point[]
  step: number
  /** Height of the bed at each point of the axis, falling towards the mouth. */
  beds: Float64Array
  /** Half-width of the flat floor at each point of the axis. */
  floors: Float64Array
  box: readonly [west: number, south: number, east: number, north: number]
}

const STEP = 200
/** Metres beyond which a valley no longer shapes the land. */
const REACH = 4_500

/** Spurs and side valleys: makes a wall stand nearer or farther from the stream than its plain distance. */
const spurs = fractalNoise(ISLAND_SEED, 'valleys/spurs', 2_600, 2)

/** Bed that only falls, stays under the land it crosses and never under the line that leads to its mouth. */
function carveBeds(axis: readonly Point[], land: (x: number, y: number) => number, mouth: number): Float64Array {
  const beds = new Float64Array(axis.length)
  const last = axis.length - 1
  const source = land(...axis[0]!) - 6
  let lowest = source
  axis.forEach(([x, y], i) => {
    const concave = mouth + Math.max(0, source - mouth) * (1 - i / last) ** 2.6
    const gentlest = mouth + 0.0006 * STEP * (last - i)
    lowest = Math.max(gentlest, Math.min(lowest, concave, land(x, y) - 3))
    beds[i] = lowest
  })
  beds[last] = mouth
  return beds
}

export function makeValley(
  stream: Stream,
  land: (x: number, y: number) => number,
  mouth: number,
  floor: (along: number) => number,
): Valley {
  const pieces = Math.max(2, Math.round(stream.length / STEP))
  const step = stream.length / pieces
  const axis = Array.from({ length: pieces + 1 }, (_, i) => pointAlong(stream.line, i * step))
  const xs = axis.map(([x]) => x)
  const ys = axis.map(([, y]) => y)
  return {
    axis,
    step,
    beds: carveBeds(axis, land, mouth),
    floors: Float64Array.from(axis, (_, i) => floor(i * step)),
    box: [Math.min(...xs) - REACH, Math.min(...ys) - REACH, Math.max(...xs) + REACH, Math.max(...ys) + REACH],
  }
}

/** Height of the bed at a distance from the source, linear between the axis points. */
export function bedAlong(valley: Valley, along: number): number {
  const at = Math.min(valley.beds.length - 1, Math.max(0, along / valley.step))
  const i = Math.min(valley.beds.length - 2, Math.floor(at))
  return valley.beds[i]! + (at - i) * (valley.beds[i + 1]! - valley.beds[i]!)
}

/** Keeps the weights finite on the axis itself, in square metres. */
const SOFT = 22_500

/**
 * Height of the valley's surface. Bed, floor and distance are weighted over the whole axis, because those of the
 * nearest point jump or crease at bends: points `step` apart with weights 1/d⁶ sum to 3π/(8·step·d⁵) beside a straight
 * line, which gives back the distance.
 */
export function valleyHeight(valley: Valley, x: number, y: number): number {
  let weights = 0
  let bed = 0
  let half = 0
  for (let i = 0; i < valley.axis.length; i++) {
    const [ax, ay] = valley.axis[i]!
    const squared = (x - ax) ** 2 + (y - ay) ** 2 + SOFT
    const weight = 1 / (squared * squared * squared)
    weights += weight
    bed += weight * valley.beds[i]!
    half += weight * valley.floors[i]!
  }
  const floor = half / weights
  const softened = ((8 * valley.step * weights) / (3 * Math.PI)) ** -0.2
  const plain = Math.sqrt(Math.max(0, softened * softened - SOFT))
  const distance = plain * Math.max(0.35, 1 + 0.3 * spurs(x, y))
  const beyond = Math.max(0, distance - floor)
  return bed / weights + 1.2 + 0.003 * Math.min(distance, floor) + 0.075 * beyond + (beyond / 210) ** 2
}
