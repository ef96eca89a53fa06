import type { Boundary } from '#shared/contracts/map.ts'
import type { MapColours } from './map-colours.ts'
import type { MapFrame } from './map-frame.ts'
import { frameBox, tracePath } from './paint-lines.ts'
import { resample, visibleRuns, type ScreenPoint } from './screen-path.ts'

type Kind = Boundary['kind']

interface Style {
  dash: number[]
  width: number
  colour: (colours: MapColours) => string
  /** A tick across the line every so many pixels: a fault blocks, a fixed head feeds. */
  tickEvery: number | null
}

const barrier: Style = { dash: [], width: 2, colour: ({ brick }) => brick, tickEvery: 14 }
export const boundaryStyles: Record<Kind, Style> = {
  fault: barrier,
  barrier,
  coast: { dash: [8, 4], width: 1.5, colour: ({ deepWater }) => deepWater, tickEvery: null },
  'constant-head': { dash: [8, 4], width: 2.5, colour: ({ deepWater }) => deepWater, tickEvery: null },
}

export const boundaryNames: Record<Kind, string> = {
  fault: 'Fault',
  barrier: 'Barrier',
  coast: 'Coast',
  'constant-head': 'Constant head',
}

/** Pairs of short bars across the line, on alternating sides, so that it is no stream and no road without colour too. */
function paintTicks(context: CanvasRenderingContext2D, points: readonly ScreenPoint[], every: number) {
  context.beginPath()
  for (const [i, { x, y, angle }] of resample(points, every).entries()) {
    const side = i % 2 === 0 ? 1 : -1
    const [nx, ny] = [-Math.sin(angle) * side, Math.cos(angle) * side]
    context.moveTo(x, y)
    context.lineTo(x + 5.5 * nx, y + 5.5 * ny)
  }
  context.stroke()
}

export function paintBoundaries(
  context: CanvasRenderingContext2D,
  frame: MapFrame,
  boundaries: readonly Boundary[],
  colours: MapColours,
) {
  context.lineCap = 'butt'
  context.lineJoin = 'round'
  for (const { kind, path } of boundaries) {
    const { dash, width, colour, tickEvery } = boundaryStyles[kind]
    tracePath(context, frame, path)
    context.strokeStyle = colours.sheet
    context.lineWidth = width + 2.5
    context.stroke()
    context.strokeStyle = colour(colours)
    context.lineWidth = width
    context.setLineDash(dash)
    context.stroke()
    context.setLineDash([])
    const points = path.map(([lon, lat]) => frame.project(lon, lat))
    if (tickEvery === null) continue
    for (const run of visibleRuns(points, frameBox(frame))) paintTicks(context, run, tickEvery)
  }
}
