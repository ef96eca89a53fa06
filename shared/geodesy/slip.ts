import { inBox, widenBox } from './box.ts'
import type { Box, LonLat } from './types.ts'

/** A mistake in typing that would explain a place far from the region, and the place that was probably meant. */
export interface Slip extends LonLat {
  code: 'place/swapped' | 'place/sign'
}

const isPlace = ({ lon, lat }: LonLat) => Math.abs(lon) <= 180 && Math.abs(lat) <= 90

/** Neighbouring country is no mistake. Degrees. */
const near = 1

/**
 * For a place outside the region: latitude and longitude the other way round, or a forgotten minus sign, when that
 * would put it inside. Null when the place is in or beside the region, or when neither explains it.
 */
export function likelySlip({ lon, lat }: LonLat, region: Box): Slip | null {
  if (inBox({ lon, lat }, widenBox(region, near))) return null
  const swapped = { lon: lat, lat: lon }
  const signs = [
    { lon: -lon, lat },
    { lon, lat: -lat },
    { lon: -lon, lat: -lat },
  ]
  const meant = (place: LonLat) => isPlace(place) && inBox(place, region)
  if (meant(swapped)) return { code: 'place/swapped', ...swapped }
  const turned = signs.find(meant)
  return turned ? { code: 'place/sign', ...turned } : null
}
