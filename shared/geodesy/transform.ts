import { inBox, widenBox } from './box.ts'
import { converterOf } from './converter.ts'
import { CrsError } from './crs-error.ts'
import { requireCrs } from './crs.ts'
import type { Crs, DatumOperation } from './crs-table.ts'
import { geodesicDistance } from './geodesic.ts'
import type { Box, LonLat, PlanarPoint } from './types.ts'

export interface Wgs84Position extends LonLat {
  /** Of the datum shift alone, in metres. */
  accuracy_m: number
  /** Name and EPSG code of the shift. */
  operation: string
  /** False in the strip beside the area of use where coordinates are still accepted. */
  insideArea: boolean
}

export interface SystemPosition extends PlanarPoint {
  accuracy_m: number
  operation: string
}

/** Old surveys run past their zone's edge; half a zone further a mistake is likelier. Degrees. */
const furthestOutside = 3
/** There and back may differ by some decimetres, because heights are dropped on the way. Metres. */
const closure = 1

const reach = (system: Crs): Box => widenBox(system.box, furthestOutside)

function applies(system: Crs, operation: DatumOperation, place: LonLat): boolean {
  return inBox(place, operation.area ?? reach(system)) && inBox(place, reach(system))
}

/** The place must lead back to its own coordinates: far outside, projections fold over and give a second place. */
function closes(system: Crs, operation: DatumOperation, point: PlanarPoint, place: LonLat): boolean {
  const back = converterOf(system, operation).fromWgs84(place)
  const again = back && converterOf(system, operation).toWgs84(back)
  if (!back || !again) return false
  const metres = system.metresPerUnit
  if (metres === null) return geodesicDistance(place, again) <= closure
  return Math.hypot(back.x - point.x, back.y - point.y) * metres <= closure
}

interface Candidate {
  operation: DatumOperation
  place: LonLat
}

function candidates(system: Crs, point: PlanarPoint): Candidate[] {
  const found = system.operations.flatMap((operation) => {
    const place = converterOf(system, operation).toWgs84(point)
    return place ? [{ operation, place }] : []
  })
  if (found.length === 0) throw new CrsError('crs/not-finite', { epsg: system.epsg, ...point })
  return found.filter(
    ({ operation, place }) => applies(system, operation, place) && closes(system, operation, point, place),
  )
}

/**
 * Coordinates of an EPSG system as longitude and latitude on WGS 84.
 * `x` is the easting or longitude and `y` the northing or latitude, whatever order the system lists its axes in;
 * for a system of axis order `ws` they are westing and southing.
 * Where several operations of the registry hold, the most accurate is used; where another contradicts it by more than
 * that other's accuracy, the stated accuracy grows by it.
 * @throws CrsError unknown or refused system, result not finite, place outside the area of use
 */
export function toWgs84(epsg: number, x: number, y: number): Wgs84Position {
  const system = requireCrs(epsg)
  if (!Number.isFinite(x) || !Number.isFinite(y)) throw new CrsError('crs/not-finite', { epsg, x, y })
  if (system.kind === 'geographic' && Math.abs(y) > 90) throw outside(system, x, y)
  const [best, ...others] = candidates(system, { x, y })
  if (!best) throw outside(system, x, y)
  // Another operation that differs within its own accuracy agrees; what is beyond is doubt about the better one.
  const doubt = others.map(({ operation, place }) => geodesicDistance(best.place, place) - operation.accuracy_m)
  return {
    ...best.place,
    accuracy_m: Math.max(best.operation.accuracy_m, ...doubt),
    operation: best.operation.name,
    insideArea: inBox(best.place, system.box),
  }
}

const outside = (system: Crs, x: number, y: number) =>
  new CrsError('crs/outside-area', { epsg: system.epsg, name: system.name, area: system.area, x, y })

function operationAt(system: Crs, place: LonLat): DatumOperation {
  const operation = system.operations.find((each) => applies(system, each, place))
  if (!operation) throw outside(system, place.lon, place.lat)
  return operation
}

function forward(system: Crs, operation: DatumOperation, place: LonLat): PlanarPoint {
  const point = converterOf(system, operation).fromWgs84(place)
  if (!point) throw new CrsError('crs/not-finite', { epsg: system.epsg, x: place.lon, y: place.lat })
  return point
}

function requireFinite(epsg: number, { lon, lat }: LonLat) {
  if (!Number.isFinite(lon) || !Number.isFinite(lat)) throw new CrsError('crs/not-finite', { epsg, x: lon, y: lat })
}

/**
 * A place on WGS 84 in an EPSG system, in the system's own unit.
 * @throws CrsError as `toWgs84`
 */
export function fromWgs84(epsg: number, lon: number, lat: number): SystemPosition {
  const system = requireCrs(epsg)
  requireFinite(epsg, { lon, lat })
  const operation = operationAt(system, { lon, lat })
  return {
    ...forward(system, operation, { lon, lat }),
    accuracy_m: operation.accuracy_m,
    operation: operation.name,
  }
}

function middleOf(places: readonly LonLat[]): LonLat {
  const mean = (pick: (place: LonLat) => number) => places.reduce((sum, place) => sum + pick(place), 0) / places.length
  return { lon: mean(({ lon }) => lon), lat: mean(({ lat }) => lat) }
}

/**
 * Many places in one projected system, in metres east and north, for distances and kriging. One operation serves all of
 * them, the one that holds at their middle, so that no jump falls between neighbours. Not for points on both sides of
 * the date line.
 * @throws CrsError as `fromWgs84`; `crs/refused` with reason `projected` for a geographic system
 */
export function projectTo(epsg: number, places: readonly LonLat[]): PlanarPoint[] {
  const system = requireCrs(epsg)
  const metres = system.metresPerUnit
  if (metres === null) throw new CrsError('crs/refused', { epsg, name: system.name, reason: 'projected' })
  if (places.length === 0) return []
  places.forEach((place) => requireFinite(epsg, place))
  const operation = operationAt(system, middleOf(places))
  const sign = system.axis === 'ws' ? -metres : metres
  return places.map((place) => {
    const { x, y } = forward(system, operation, place)
    return { x: x * sign, y: y * sign }
  })
}
