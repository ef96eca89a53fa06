import type { Finding } from '../analysis.ts'
import type { OutsideQuantity } from './kinds.ts'

interface Range {
  lowest: number
  highest: number
}

/** What the values of a series cannot be, in SI. */
export type OutsideRefusal = 'constant' | 'pressure-swing' | 'pressure-high' | 'stage-swing'

/** Sea-level records are 870 and 1085 hPa; nowhere does pressure move by more than about 100 hPa (common practice). */
const LARGEST_PRESSURE_SWING_PA = 15e3
const HIGHEST_PRESSURE_PA = 115e3
/** At 5 500 m air weighs half (common practice). Lower values are differences from a mean, or another unit. */
const LOWEST_PRESSURE_PA = 50e3
const LARGEST_STAGE_SWING_M = 30

/** Why a series cannot be what it is said to be; null where it may. */
export function outsideRefusal(quantity: OutsideQuantity, { lowest, highest }: Range): OutsideRefusal | null {
  const swing = highest - lowest
  if (!(swing > 0)) return 'constant'
  if (quantity !== 'air-pressure') return swing > LARGEST_STAGE_SWING_M ? 'stage-swing' : null
  if (swing > LARGEST_PRESSURE_SWING_PA) return 'pressure-swing'
  return highest > HIGHEST_PRESSURE_PA ? 'pressure-high' : null
}

/** What is to be borne in mind about a series that was taken. */
export function outsideFindings(quantity: OutsideQuantity, { lowest, highest }: Range): Finding[] {
  return quantity === 'air-pressure' && lowest < LOWEST_PRESSURE_PA
    ? [{ code: 'pressure-low', severity: 'caution', params: { lowest, highest, limit: LOWEST_PRESSURE_PA } }]
    : []
}
