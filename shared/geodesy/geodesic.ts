import geographiclib from 'geographiclib-geodesic'
import type { LonLat } from './types.ts'

const wgs84 = geographiclib.Geodesic.WGS84

/** Length of the shortest line on the WGS 84 ellipsoid, metres; exact to nanometres (Karney 2013). NaN for places that are not finite. */
export function geodesicDistance(from: LonLat, to: LonLat): number {
  return wgs84.Inverse(from.lat, from.lon, to.lat, to.lon, geographiclib.Geodesic.DISTANCE).s12 ?? NaN
}

/** Direction in which the shortest line leaves `from`, degrees from true north in [0, 360). 0 for one and the same place. */
export function bearing(from: LonLat, to: LonLat): number {
  if (from.lon === to.lon && from.lat === to.lat) return 0
  const azimuth = wgs84.Inverse(from.lat, from.lon, to.lat, to.lon, geographiclib.Geodesic.AZIMUTH).azi1 ?? NaN
  return (azimuth + 360) % 360
}

/** The place reached from `from` after `distance` metres in the direction of `degrees`. */
export function destination(from: LonLat, degrees: number, distance: number): LonLat {
  const { lon2 = NaN, lat2 = NaN } = wgs84.Direct(from.lat, from.lon, degrees, distance)
  return { lon: lon2, lat: lat2 }
}
