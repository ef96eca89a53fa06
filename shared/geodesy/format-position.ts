import { formatDecimals } from '#shared/quantities/format.ts'
import { wrapLongitude } from './box.ts'
import type { AxisOrder } from './crs-table.ts'
import type { LonLat, PlanarPoint } from './types.ts'

const degrees = (value: number, decimals: number, [plus, minus]: [string, string]) =>
  `${formatDecimals(Math.abs(value), decimals)}° ${value < 0 ? minus : plus}`

/** `38.4172° S, 21.1840° W`. Four decimals are 11 m at most. */
export function formatLonLat({ lon, lat }: LonLat, decimals = 4): string {
  const east = lon === 180 ? lon : wrapLongitude(lon)
  return `${degrees(lat, decimals, ['N', 'S'])}, ${degrees(east, decimals, ['E', 'W'])}`
}

/** `483 940 E, 5 747 880 N`, with narrow no-break spaces; westing and southing where the system counts so. */
export function formatPlanar({ x, y }: PlanarPoint, axis: AxisOrder = 'en', decimals = 0): string {
  const [across, along] = axis === 'ws' ? ['W', 'S'] : ['E', 'N']
  return `${formatDecimals(x, decimals)} ${across}, ${formatDecimals(y, decimals)} ${along}`
}
