import type { MapWell } from '#shared/contracts/map.ts'
import type { MapColours } from './map-colours.ts'

export type Evidence = NonNullable<MapWell['evidence']>

/** The ring tells the evidence: width in pixels, and dashes where the value is slight. */
export const rings: Record<Evidence, { width: number; dash: readonly number[] }> = {
  firm: { width: 2.6, dash: [] },
  fair: { width: 1.3, dash: [] },
  slight: { width: 1.5, dash: [2.6, 2] },
}

/** Radius of a disc with a value. Smaller from afar, where discs stand close. */
export const discRadius = (zoom: number): number => (zoom <= 9 ? 4.5 : zoom <= 11 ? 6 : 7)
export const hollowRadius = (zoom: number): number => discRadius(zoom) - 2.25

type Context = CanvasRenderingContext2D

export function paintDisc(
  context: Context,
  [x, y]: readonly [number, number],
  radius: number,
  { fill, evidence, colours }: { fill: string; evidence: Evidence; colours: MapColours },
) {
  const { width, dash } = rings[evidence]
  context.beginPath()
  context.arc(x, y, radius, 0, 2 * Math.PI)
  context.fillStyle = fill
  context.fill()
  context.setLineDash(dash as number[])
  context.lineWidth = width
  context.strokeStyle = colours.ink
  context.stroke()
  context.setLineDash([])
}

/** A well without a value. A planned one is a diamond: nothing stands there yet. */
export function paintHollow(
  context: Context,
  [x, y]: readonly [number, number],
  radius: number,
  { kind, colours }: { kind: MapWell['kind']; colours: MapColours },
) {
  context.beginPath()
  if (kind === 'planned') {
    const half = radius + 1.2
    context.moveTo(x, y - half)
    context.lineTo(x + half, y)
    context.lineTo(x, y + half)
    context.lineTo(x - half, y)
    context.closePath()
  } else {
    context.arc(x, y, radius, 0, 2 * Math.PI)
  }
  context.fillStyle = `${colours.sheet}B0`
  context.fill()
  context.lineWidth = 1.4
  context.strokeStyle = colours.inkSoft
  context.stroke()
}

/** Around what is selected or under the pointer. */
export function paintHalo(
  context: Context,
  [x, y]: readonly [number, number],
  radius: number,
  { colour, colours }: { colour: string; colours: MapColours },
) {
  context.beginPath()
  context.arc(x, y, radius + 4.5, 0, 2 * Math.PI)
  context.strokeStyle = colours.sheet
  context.lineWidth = 5
  context.stroke()
  context.strokeStyle = colour
  context.lineWidth = 2.5
  context.stroke()
}

export const clusterRadius = (count: number): number => 12 + 3.5 * Math.log10(Math.max(2, count))

const short = (count: number) => (count < 1_000 ? String(count) : `${Math.round(count / 100) / 10}k`)

/** A ring whose arc is the share of wells with a value, clockwise from the top, and their count in the middle. */
export function paintCluster(
  context: Context,
  [x, y]: readonly [number, number],
  { count, valued }: { count: number; valued: number },
  colours: MapColours,
) {
  const radius = clusterRadius(count)
  const top = -Math.PI / 2
  context.beginPath()
  context.arc(x, y, radius + 1.5, 0, 2 * Math.PI)
  context.fillStyle = colours.sheet
  context.fill()
  context.lineWidth = 3
  context.beginPath()
  context.arc(x, y, radius - 0.5, 0, 2 * Math.PI)
  context.strokeStyle = colours.line
  context.stroke()
  context.beginPath()
  context.arc(x, y, radius - 0.5, top, top + (2 * Math.PI * valued) / count)
  context.strokeStyle = colours.deepWater
  context.stroke()
  context.fillStyle = colours.ink
  context.font = '500 12px Roboto, sans-serif'
  context.textAlign = 'center'
  context.textBaseline = 'middle'
  context.fillText(short(count), x, y + 0.5)
}
