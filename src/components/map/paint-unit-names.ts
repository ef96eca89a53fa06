import type { AquiferUnit } from '#shared/contracts/map.ts'
import { calmStretch, letterPlace } from './label-path.ts'
import type { MapColours } from './map-colours.ts'
import type { MapFrame } from './map-frame.ts'
import type { PathStep } from './screen-path.ts'

/** Above the line by this much, and this far from the window's edge. */
const LIFT_PX = 11
const EDGE_PX = 30

type Write = 'strokeText' | 'fillText'

function writeAlong(context: CanvasRenderingContext2D, name: string, stretch: readonly PathStep[], write: Write) {
  for (const [i, letter] of [...name].entries()) {
    // Measured from the beginning, so that kerning is kept.
    const end = context.measureText(name.slice(0, i + 1)).width
    const { x, y, angle } = letterPlace(stretch, end - context.measureText(letter).width / 2)
    context.save()
    context.translate(x, y)
    context.rotate(angle)
    context[write](letter, 0, -LIFT_PX)
    context.restore()
  }
}

/** Names of units along their edges, where the edge runs calmly; the chosen unit's is written strongly. */
export function paintUnitNames(
  context: CanvasRenderingContext2D,
  frame: MapFrame,
  units: readonly AquiferUnit[],
  colours: MapColours,
  chosen: number | null,
) {
  const { left, top, right, bottom } = frame.inner
  const window = { left: left + EDGE_PX, top: top + EDGE_PX, right: right - EDGE_PX, bottom: bottom - EDGE_PX }
  context.textAlign = 'center'
  context.textBaseline = 'middle'
  context.lineJoin = 'round'
  context.lineWidth = 4
  context.strokeStyle = colours.paper
  const written: PathStep[] = []
  for (const { id, name, outline } of units) {
    const points = (outline[0] ?? []).map(([lon, lat]) => frame.project(lon, lat))
    context.font = `${id === chosen ? 700 : 400} 12.5px Roboto, sans-serif`
    context.fillStyle = id === chosen ? colours.ink : colours.inkSoft
    const stretch = calmStretch(points, context.measureText(name).width, { window, taken: written })
    if (!stretch) continue
    written.push(...stretch)
    // The whole halo first: that of a letter would cover the one before it.
    writeAlong(context, name, stretch, 'strokeText')
    writeAlong(context, name, stretch, 'fillText')
  }
}
