import { fittedMethod } from '#shared/contracts/analyses.ts'
import { analysisInputs, analysisOptions } from '#shared/contracts/analysis-result.ts'
import {
  AnalysisError,
  type AnalysisInputs,
  type AnalysisOptions,
  type AnalysisResult,
} from '#shared/hydraulics/analysis.ts'
import { analyse, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { packJson, unpackJson } from '../../db/packed-json.ts'

export interface AnalyseInput {
  inputs: AnalysisInputs
  method: MethodId
  options: AnalysisOptions
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

export type Analysed = { ok: true; result: AnalysisResult } | AnalysisRefusal
export type AnalysedAndPacked = { ok: true; result: AnalysisResult; packedInputs: Uint8Array } | AnalysisRefusal

function outcomeOf({ method, inputs, options }: AnalyseInput): Analysed {
  try {
    return { ok: true, result: analyse(method, inputs, options) }
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
    method: fittedMethod.parse(method),
    inputs: analysisInputs.parse(await unpackJson(packedInputs)),
    options: analysisOptions.parse(options),
  })
}
