import type { OtherEstimate } from '#shared/hydraulics/analysis.ts'
import { formatInterval, formatQuantity } from '#shared/quantities/format.ts'
import { figuresOf, isWritable } from './estimate-figures.ts'

type Estimate = Omit<OtherEstimate, 'id'>

/** A value in a unit, with the figures that its interval leaves. @throws RangeError for an unknown unit */
export const estimateText = (estimate: Estimate, unitId: string): string =>
  formatQuantity(estimate.value, unitId, { figures: figuresOf(estimate) })

/** Its 95 % interval, or that the readings leave the quantity open. @throws RangeError for an unknown unit */
export function estimateInterval(estimate: Estimate, unitId: string): string {
  if (!estimate.determined && !isWritable(estimate)) return 'not determined'
  const interval = formatInterval(estimate.low, estimate.high, unitId, { figures: figuresOf(estimate) })
  return estimate.determined ? interval : `not determined: ${interval}`
}
