import { wrapLongitude } from './box.ts'
import type { LonLat } from './types.ts'

/**
 * Web Mercator as whole numbers from 0 to 2²⁴ − 1, x from the date line eastwards and y from the north southwards as
 * tiles count: a shift by 24 − zoom bits gives the tile, and clusters are one grouped query. A step is 2.4 m at the
 * equator: for finding and grouping, never for distances.
 */
export interface MercatorInts {
  mx: number
  my: number
}

export const mercatorBits = 24
const cells = 2 ** mercatorBits
/** Where the square map ends (degrees): atan(sinh π). */
export const mercatorLatitude = 85.0511287798066

const toCell = (part: number) => Math.min(cells - 1, Math.max(0, Math.floor(part * cells)))

/** Latitudes past the end of the map are taken to its edge. NaN stays NaN. */
export function mercatorInts(lon: number, lat: number): MercatorInts {
  const held = Math.min(mercatorLatitude, Math.max(-mercatorLatitude, lat))
  const rise = Math.asinh(Math.tan((held * Math.PI) / 180)) / Math.PI
  return { mx: toCell((wrapLongitude(lon) + 180) / 360), my: toCell((1 - rise) / 2) }
}

/** The middle of a cell. */
export function fromMercatorInts({ mx, my }: MercatorInts): LonLat {
  const rise = 1 - (2 * (my + 0.5)) / cells
  return { lon: ((mx + 0.5) / cells) * 360 - 180, lat: (Math.atan(Math.sinh(rise * Math.PI)) * 180) / Math.PI }
}
