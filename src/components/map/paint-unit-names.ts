import type { AquiferUnit } from '#shared/contracts/map.ts'
import { calmStretch, letterPlace } from './label-path.ts'
import type { MapColours } from './map-colours.ts'
import type { MapFrame } from './map-frame.ts'
import type { PathStep } from './screen-path.ts'

/** Above the line by this much, and this far from the window's edge. */
const LIFT_PX = 11
const EDGE_PX = 30

interface Placed extends PathStep {
  letter: string
}

function placeLetters(context: CanvasRenderingContext2D, name: string, stretch: readonly PathStep[]): Placed[] {
  return [...name].map((letter, i) => {
    // Measured from the beginning, so that kerning is kept.
    const end = context.measureText(name.slice(0, i + 1)).width
    return { letter, ...letterPlace(stretch, end - context.measureText(letter).width / 2) }
  })
}

function write(context: CanvasRenderingContext2D, letters: readonly Placed[], how: 'strokeText' | 'fillText') {
  for (const { letter, x, y, angle } of letters) {
    context.save()
    context.translate(x, y)
    context.rotate(angle)
    context[how](letter, 0, -LIFT_PX)
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
    const letters = placeLetters(context, name, stretch)
    // The whole halo first: that of a letter would cover the one before it.
    write(context, letters, 'strokeText')
    write(context, letters, 'fillText')
  }
}
