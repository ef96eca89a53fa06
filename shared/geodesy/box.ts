import type { Box, LonLat } from './types.ts'

/** A longitude in [−180, 180). */
export const wrapLongitude = (lon: number): number => ((((lon + 180) % 360) + 360) % 360) - 180

const widthOf = ([west, , east]: Box): number => (((east - west) % 360) + 360) % 360 || 360

export function inBox({ lon, lat }: LonLat, box: Box): boolean {
  const [west, south, , north] = box
  const eastward = (((lon - west) % 360) + 360) % 360
  return eastward <= widthOf(box) && lat >= south && lat <= north
}

/** The box with each side moved out by half its own size, by `most` degrees at most. */
export function widenBox(box: Box, most: number): Box {
  const [west, south, east, north] = box
  const aside = Math.min(most, widthOf(box) / 2)
  const along = Math.min(most, (north - south) / 2)
  const wholeWorld = widthOf(box) + 2 * aside >= 360
  const [newWest, newEast] = wholeWorld ? [-180, 180] : [wrapLongitude(west - aside), wrapLongitude(east + aside)]
  return [newWest, Math.max(-90, south - along), newEast, Math.min(90, north + along)]
}
