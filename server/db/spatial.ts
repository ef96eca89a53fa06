import { sql } from 'drizzle-orm'
import { customType } from 'drizzle-orm/mysql-core'

/** Positions are [longitude, latitude] in degrees, WGS 84, everywhere outside SQL (as in GeoJSON). */
export type Position = [number, number]

interface DriverPoint {
  x: number
  y: number
}

const pair = ([lon, lat]: Position) => `${lon} ${lat}`
const ring = (positions: Position[]) => `(${positions.map(pair).join(',')})`
const positions = (points: DriverPoint[]): Position[] => points.map(({ x, y }) => [x, y])
const geometry = (wkt: string) => sql`ST_GeomFromText(${wkt}, 4326)`

export const point = customType<{ data: Position; driverData: DriverPoint }>({
  dataType: () => 'point',
  toDriver: (position) => geometry(`POINT(${pair(position)})`),
  fromDriver: ({ x, y }) => [x, y],
})

export const line = customType<{ data: Position[]; driverData: DriverPoint[] }>({
  dataType: () => 'linestring',
  toDriver: (line) => geometry(`LINESTRING${ring(line)}`),
  fromDriver: positions,
})

/** Rings of one polygon: the outer one first, then holes, each closed. */
export const polygon = customType<{ data: Position[][]; driverData: DriverPoint[][] }>({
  dataType: () => 'polygon',
  toDriver: (rings) => geometry(`POLYGON(${rings.map(ring).join(',')})`),
  fromDriver: (rings) => rings.map(positions),
})
