import proj4 from 'proj4'
import type { LonLat, PlanarPoint } from './types.ts'

export interface LocalPlane {
  /** Metres east and north of the origin. */
  toPlane: (place: LonLat) => PlanarPoint
  fromPlane: (point: PlanarPoint) => LonLat
}

/**
 * A plane in metres around a place: transverse Mercator on WGS 84 with its middle there. Lengths are right to 3 parts in
 * 100,000 within 50 km (1 + x²/2R²), angles everywhere near. For a region without a projected system of its own.
 * @throws RangeError for an origin that is no place
 */
export function localPlane(lon0: number, lat0: number): LocalPlane {
  if (!(Math.abs(lon0) <= 360 && Math.abs(lat0) <= 90)) throw new RangeError(`no place: ${lon0}, ${lat0}`)
  const both = proj4(`+proj=tmerc +lat_0=${lat0} +lon_0=${lon0} +k=1 +x_0=0 +y_0=0 +ellps=WGS84 +no_defs`)
  return {
    toPlane({ lon, lat }) {
      const [x = NaN, y = NaN] = both.forward([lon, lat])
      return { x, y }
    },
    fromPlane({ x, y }) {
      const [lon = NaN, lat = NaN] = both.inverse([x, y])
      return { lon, lat }
    },
  }
}
