import type { WellInput } from '#shared/contracts/wells.ts'
import type { Region } from '#shared/contracts/region.ts'
import { CrsError, geodesicDistance, inBox, likelySlip, mercatorInts, type LonLat } from '#shared/geodesy/index.ts'
import { toWgs84 } from '#shared/geodesy/transform.ts'
import type { Position } from '../../db/spatial.ts'
import { fieldError } from '../../errors.ts'

/** A well may lie a little beyond the home extent without anybody being asked. Degrees. */
const margin = 0.25

const aboutSystem = new Set<string>(['crs/unknown', 'crs/refused'])

function converted({ epsg, x, y }: WellInput) {
  try {
    return toWgs84(epsg, x, y)
  } catch (error) {
    if (!(error instanceof CrsError)) throw error
    throw fieldError(aboutSystem.has(error.code) ? 'epsg' : 'x', error.code, error.params)
  }
}

const degrees = (value: number) => Number(value.toFixed(5))

/** @throws AppError on the coordinates: at 0, 0; swapped; a sign forgotten; or far outside and not confirmed. */
function checkPlace(place: LonLat, { extent: [west, south, east, north] }: Region, confirmed: boolean): void {
  if (Math.abs(place.lon) < 1e-6 && Math.abs(place.lat) < 1e-6) throw fieldError('x', 'well/at-zero')
  const box = [west - margin, south - margin, east + margin, north + margin] as const
  if (confirmed || inBox(place, box)) return
  const slip = likelySlip(place, [west, south, east, north])
  if (slip) {
    const code = slip.code === 'place/swapped' ? 'well/swapped' : 'well/sign'
    throw fieldError('x', code, { lat: degrees(slip.lat), lon: degrees(slip.lon) })
  }
  const middle = { lon: (west + east) / 2, lat: (south + north) / 2 }
  const corner = geodesicDistance(middle, { lon: east, lat: north })
  const distanceKm = Math.max(1, Math.round((geodesicDistance(middle, place) - corner) / 1000))
  throw fieldError('x', 'well/outside-region', { distanceKm })
}

/** Where a well stands, with what its coordinates were made from; a datum shift adds its own error to the position's. */
export function wellPosition(input: WellInput, region: Region) {
  const { lon, lat, accuracy_m, operation } = converted(input)
  checkPlace({ lon, lat }, region, input.confirmOutside)
  return {
    position: [lon, lat] as Position,
    ...mercatorInts(lon, lat),
    originalX: input.x,
    originalY: input.y,
    originalEpsg: input.epsg,
    positionOperation: operation.slice(0, 200),
    positionAccuracyM: Math.hypot(input.positionAccuracyM, accuracy_m),
  }
}
