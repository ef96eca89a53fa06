import { AnalysisError } from '../analysis-error.ts'
import type { Finding } from '../analysis.ts'
import { effectiveCasingRadius, intakeRadius, levelInScreen, wettedLength } from './effective-radius.ts'
import { lineMethod } from './line-method.ts'
import type { SlugInputs } from './slug-test.ts'

/**
 * Curves A, B and C as polynomials of Le/rw, lowest power first. Source: van Rooy 1988, as cited after Butler 1998. The
 * first constant of C circulates as 0.7290 too, two digits exchanged; K for full penetration differs by about 0.6 %.
 */
const CURVES = {
  A: [1.472, 3.537e-2, -8.148e-5, 1.028e-7, -6.484e-11, 1.573e-14],
  B: [0.2372, 5.151e-3, -2.682e-6, -3.491e-10, 4.738e-13],
  C: [0.792, 3.993e-2, -5.743e-5, 3.858e-8, -9.659e-12],
}
/** Le/rw for which the curves were drawn (Bouwer & Rice 1976, figure 3, from memory). */
const RATIO_RANGE = { low: 4, high: 1500 }
/** Above this the logarithm of the distance to the base no longer counts. Source: Bouwer & Rice 1976. */
const LARGEST_LOG = 6
/** A screen that ends within this share of the thickness from the base penetrates fully. */
const FULL_PENETRATION = 1e-6

export function curveValue(curve: keyof typeof CURVES, ratio: number): number {
  return CURVES[curve].reduceRight((sum, coefficient) => sum * ratio + coefficient, 0)
}

/** The well as the method sees it: Le open length, Lw depth of its bottom below the water table, H thickness. */
export interface BouwerRiceWell {
  length_m: number
  depth_m: number
  thickness_m: number
  radius_m: number
}

/**
 * ln(Re/rw), Re the distance at which the displacement is dissipated.
 * @throws RangeError when the screen reaches below the aquifer, or is no deeper than its radius
 * Source: Bouwer & Rice 1976; Bouwer 1989; ASTM D5912.
 */
export function dissipationLog({ length_m, depth_m, thickness_m, radius_m }: BouwerRiceWell): number {
  if (!(depth_m > radius_m)) throw new RangeError('The screen ends at the water table')
  if (depth_m > thickness_m * (1 + FULL_PENETRATION)) throw new RangeError('The screen reaches below the aquifer')
  const ratio = length_m / radius_m
  const ofDepth = 1.1 / Math.log(depth_m / radius_m)
  const below = thickness_m - depth_m
  if (below <= FULL_PENETRATION * thickness_m) return 1 / (ofDepth + curveValue('C', ratio) / ratio)
  // Closer to the base than its own radius the well has no way below it, and the logarithm would turn negative.
  const toBase = Math.min(LARGEST_LOG, Math.max(0, Math.log(below / radius_m)))
  return 1 / (ofDepth + (curveValue('A', ratio) + curveValue('B', ratio) * toBase) / ratio)
}

/** K = r_c² ln(Re/rw)/(2 Le) · (1/t) ln(y0/yt). Source: Bouwer & Rice 1976. */
export const bouwerRiceConductivity = (casingRadius_m: number, well: BouwerRiceWell, rate_1_s: number) =>
  ((casingRadius_m ** 2 * dissipationLog(well)) / (2 * well.length_m)) * rate_1_s

function wellOf(inputs: SlugInputs): BouwerRiceWell {
  const { thickness_m } = inputs
  if (thickness_m === null || !(thickness_m > 0)) {
    throw new AnalysisError('analysis/dimension', { dimension: 'thickness_m' })
  }
  return {
    length_m: wettedLength(inputs),
    depth_m: inputs.screenTop_m + inputs.screenLength_m,
    thickness_m,
    // Anisotropy enters as a narrower well (Zlotnik 1994).
    radius_m: intakeRadius(inputs) * Math.sqrt(inputs.anisotropy),
  }
}

function lengthOf(inputs: SlugInputs): number {
  try {
    return bouwerRiceConductivity(effectiveCasingRadius(inputs), wellOf(inputs), 1)
  } catch (error) {
    if (error instanceof RangeError) throw new AnalysisError('analysis/dimension', { dimension: 'screenTop_m' })
    throw error
  }
}

function findings(inputs: SlugInputs): Finding[] {
  const { length_m, radius_m } = wellOf(inputs)
  const ratio = length_m / radius_m
  const found: Finding[] = []
  if (ratio < RATIO_RANGE.low || ratio > RATIO_RANGE.high) {
    found.push({ code: 'screen-ratio', severity: 'caution', params: { ratio, ...RATIO_RANGE } })
  }
  if (inputs.aquifer !== 'unconfined') found.push({ code: 'slug-confined', severity: 'note', params: {} })
  if (levelInScreen(inputs)) {
    const params = { radius_m: effectiveCasingRadius(inputs), casing_m: inputs.casingRadius_m }
    found.push({ code: 'filter-pack-drains', severity: 'note', params })
  }
  return found
}

export const bouwerRice = lineMethod({
  id: 'bouwer-rice',
  label: 'Slug test, unconfined (Bouwer & Rice)',
  version: 1,
  source: 'Bouwer & Rice 1976; Bouwer 1989; curves: van Rooy 1988; ASTM D5912; heads: Butler et al. 1996',
  heads: { from: 0.2, to: 0.3 },
  length: lengthOf,
  options: [],
  findings,
  validity: [
    {
      code: 'double-straight-line',
      statement: 'The line is drawn after the filter pack has drained',
      source: 'Bouwer 1989',
    },
    { code: 'screen-ratio', statement: 'Le/rw lies where the curves were drawn', source: 'Bouwer & Rice 1976' },
    { code: 'depends-on-head', statement: 'K does not depend on the size of the slug', source: 'ASTM D4044' },
  ],
})
