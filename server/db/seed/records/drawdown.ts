import { theisDrawdown } from '#shared/hydraulics/theis.ts'
import { fault } from '../island/fault.ts'
import type { Point } from '../island/frame.ts'
import { distanceBetween, footOn } from '../island/lines.ts'
import { streams } from '../island/streams.ts'
import { unitOf } from '../island/units.ts'
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

function pumpingDrawdown(design: Design, images: readonly Image[], place: Point, time: number): number {
  if (time <= 0) return 0
  const { T, storage, rate, wellRadius } = design
  const from = (source: Point) =>
    theisDrawdown(rate.m3s, T, storage, Math.max(wellRadius, distanceBetween(source, place)), time)
  return images.reduce((sum, image) => sum + image.sign * from(image.at), from(design.at))
}

/** Share of its final drawdown that casing storage lets a pumped well show: near 1 after 25 r²/T. */
const storageShare = ({ T, wellRadius }: Design, time: number) =>
  time <= 0 ? 0 : 1 - Math.exp((-time * T) / (7 * wellRadius ** 2))

export interface DrawdownAt {
  place: Point
  pumped: boolean
}

/**
 * Drawdown in metres at a time since the pump started: Theis superposed for the stop and for boundaries; in the pumped
 * well also turbulent loss (Jacob 1947) and, early, the water of the casing.
 */
export function drawdownAt(design: Design, images: readonly Image[], where: DrawdownAt, time: number): number {
  const stopped = time - design.pumping_s
  const part = (since: number) => {
    if (since <= 0) return 0
    const aquifer = pumpingDrawdown(design, images, where.place, since)
    if (!where.pumped) return aquifer
    return (aquifer + design.wellLoss * design.rate.m3s ** 2) * storageShare(design, since)
  }
  return part(time) - part(stopped)
}

/** Last time of pumping at which boundaries change the drawdown of a place by less than `share`. */
export function undisturbedUntil(design: Design, images: readonly Image[], place: Point, share = 0.02): number {
  for (let time = design.pumping_s; time > 60; time /= 1.15) {
    const alone = pumpingDrawdown(design, [], place, time)
    const effect = Math.abs(pumpingDrawdown(design, images, place, time) - alone)
    if (effect <= share * alone) return time
  }
  return 60
}
