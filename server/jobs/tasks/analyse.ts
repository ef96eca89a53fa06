import { parseInputs, parseOptions } from '#shared/contracts/kind-analyses.ts'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import { analyseAny, type AnyInputs, type AnyOptions, type AnyResult } from '#shared/hydraulics/any-kind.ts'
import { packJson, unpackJson } from '../../db/packed-json.ts'

export interface AnalyseInput {
  inputs: AnyInputs
  method: string
  options: AnyOptions
}

export interface RepeatInput {
  packedInputs: Uint8Array
  method: string
  options: unknown
}

/** A method's refusal: an error of a class of ours does not survive the way between threads. */
export interface AnalysisRefusal {
  ok: false
  code: AnalysisError['code']
  params: AnalysisError['params']
}

export type Analysed = { ok: true; result: AnyResult } | AnalysisRefusal
export type AnalysedAndPacked = { ok: true; result: AnyResult; packedInputs: Uint8Array } | AnalysisRefusal

function outcomeOf({ method, inputs, options }: AnalyseInput): Analysed {
  try {
    return { ok: true, result: analyseAny(method, inputs, options) }
  } catch (error) {
    if (!(error instanceof AnalysisError)) throw error
    return { ok: false, code: error.code, params: error.params }
  }
}

/** Analyses a snapshot and packs it to be kept, away from the main thread: a long log takes many seconds. */
export function analyseTask(input: AnalyseInput): AnalysedAndPacked {
  const outcome = outcomeOf(input)
  return outcome.ok ? { ...outcome, packedInputs: packJson(input.inputs) } : outcome
}

/** Analyses a packed snapshot once more. */
export async function repeatAnalysisTask({ packedInputs, method, options }: RepeatInput): Promise<Analysed> {
  return outcomeOf({
    method,
    inputs: parseInputs(method, await unpackJson(packedInputs)),
    options: parseOptions(method, options),
  })
}
