/** A place on WGS 84, in degrees. */
export interface LonLat {
  lon: number
  lat: number
}

/** Coordinates in a projected system, in its own unit; for a geographic system longitude and latitude in degrees. */
export interface PlanarPoint {
  x: number
  y: number
}

/** West, south, east, north in degrees; west > east when it crosses the date line. */
export type Box = readonly [west: number, south: number, east: number, north: number]
