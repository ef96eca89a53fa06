import type { MapCluster, MapWell } from '#shared/contracts/map.ts'
import { classIndex, type ValueClasses } from '#shared/charts/value-classes.ts'
import type { MapColours } from './map-colours.ts'
import type { MapFrame } from './map-frame.ts'
import {
  clusterRadius,
  discRadius,
  hollowRadius,
  paintCluster,
  paintDisc,
  paintHalo,
  paintHollow,
} from './well-symbols.ts'

export interface DrawnWells {
  wells: readonly MapWell[]
  clusters: readonly MapCluster[]
  classes: ValueClasses
}

/** From here on codes are written beside the wells, where there is room. */
const CODES_FROM_ZOOM = 14

type Context = CanvasRenderingContext2D

function paintCodes(context: Context, frame: MapFrame, wells: readonly MapWell[], colours: MapColours) {
  const taken = new Set<string>()
  const cell = (x: number, y: number) => `${Math.round(x / 70)},${Math.round(y / 16)}`
  context.font = '500 12px Roboto, sans-serif'
  context.textAlign = 'left'
  context.textBaseline = 'middle'
  context.lineWidth = 3.5
  context.lineJoin = 'round'
  context.strokeStyle = colours.paper
  context.fillStyle = colours.ink
  for (const { lon, lat, code } of wells) {
    const [x, y] = frame.project(lon, lat)
    if (taken.has(cell(x, y))) continue
    taken.add(cell(x, y))
    context.strokeText(code, x + 12, y)
    context.fillText(code, x + 12, y)
  }
}

/** Wells without a value first: what carries a value lies above. */
export function paintWells(
  context: Context,
  frame: MapFrame,
  { wells, clusters, classes }: DrawnWells,
  colours: MapColours,
) {
  const radius = discRadius(frame.zoom)
  for (const { lon, lat, value, kind } of wells) {
    if (value === null) paintHollow(context, frame.project(lon, lat), hollowRadius(frame.zoom), { kind, colours })
  }
  for (const { lon, lat, value, evidence } of wells) {
    if (value === null || evidence === null) continue
    const fill = classes.classes[classIndex(classes, value)]!.colour
    paintDisc(context, frame.project(lon, lat), radius, { fill, evidence, colours })
  }
  for (const cluster of clusters) paintCluster(context, frame.project(cluster.lon, cluster.lat), cluster, colours)
  if (frame.zoom >= CODES_FROM_ZOOM) paintCodes(context, frame, wells, colours)
}

export interface Lit {
  lon: number
  lat: number
  /** Wells in it; 1 for a single well. */
  count: number
  selected: boolean
}

/** Rings around the selected well and what is under the pointer. */
export function paintLit(context: Context, frame: MapFrame, lit: readonly Lit[], colours: MapColours) {
  for (const { lon, lat, count, selected } of lit) {
    const radius = count > 1 ? clusterRadius(count) : discRadius(frame.zoom)
    const colour = selected ? colours.deepWater : colours.inkSoft
    paintHalo(context, frame.project(lon, lat), radius, { colour, colours })
  }
}
