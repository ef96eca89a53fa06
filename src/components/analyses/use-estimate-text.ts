import type { OtherEstimate } from '#shared/hydraulics/analysis.ts'
import type { Dimension } from '#shared/quantities/units.ts'
import { useUnits } from '../../composables/useUnits.ts'
import { figuresOf, isWritable } from './estimate-figures.ts'

type Estimate = Omit<OtherEstimate, 'id'>

/** Values and their 95 % intervals in the reader's units, with the figures that the interval leaves. */
export function useEstimateText() {
  const units = useUnits()

  const value = (estimate: Estimate, dimension: Dimension) =>
    units.quantity(estimate.value, dimension, { figures: figuresOf(estimate) })

  /** The interval, or that the readings leave the quantity open. */
  function spread(estimate: Estimate, dimension: Dimension): string {
    const format = { figures: figuresOf(estimate) }
    const [low, high] = [estimate.low, estimate.high].map((end) => units.number(end, dimension, format))
    if (estimate.determined) return `${low} to ${high}`
    return isWritable(estimate) ? `not determined: ${low} to ${high}` : 'not determined'
  }

  return { value, spread }
}
