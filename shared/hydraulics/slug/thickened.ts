import { conductivityEstimate } from '../parameter-estimate.ts'
import type { ParameterEstimate } from '../analysis.ts'

/** T = K·b with the errors of both; null where b is not known. A slug test gives K: T is derived from it. */
export function thickened(
  K: ParameterEstimate,
  { thickness_m, thicknessError }: { thickness_m: number | null; thicknessError: number },
): ParameterEstimate | null {
  return thickness_m !== null && thickness_m > 0 ? conductivityEstimate(K, 1 / thickness_m, thicknessError) : null
}
