import type { Interval } from '#shared/hydraulics/analysis.ts'
import type { DemoWell } from './types.ts'

/**
 * Part of the saturated gravels that a well is open to at a date, in depths below the water table; null where all of it
 * is, or where the driller kept no log, so that nobody knows.
 */
export function openPart(
  { screens, picks, staticDepthM, measuringPointM }: DemoWell,
  thickness_m: number,
  date: string,
): Interval | null {
  const open = screens.filter(
    ({ validFrom, validTo }) => (validFrom ?? '') <= date && (validTo === null || date < validTo),
  )
  if (open.length === 0 || !picks.some(({ unit }) => unit === 'TG')) return null
  const water = staticDepthM - measuringPointM
  const top_m = Math.max(0, Math.min(...open.map(({ topM }) => topM)) - water)
  const bottom_m = Math.min(thickness_m, Math.max(...open.map(({ bottomM }) => bottomM)) - water)
  return bottom_m > top_m ? { top_m, bottom_m } : null
}
