import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import { analyseAny, type AnyInputs, type AnyOptions, type AnyResult } from '#shared/hydraulics/any-kind.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import { analysisErrorText } from '#shared/words/findings.ts'

/** What a calculation gave: a result, or why there is none. */
export type Outcome<R extends AnyResult = AnyResult> = { result: R } | { error: AnalysisError }

export function outcomeOf(method: string, inputs: AnyInputs, options: AnyOptions): Outcome {
  try {
    return { result: analyseAny(method, inputs, options) }
  } catch (error) {
    if (error instanceof AnalysisError) return { error }
    // Readings far from anything a well can do: the page says so and stays usable.
    if (error instanceof RangeError) return { error: new AnalysisError('analysis/no-fit') }
    throw error
  }
}

export const resultOf = <R extends AnyResult>(outcome: Outcome<R> | null): R | null =>
  outcome && 'result' in outcome ? outcome.result : null

export const refusalText = (outcome: Outcome | null, units: UnitSystem): string =>
  outcome && 'error' in outcome ? analysisErrorText(outcome.error.code, outcome.error.params, units) : ''
