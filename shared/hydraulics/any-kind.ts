import { AnalysisError } from './analysis-error.ts'
import type { AnalysisResult, FittedCurve } from './analysis.ts'
import { analyse, type MethodId } from './catalogue.ts'
import {
  analyseKind,
  kindCurve,
  methodIdsOf,
  ownKinds,
  type KindId,
  type KindResult,
  type KindShapes,
  type OwnKindId,
} from './kinds.ts'
import type { KindMethod } from './kind.ts'

export type { KindId, OwnKindId }
export type AnyInputs = KindShapes[KindId]['inputs']
export type AnyOptions = KindShapes[KindId]['options']
export type OwnInputs = KindShapes[OwnKindId]['inputs']
export type OwnOptions = KindShapes[OwnKindId]['options']
export type OwnMethod = KindMethod<OwnInputs, OwnOptions>
export type AnyResult = AnalysisResult | KindResult

export const ownKindIds = Object.keys(ownKinds) as OwnKindId[]

export const isOwnKind = (kind: string): kind is OwnKindId => Object.hasOwn(ownKinds, kind)

/** The kind of test that a method belongs to. */
export const kindOfMethod = (method: string): KindId =>
  ownKindIds.find((kind) => methodIdsOf(kind).includes(method)) ?? 'constant-rate'

/** Methods of a kind of its own, for menus and forms. */
export const methodsOf = (kind: OwnKindId) => ownKinds[kind].methods as unknown as Readonly<Record<string, OwnMethod>>

/**
 * Analyses a test of any kind; the method tells which.
 * @throws AnalysisError for an unknown method, and for inputs the method refuses
 */
export function analyseAny(method: string, inputs: AnyInputs, options: AnyOptions): AnyResult {
  const kind = kindOfMethod(method)
  return kind === 'constant-rate'
    ? analyse(
        method as MethodId,
        inputs as KindShapes['constant-rate']['inputs'],
        options as KindShapes['constant-rate']['options'],
      )
    : analyseOwn(kind, method, inputs as OwnInputs, options as OwnOptions)
}

/** `analyseKind` for inputs and options that only their kind tells apart. */
export const analyseOwn = (kind: OwnKindId, method: string, inputs: OwnInputs, options: OwnOptions): KindResult =>
  analyseKind(kind, method, inputs as never, options as never)

/** `kindCurve` for inputs and options that only their kind tells apart; nothing where the method has no curve on them. */
export function curveOwn(
  kind: OwnKindId,
  analysed: { method: string; inputs: OwnInputs; options: OwnOptions; result: KindResult },
  times_s: number[],
): FittedCurve[] {
  const { method, inputs, options, result } = analysed
  try {
    return kindCurve(kind, method, inputs as never, options as never, result, times_s)
  } catch (error) {
    // A kept analysis of inputs that have changed since may have no curve on the present ones; its numbers stand.
    if (error instanceof AnalysisError || error instanceof RangeError) return []
    throw error
  }
}
