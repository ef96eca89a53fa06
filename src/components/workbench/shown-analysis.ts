import type { AnyResult } from '#shared/hydraulics/any-kind.ts'
import type { Work } from './work.ts'

/** An analysis as its card shows it: the kept one, or the open one as it is now. */
export interface ShownAnalysis extends Omit<Work, 'rowVersion'> {
  result: AnyResult | null
}
