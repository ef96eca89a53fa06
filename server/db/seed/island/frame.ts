import proj4 from 'proj4'

/** The island's own frame: metres east and north of its centre, parallel to UTM zone 27 south. */
export const EPSG = 32727
export const CENTRE = { easting: 482_540, northing: 5_749_700 } as const
/** Half the island's box, in metres; land and near-shore water lie inside it. */
export const HALF = { x: 25_000, y: 18_000 } as const

/** Position in metres: x east, y north of the island's centre. */
export type Point = readonly [x: number, y: number]
/** Position in degrees, WGS 84: longitude, latitude. */
export type LonLat = [lon: number, lat: number]

const utm = proj4('EPSG:4326', '+proj=utm +zone=27 +south +datum=WGS84 +units=m +no_defs')

export function toLonLat([x, y]: Point): LonLat {
  const [lon, lat] = utm.inverse([x + CENTRE.easting, y + CENTRE.northing])
  return [lon, lat]
}

export function toLocal([lon, lat]: Readonly<LonLat>): Point {
  const [easting, northing] = utm.forward([lon, lat])
  return [easting - CENTRE.easting, northing - CENTRE.northing]
}
