import type { AnalysisInputs, Series } from '#shared/hydraulics/analysis.ts'
import type { SketchEdge } from '#shared/words/test-sketch.ts'
import { sketchEdge, type DrawnEdge } from './sketch-edges.ts'
import { around, placeLabels, symbolBox, type SketchLabel } from './sketch-labels.ts'
import type { Size } from './plot-frame.ts'

export type { SketchEdge }

export interface XYPx {
  x: number
  y: number
}

export interface SketchWell extends XYPx {
  wellId: string
  role: Series['role']
  label: SketchLabel
}

/** A well whose direction is not known: it stands somewhere on a ring. */
export interface SketchRing {
  wellId: string
  radius: number
  label: SketchLabel
}

/** The test from above, north up, px from the upper left corner. */
export interface TestSketch {
  size: Size
  centre: XYPx
  wells: SketchWell[]
  rings: SketchRing[]
  edges: DrawnEdge[]
  metresPerPx: number
}

/** Room for labels, the scale bar and the arrow. */
const MARGIN = { side: 34, top: 26, bottom: 34 }
/** An edge farther than this many times the farthest well is drawn at the frame: the wells would vanish in a corner. */
const FAR = 2.5
/** Half the width shown where a test has one well and nothing else, m. */
const ALONE_M = 25

interface Metres {
  east: number
  north: number
}

const offset = (distance_m: number, bearing_deg: number): Metres => {
  const angle = (bearing_deg * Math.PI) / 180
  return { east: distance_m * Math.sin(angle), north: distance_m * Math.cos(angle) }
}

/** A thing of the sketch before its label has found its place. */
type Placed<Item extends { label: SketchLabel }> = Omit<Item, 'label'> & { places: SketchLabel[] }

/** Lays out a test. `distance` writes a distance in the reader's unit. */
export function testSketch(
  { series }: Pick<AnalysisInputs, 'series'>,
  edges: readonly SketchEdge[],
  size: Size,
  distance: (metres: number) => string,
): TestSketch {
  const observed = series.filter(({ role }) => role === 'observation')
  const placed = observed.filter(({ bearing_deg }) => bearing_deg != null)
  const farthest = Math.max(0, ...observed.map(({ distance_m }) => distance_m))
  const isFar = (edge: SketchEdge) => farthest > 0 && edge.distance_m > FAR * farthest
  const near = edges.filter((edge) => !isFar(edge))
  const shown = [...placed.map(positionOf), ...near.map((edge) => offset(edge.distance_m, edge.bearing_deg))]
  const unplaced = observed.filter(({ bearing_deg }) => bearing_deg == null)
  const view = viewOf([...shown, ...unplaced.flatMap(({ distance_m }) => ringCorners(distance_m))], size)
  const centre = view.at({ east: 0, north: 0 })
  const { metresPerPx } = view
  const wells = sketchWells(series, view.at, { size, distance })
  const rings = unplaced.map((one) => ringOf(one, { centre, metresPerPx, distance }))
  const drawn = edges.map((edge) => sketchEdge(edge, { size, centre, metresPerPx, far: isFar(edge), distance }))
  const all = [...wells, ...rings, ...drawn]
  const labels = placeLabels(
    all.map(({ places }) => places),
    wells.map(symbolBox),
    size,
  )
  const labelled = <Item extends { places: SketchLabel[] }>(items: Item[], from: number) =>
    items.map(({ places: _tried, ...item }, i) => ({ ...item, label: labels[from + i] as SketchLabel }))
  return {
    size,
    centre,
    wells: labelled(wells, 0),
    rings: labelled(rings, wells.length),
    edges: labelled(drawn, wells.length + rings.length),
    metresPerPx,
  }
}

function sketchWells(
  series: readonly Series[],
  at: (point: Metres) => XYPx,
  { size, distance }: { size: Size; distance: (metres: number) => string },
): Placed<SketchWell>[] {
  const pumped = series.find(({ role }) => role === 'pumped')
  const placed = series.filter(({ role, bearing_deg }) => role === 'observation' && bearing_deg != null)
  const points = [
    {
      wellId: pumped?.wellId ?? '',
      role: 'pumped' as const,
      text: pumped ? `${pumped.label}, pumped` : 'pumped well',
      ...at({ east: 0, north: 0 }),
    },
    ...placed.map((one) => ({
      wellId: one.wellId,
      role: one.role,
      text: `${one.label}, ${distance(one.distance_m)}`,
      ...at(positionOf(one)),
    })),
  ]
  return points.map(({ wellId, role, x, y, text }) => ({ wellId, role, x, y, places: around({ text, x, y }, size) }))
}

const positionOf = ({ distance_m, bearing_deg }: Series) => offset(distance_m, bearing_deg ?? 0)

const ringCorners = (radius: number): Metres[] => [
  { east: -radius, north: -radius },
  { east: radius, north: radius },
]

interface Laid {
  centre: XYPx
  metresPerPx: number
  distance: (metres: number) => string
}

function ringOf({ wellId, label, distance_m }: Series, { centre, metresPerPx, distance }: Laid): Placed<SketchRing> {
  const radius = distance_m / metresPerPx
  const text = `${label}, ${distance(distance_m)}, direction not known`
  const at = (y: number): SketchLabel => ({ text, x: centre.x, y, anchor: 'middle' })
  return { wellId, radius, places: [at(centre.y - radius - 4), at(centre.y + radius + 14), at(centre.y - radius + 14)] }
}

/** The scale and place at which all points, the pumped well among them, fit the frame. */
function viewOf(points: Metres[], { width, height }: Size) {
  const all = [{ east: 0, north: 0 }, ...points]
  const span = (pick: (point: Metres) => number) => {
    const values = all.map(pick)
    return { low: Math.min(...values), high: Math.max(...values) }
  }
  const east = span((point) => point.east)
  const north = span((point) => point.north)
  const inner = { width: width - 2 * MARGIN.side, height: height - MARGIN.top - MARGIN.bottom }
  const fitting = Math.max((east.high - east.low) / inner.width, (north.high - north.low) / inner.height)
  const metresPerPx = fitting > 0 ? fitting : (2 * ALONE_M) / inner.height
  const middle = { east: (east.low + east.high) / 2, north: (north.low + north.high) / 2 }
  const at = (point: Metres): XYPx => ({
    x: width / 2 + (point.east - middle.east) / metresPerPx,
    y: MARGIN.top + inner.height / 2 - (point.north - middle.north) / metresPerPx,
  })
  return { at, metresPerPx }
}
