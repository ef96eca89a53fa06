import { wrapLongitude } from '#shared/geodesy/box.ts'
import { mercatorLatitude } from '#shared/geodesy/mercator.ts'

export type DegreeBox = [west: number, south: number, east: number, north: number]

/** Larger than a picture of the base map, so that a box changes rarely. */
const TILE_PX = 512
/** 1e-5 of a degree is about a metre: enough for a box, and equal boxes stay equal. */
const round = (degrees: number) => Math.round(degrees * 1e5) / 1e5

const toColumn = (lon: number, tiles: number) => ((lon + 180) / 360) * tiles
const toLongitude = (column: number, tiles: number) => (column / tiles) * 360 - 180

function toRow(lat: number, tiles: number): number {
  const held = Math.min(mercatorLatitude, Math.max(-mercatorLatitude, lat))
  return ((1 - Math.asinh(Math.tan((held * Math.PI) / 180)) / Math.PI) / 2) * tiles
}

const toLatitude = (row: number, tiles: number) =>
  (Math.atan(Math.sinh(Math.PI * (1 - (2 * Math.min(tiles, Math.max(0, row))) / tiles))) * 180) / Math.PI

/** Longitudes as the server takes them; the date line as an eastern edge is 180. */
function wrapped(west: number, east: number): [number, number] {
  if (east - west >= 360) return [-180, 180]
  const end = wrapLongitude(east)
  return [round(wrapLongitude(west)), round(end === -180 ? 180 : end)]
}

/**
 * The box to ask the server for when the window shows `box`: grown to whole tiles and half a tile beyond, so that a
 * small move asks for the same box again and its answer is at hand. `box` may reach past the date line; the answer has
 * west > east then.
 */
export function fetchBox([west, south, east, north]: DegreeBox, zoom: number): DegreeBox {
  const tiles = (2 ** zoom * 256) / TILE_PX
  const left = Math.floor(toColumn(west, tiles) - 0.25)
  const right = Math.ceil(toColumn(east, tiles) + 0.25)
  const top = Math.floor(toRow(north, tiles) - 0.25)
  const bottom = Math.ceil(toRow(south, tiles) + 0.25)
  const [from, to] = wrapped(toLongitude(left, tiles), toLongitude(right, tiles))
  return [from, round(toLatitude(bottom, tiles)), to, round(toLatitude(top, tiles))]
}
