import type { OtherEstimate } from '#shared/hydraulics/analysis.ts'

/** Intervals wider than these factors leave fewer figures worth reading. */
const WIDE = 2
const VERY_WIDE = 10
/** An interval over more than this factor says nothing, and is not written. */
const ENDLESS = 1e6
const MOST_FIGURES = 3

type Spread = Pick<OtherEstimate, 'low' | 'high'>

/**
 * Significant figures that an estimate deserves: three at most, fewer where its interval is wide. Where the interval
 * reaches zero or below, as that of a skin may, its half-width decides the last digit.
 */
export function figuresOf({ low, high }: Spread): number {
  if (low < 0) return figuresOfWidth((low + high) / 2, (high - low) / 2)
  const factor = high / low
  if (!(factor < VERY_WIDE)) return 1
  return factor < WIDE ? MOST_FIGURES : 2
}

function figuresOfWidth(value: number, half: number): number {
  const figures = Math.floor(Math.log10(Math.abs(value))) - Math.floor(Math.log10(half)) + 1
  return Number.isFinite(figures) ? Math.max(1, Math.min(MOST_FIGURES, figures)) : 1
}

/** Whether an interval is narrow enough to be written at all. */
export const isWritable = ({ low, high }: Spread): boolean => (low > 0 ? high / low < ENDLESS : high - low < ENDLESS)
