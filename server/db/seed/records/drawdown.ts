import type { Interval } from '#shared/hydraulics/analysis.ts'
import type { ResponsePlace } from '#shared/hydraulics/place.ts'
import { fault } from '../island/fault.ts'
import type { Point } from '../island/frame.ts'
import { distanceBetween, footOn } from '../island/lines.ts'
import { streams } from '../island/streams.ts'
import { unitOf } from '../island/units.ts'
import type { Ground } from './ground.ts'
import type { Design } from './test-design.ts'

/** A well that stands for a boundary: a stream recharges (−1), a barrier doubles (+1). Source: Ferris et al. 1962. */
export interface Image {
  at: Point
  sign: 1 | -1
  kind: 'stream' | 'barrier'
}

/** Farther boundaries cannot be felt within a test of days. */
const FELT = { stream: 500, barrier: 2_500 } as const

function mirrored(line: readonly Point[], at: Point): Point {
  const { point } = footOn(line, at)
  return [2 * point[0] - at[0], 2 * point[1] - at[1]]
}

function nearestImage(at: Point, lines: readonly (readonly Point[])[], kind: Image['kind']): Image[] {
  const feet = lines.map((line) => ({ line, distance: footOn(line, at).distance }))
  const nearest = feet.sort((a, b) => a.distance - b.distance)[0]
  if (!nearest || nearest.distance > FELT[kind]) return []
  return [{ at: mirrored(nearest.line, at), sign: kind === 'stream' ? -1 : 1, kind }]
}

/** Images of the boundaries that a test at a place may feel, the boundary taken as straight where it is nearest. */
export function imagesOf({ unit, at }: Pick<Design, 'unit' | 'at'>): Image[] {
  const connected = streams.filter(({ code }) => unitOf(unit).connectedStreams.includes(code))
  const barrier = fault.units.includes(unit) ? [fault.line] : []
  return [
    ...nearestImage(
      at,
      connected.map(({ line }) => line),
      'stream',
    ),
    ...nearestImage(at, barrier, 'barrier'),
  ]
}

/** A place where the level is wanted, and the open parts of both wells below the top of the saturated aquifer. */
export interface Observed {
  place: Point
  pumped: boolean
  pumpedScreen: Interval | null
  screen: Interval | null
}

/** Drawdown in metres at a time since the pump started, or since pumping began and goes on. */
export type Curve = (time_s: number) => number

function placeAt(design: Design, where: Observed, from: Point, real: boolean): ResponsePlace {
  return {
    pumped: real && where.pumped,
    distance_m: Math.max(design.wellRadius, distanceBetween(from, where.place)),
    bearing_deg: null,
    wellRadius_m: design.wellRadius,
    casingRadius_m: design.wellRadius,
    thickness_m: design.thickness,
    pumpedScreen: where.pumpedScreen,
    observedScreen: where.screen,
  }
}

/** Drawdown of the aquifer at a place while pumping goes on, images superposed. */
export function pumpingCurve(
  design: Design,
  { solution, parameters }: Ground['real'],
  images: readonly Image[],
  where: Observed,
): Curve {
  const out = new Float64Array(parameters.length + 1)
  const sources = [{ at: design.at, sign: 1, real: true }, ...images.map((image) => ({ ...image, real: false }))]
  const parts = sources.map(({ at, sign, real }) => {
    const respond = solution.respond(parameters, placeAt(design, where, at, real))
    return { sign, respond }
  })
  return (time_s) => {
    if (time_s <= 0) return 0
    return parts.reduce((sum, { sign, respond }) => {
      respond(time_s, out)
      return sum + sign * design.rate.m3s * (out[0] ?? 0)
    }, 0)
  }
}

/** Share of its final drawdown that casing storage lets a pumped well show: near 1 after 25 r²/T. */
const storageShare = ({ T, wellRadius }: Design, time: number) =>
  time <= 0 ? 0 : 1 - Math.exp((-time * T) / (7 * wellRadius ** 2))

/**
 * Drawdown over a whole test: the ground's own answer, superposed for the stop and for boundaries; in the pumped well
 * also turbulent loss (Jacob 1947) and, early, the water of the casing.
 */
export function drawdownCurve(design: Design, { real }: Ground, images: readonly Image[], where: Observed): Curve {
  const pumping = pumpingCurve(design, real, images, where)
  const part = (since: number) => {
    if (since <= 0) return 0
    const aquifer = pumping(since)
    if (!where.pumped) return aquifer
    return (aquifer + design.wellLoss * design.rate.m3s ** 2) * storageShare(design, since)
  }
  return (time_s) => part(time_s) - part(time_s - design.pumping_s)
}
