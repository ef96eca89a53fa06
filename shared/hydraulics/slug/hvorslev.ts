import { AnalysisError } from '../analysis-error.ts'
import type { Finding } from '../analysis.ts'
import { effectiveCasingRadius, intakeRadius, wettedLength } from './effective-radius.ts'
import { lineMethod } from './line-method.ts'
import { hasLength, shapeFactorIds, shapeFactors, type ShapeFactorId } from './shape-factors.ts'
import type { SlugInputs, SlugOptions } from './slug-test.ts'

/** Below this length over radius the intake is no line source (common practice). */
const SHORTEST_SCREEN = 8
const defaultShape: ShapeFactorId = 'screen-in-aquifer'

const shapeOf = ({ shape = defaultShape }: SlugOptions): ShapeFactorId => {
  if (!Object.hasOwn(shapeFactors, shape)) throw new AnalysisError('analysis/bad-option', { option: 'shape' })
  return shape
}

/** K = A/(F·T0), A the area of the casing and T0 the time in which the head falls to 1/e. Source: Hvorslev 1951. */
export const hvorslevConductivity = (area_m2: number, shapeFactor_m: number, lag_s: number) =>
  area_m2 / (shapeFactor_m * lag_s)

function lengthOf(inputs: SlugInputs, options: SlugOptions): number {
  const intake = {
    length_m: wettedLength(inputs),
    radius_m: intakeRadius(inputs),
    stretch: 1 / Math.sqrt(inputs.anisotropy),
  }
  const factor = shapeFactors[shapeOf(options)].factor(intake)
  return hvorslevConductivity(Math.PI * effectiveCasingRadius(inputs) ** 2, factor, 1)
}

function findings(inputs: SlugInputs, options: SlugOptions): Finding[] {
  const ratio = wettedLength(inputs) / intakeRadius(inputs)
  return hasLength(shapeOf(options)) && ratio < SHORTEST_SCREEN
    ? [{ code: 'screen-short', severity: 'caution', params: { ratio, limit: SHORTEST_SCREEN } }]
    : []
}

export const hvorslev = lineMethod({
  id: 'hvorslev',
  label: 'Slug test by shape factor (Hvorslev)',
  version: 1,
  source: 'Hvorslev 1951; heads: Butler et al. 1996',
  heads: { from: 0.15, to: 0.25 },
  length: lengthOf,
  options: [
    { name: 'shape', label: 'Shape of the intake', kind: 'choice', values: shapeFactorIds, default: defaultShape },
  ],
  findings,
  validity: [
    { code: 'heads-curved', statement: 'The logarithm of the head falls in a straight line', source: 'Hvorslev 1951' },
    { code: 'screen-short', statement: 'The screen is at least eight radii long', source: 'common practice' },
    { code: 'depends-on-head', statement: 'K does not depend on the size of the slug', source: 'ASTM D4044' },
  ],
})
