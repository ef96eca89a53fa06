import type { MapMarks } from '../../composables/useMap.ts'
import type { MapColours } from './map-colours.ts'
import type { MapFrame } from './map-frame.ts'

/** Width of a contribution's line: its area, not its length, tells the weight, so that small ones stay visible. */
export const contributionWidth = (weight: number): number => 1.2 + 9 * Math.max(0, weight)

/** Lines from the place to the wells that carried its estimate; drawn under the wells. */
export function paintContributions(
  context: CanvasRenderingContext2D,
  frame: MapFrame,
  { place, contributions }: MapMarks,
  colours: MapColours,
) {
  if (!place) return
  const [x, y] = frame.project(place.lon, place.lat)
  context.lineCap = 'round'
  context.strokeStyle = colours.ochre
  for (const { lon, lat, weight } of contributions) {
    const [wellX, wellY] = frame.project(lon, lat)
    context.lineWidth = contributionWidth(weight)
    context.beginPath()
    context.moveTo(x, y)
    context.lineTo(wellX, wellY)
    context.stroke()
  }
}

/** The place itself: a ring in ochre around a dot; drawn over everything. */
export function paintPlace(
  context: CanvasRenderingContext2D,
  frame: MapFrame,
  { lon, lat }: { lon: number; lat: number },
  colours: MapColours,
) {
  const [x, y] = frame.project(lon, lat)
  const circles = [
    [11, colours.sheet],
    [9.5, colours.ochre],
    [6.5, colours.sheet],
    [3, colours.ochre],
  ] as const
  for (const [radius, colour] of circles) {
    context.beginPath()
    context.arc(x, y, radius, 0, 2 * Math.PI)
    context.fillStyle = colour
    context.fill()
  }
}
