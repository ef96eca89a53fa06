import type { AnyInputs } from '#shared/hydraulics/any-kind.ts'
import type { AppliedCorrection } from '#shared/hydraulics/corrections/correction.ts'

export interface AppliedToWell {
  wellId: string
  corrections: AppliedCorrection[]
}

/** Corrections frozen in the inputs of an analysis, by well; tests that have no such readings have none. */
export function appliedCorrections(inputs: AnyInputs): AppliedToWell[] {
  const series = 'series' in inputs ? inputs.series : 'well' in inputs ? [inputs.well] : []
  return series.flatMap(({ wellId, corrections = [] }) => (corrections.length > 0 ? [{ wellId, corrections }] : []))
}
