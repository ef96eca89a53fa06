import type { AnalysisInputs, AnalysisOptions } from './analysis.ts'
import { AnalysisError } from './analysis-error.ts'
import type { FittedCurve, MethodOutcome, ParameterEstimate } from './analysis.ts'
import { methods } from './catalogue.ts'
import type { Kind, KindMethod, KindOutcome } from './kind.ts'
import { limitFindings } from './limits.ts'
import { specificCapacityTests } from './specific-capacity/specific-capacity-method.ts'
import type { SpecificCapacityInputs, SpecificCapacityOptions } from './specific-capacity/specific-capacity-test.ts'
import { slugTests } from './slug/slug-kind.ts'
import type { SlugInputs, SlugOptions } from './slug/slug-test.ts'
import { stepTests } from './step/step-method.ts'
import type { StepInputs, StepOptions } from './step/step-test.ts'

/** What each kind of test brings, and what may be chosen in analysing it. */
export interface KindShapes {
  'constant-rate': { inputs: AnalysisInputs; options: AnalysisOptions }
  step: { inputs: StepInputs; options: StepOptions }
  slug: { inputs: SlugInputs; options: SlugOptions }
  'specific-capacity': { inputs: SpecificCapacityInputs; options: SpecificCapacityOptions }
}
export type KindId = keyof KindShapes

/** Kinds of test that have a catalogue of their own; tests at a constant rate have `methods`. */
export const ownKinds = {
  step: stepTests,
  slug: slugTests,
  'specific-capacity': specificCapacityTests,
} as const satisfies {
  [Id in Exclude<KindId, 'constant-rate'>]: Kind<KindShapes[Id]['inputs'], KindShapes[Id]['options']>
}
export type OwnKindId = keyof typeof ownKinds

export const kindLabels: Record<KindId, string> = {
  'constant-rate': 'Pumping test',
  step: stepTests.label,
  slug: slugTests.label,
  'specific-capacity': specificCapacityTests.label,
}

/** A method as words need to know it. */
type Described = Pick<KindMethod<never, never>, 'id' | 'label' | 'unknowns'>

/** Methods of all kinds of their own. */
export const kindMethods: readonly Described[] = Object.values(ownKinds).flatMap((kind): Described[] =>
  Object.values(kind.methods),
)

/** Methods of each kind by id, for requests and menus. */
export const methodIdsOf = (kind: KindId): string[] =>
  Object.keys(kind === 'constant-rate' ? methods : ownKinds[kind].methods)

/** Result of an analysis of any kind, of the shape of `AnalysisResult` and stored as such. */
export interface KindResult extends MethodOutcome {
  version: 1
  method: string
  methodVersion: number
  K: ParameterEstimate | null
}

/**
 * Analyses a test of a kind of its own.
 * @throws AnalysisError for an unknown method, and for inputs the method refuses
 */
export function analyseKind<Id extends OwnKindId>(
  kind: Id,
  methodId: string,
  inputs: KindShapes[Id]['inputs'],
  options: KindShapes[Id]['options'],
): KindResult {
  const method = kindMethod(kind, methodId)
  const outcome = method.run(inputs, options)
  const values = { T: outcome.T?.value ?? null, S: outcome.S?.value ?? null, storageClass: outcome.storageClass }
  return {
    version: 1,
    method: methodId,
    methodVersion: method.version,
    ...outcome,
    K: outcome.K ?? null,
    findings: [...limitFindings(values), ...outcome.findings],
  }
}

/** Fitted model of a test of a kind of its own. */
export function kindCurve<Id extends OwnKindId>(
  kind: Id,
  methodId: string,
  inputs: KindShapes[Id]['inputs'],
  options: KindShapes[Id]['options'],
  result: KindOutcome,
  times_s: number[],
): FittedCurve[] {
  return kindMethod(kind, methodId).curve(inputs, options, result, times_s)
}

function kindMethod<Id extends OwnKindId>(
  kind: Id,
  id: string,
): KindMethod<KindShapes[Id]['inputs'], KindShapes[Id]['options']> {
  const { methods: found } = ownKinds[kind] as unknown as Kind<KindShapes[Id]['inputs'], KindShapes[Id]['options']>
  const method = Object.hasOwn(found, id) ? found[id] : undefined
  if (!method) throw new AnalysisError('analysis/unknown-method', { method: id })
  return method
}
