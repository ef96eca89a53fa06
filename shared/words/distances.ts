import { formatNumber, formatQuantity } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'

const KILOMETRE = 1000

/** A distance on the map to two figures: `410 m`, `4.1 km`; a reader of feet gets feet at any distance. */
export function distanceText(metres: number, units: UnitSystem): string {
  if (units.length === 'm' && metres >= KILOMETRE) return `${formatNumber(metres / KILOMETRE, { figures: 2 })} km`
  return formatQuantity(metres, units.length, { figures: metres < 1 ? 1 : 2 })
}
