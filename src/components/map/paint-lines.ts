import type { AquiferUnit, Stream } from '#shared/contracts/map.ts'
import type { MapColours } from './map-colours.ts'
import type { MapFrame } from './map-frame.ts'
import { visibleRuns, type Box } from './screen-path.ts'

/** Wider than any line, so that none is cut off at the edge. */
const MARGIN = 10

type Path = readonly (readonly [lon: number, lat: number])[]

/** What a path is cut to before it is drawn. */
export const frameBox = ({ width, height }: MapFrame): Box => ({
  left: -MARGIN,
  top: -MARGIN,
  right: width + MARGIN,
  bottom: height + MARGIN,
})

export function tracePath(context: CanvasRenderingContext2D, frame: MapFrame, path: Path) {
  const points = path.map(([lon, lat]) => frame.project(lon, lat))
  context.beginPath()
  for (const run of visibleRuns(points, frameBox(frame))) {
    for (const [i, [x, y]] of run.entries()) {
      if (i === 0) context.moveTo(x, y)
      else context.lineTo(x, y)
    }
  }
}

/** The main river is the widest; lines grow a little as the map comes nearer. */
export const streamWidth = (order: number, zoom: number): number =>
  Math.max(1.25, 3.4 - 1.1 * (order - 1)) * (zoom >= 13 ? 1.35 : zoom <= 9 ? 0.7 : 1)

export function paintStreams(
  context: CanvasRenderingContext2D,
  frame: MapFrame,
  streams: readonly Stream[],
  colours: MapColours,
  lit: number | null,
) {
  context.lineJoin = 'round'
  context.lineCap = 'round'
  for (const { id, streamOrder, path } of streams) {
    tracePath(context, frame, path)
    const width = streamWidth(streamOrder, frame.zoom)
    if (id === lit) {
      context.strokeStyle = colours.sheet
      context.lineWidth = width + 5
      context.stroke()
    }
    context.strokeStyle = colours.deepWater
    context.lineWidth = id === lit ? width + 1.5 : width
    context.stroke()
  }
}

/** Dotted outlines; the chosen unit's is strong, the others only say that they are there. */
export function paintUnits(
  context: CanvasRenderingContext2D,
  frame: MapFrame,
  units: readonly AquiferUnit[],
  colours: MapColours,
  chosen: number | null,
) {
  context.lineCap = 'round'
  context.lineJoin = 'round'
  for (const { id, outline } of units) {
    const strong = id === chosen
    context.strokeStyle = strong ? colours.ink : colours.inkSoft
    context.lineWidth = strong ? 2.2 : 1.5
    context.setLineDash([0.01, strong ? 5 : 5.5])
    for (const ring of outline) {
      tracePath(context, frame, ring)
      context.stroke()
    }
  }
  context.setLineDash([])
}
