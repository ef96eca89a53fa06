import type { Boundary } from '#shared/contracts/map.ts'
import type { MapColours } from './map-colours.ts'
import type { MapFrame } from './map-frame.ts'
import { resample } from './screen-path.ts'

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
function paintTicks(context: CanvasRenderingContext2D, points: readonly (readonly [number, number])[], every: number) {
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
    const points = path.map(([lon, lat]) => frame.project(lon, lat))
    for (const [style, extra] of [
      [colours.sheet, 2.5],
      [colour(colours), 0],
    ] as const) {
      context.strokeStyle = style
      context.lineWidth = width + extra
      context.setLineDash(extra > 0 ? [] : dash)
      context.beginPath()
      for (const [i, [x, y]] of points.entries()) i === 0 ? context.moveTo(x, y) : context.lineTo(x, y)
      context.stroke()
    }
    context.setLineDash([])
    if (tickEvery !== null) paintTicks(context, points, tickEvery)
  }
}
