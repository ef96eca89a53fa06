import type { ParameterEstimate } from '#shared/hydraulics/analysis.ts'

/** Intervals wider than these factors leave fewer figures worth reading. */
const WIDE = 2
const VERY_WIDE = 10

/** Significant figures that an estimate deserves: three at most, fewer where its interval is wide. */
export function figuresOf({ low, high }: Pick<ParameterEstimate, 'low' | 'high'>): number {
  const factor = high / low
  if (!(factor < VERY_WIDE)) return 1
  return factor < WIDE ? 3 : 2
}
