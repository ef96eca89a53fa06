import { curveFamilies } from './curve-families.ts'
import type { Family } from './family.ts'
import { kindFamilies } from './kind-families.ts'
import { lineFamilies } from './line-families.ts'

/** Every family; `dense` as in `curveFamilies`. */
export const families = (dense: boolean): Family[] => [...curveFamilies(dense), ...lineFamilies, ...kindFamilies]
