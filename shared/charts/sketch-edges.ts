import type { Size } from './plot-frame.ts'
import type { SketchLabel } from './sketch-labels.ts'
import type { SketchEdge, XYPx } from './test-sketch.ts'

export interface DrawnEdge {
  kind: SketchEdge['kind']
  chosen: boolean
  /** Too far for the scale: a mark at the frame. */
  far: boolean
  path: string
  /** Strokes on the far side of a barrier; empty for a stream. */
  hatch: string
  label: SketchLabel
}

interface Sketched {
  size: Size
  centre: XYPx
  metresPerPx: number
  far: boolean
  distance: (metres: number) => string
}

/** How far inside the frame marks and labels stay, px. */
const INSET = 10
const FAR_HALF = 34
const HATCH = { step: 9, length: 6 }
/** How far beside its line a label stands, px. */
const ASIDE = 9
/** Below the middle of a line of text its baseline lies this far, px. */
const BASELINE = 4

/** A straight edge across the direction in which it lies nearest, with the places of its label. */
export function sketchEdge(edge: SketchEdge, sketched: Sketched): Omit<DrawnEdge, 'label'> & { places: SketchLabel[] } {
  const { size, centre, metresPerPx, far } = sketched
  const angle = (edge.bearing_deg * Math.PI) / 180
  const out = { x: Math.sin(angle), y: -Math.cos(angle) }
  const reach = far ? toFrame(centre, out, size) : edge.distance_m / metresPerPx
  const foot = { x: centre.x + reach * out.x, y: centre.y + reach * out.y }
  const half = far ? FAR_HALF : size.width + size.height
  const along = (step: number): XYPx => ({ x: foot.x - step * out.y, y: foot.y + step * out.x })
  const [from, to] = [along(-half), along(half)]
  return {
    kind: edge.kind,
    chosen: edge.chosen,
    far,
    path: `M${at(from)}L${at(to)}`,
    hatch: edge.kind === 'barrier' ? hatched(along, half, out, size) : '',
    places: placesAlong(`${edge.name}, ${sketched.distance(edge.distance_m)}`, along, out, sketched),
  }
}

const at = ({ x, y }: XYPx) => `${x.toFixed(1)} ${y.toFixed(1)}`
const isInside = ({ x, y }: XYPx, { width, height }: Size, inset: number) =>
  x >= inset && x <= width - inset && y >= inset && y <= height - inset

/** Pixels from the well to the frame in a direction. */
function toFrame(from: XYPx, out: XYPx, { width, height }: Size): number {
  const across = out.x > 0 ? (width - INSET - from.x) / out.x : out.x < 0 ? (INSET - from.x) / out.x : Infinity
  const down = out.y > 0 ? (height - INSET - from.y) / out.y : out.y < 0 ? (INSET - from.y) / out.y : Infinity
  return Math.min(across, down)
}

function hatched(along: (step: number) => XYPx, half: number, out: XYPx, size: Size): string {
  const count = Math.floor(half / HATCH.step)
  const steps = Array.from({ length: 2 * count + 1 }, (_, i) => (i - count) * HATCH.step)
  return steps
    .map(along)
    .filter((point) => isInside(point, size, -HATCH.length))
    .map((point) => `M${at(point)}L${at({ x: point.x + HATCH.length * out.x, y: point.y + HATCH.length * out.y })}`)
    .join('')
}

/** On the near side first, from the middle of the line outwards, then beyond it. */
function placesAlong(text: string, along: (step: number) => XYPx, out: XYPx, { size, far }: Sketched): SketchLabel[] {
  const steps = (far ? [0, 0.1, -0.1] : [0, -0.2, 0.2, -0.35, 0.35, -0.45, 0.45]).map((share) => share * size.width)
  const anchor = out.x > 0.3 ? 'end' : out.x < -0.3 ? 'start' : 'middle'
  const opposite = { start: 'end', middle: 'middle', end: 'start' } as const
  const beside = ({ x, y }: XYPx, side: 1 | -1): SketchLabel => ({
    text,
    x: x - side * ASIDE * out.x,
    y: y - side * ASIDE * out.y + BASELINE,
    anchor: side === 1 ? anchor : opposite[anchor],
  })
  const points = steps.map(along).filter((point) => isInside(point, size, 0))
  const onLine = points.length > 0 ? points : [along(0)]
  return ([1, -1] as const).flatMap((side) => onLine.map((point) => beside(point, side)))
}
