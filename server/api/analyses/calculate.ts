import { fittedMethod, type AnalysisInput } from '#shared/contracts/analyses.ts'
import { analysisInputs, analysisOptions, analysisResult } from '#shared/contracts/analysis-result.ts'
import { AnalysisError, type AnalysisInputs, type AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { defaultUnitSystemId, unitSystemById } from '#shared/quantities/systems.ts'
import { analysisErrorText } from '#shared/words/findings.ts'
import { AppError } from '../../errors.ts'
import type { AnalysisRow } from './analyses.repository.ts'

/** Relative difference between browser and server beyond which nothing is stored. */
const tolerance = 1e-6

/** @throws AppError with the method's own sentence when it refuses the inputs. */
export function calculate(
  inputs: AnalysisInputs,
  { method, options }: Pick<AnalysisInput, 'method' | 'options'>,
): AnalysisResult {
  try {
    const result = analyse(method, inputs, options)
    if (analysisResult.safeParse(result).success) return result
  } catch (error) {
    if (!(error instanceof AnalysisError)) throw error
    throw new AppError('analysis/refused', {
      reason: analysisErrorText(error.code, error.params, unitSystemById(defaultUnitSystemId)),
      code: error.code,
    })
  }
  // Readings far from anything a well can do: numbers that overflow are no result, and could not be stored.
  throw new AppError('analysis/not-finite')
}

const differs = (a: number | null, b: number | null) =>
  a === null || b === null ? a !== b : !(Math.abs(a - b) <= tolerance * Math.abs(b))

/**
 * The server stores its own result only, and only when the page showed the same.
 * @throws AppError when the page calculated with another version of the method, or to another number.
 */
export function checkExpected(result: AnalysisResult, expected: AnalysisInput['expected']): void {
  if (expected.methodVersion !== result.methodVersion) throw new AppError('analysis/method-version')
  if (differs(expected.T, result.T?.value ?? null))
    throw new AppError('analysis/result-differs', { quantity: 'transmissivity' })
  if (differs(expected.S, result.S?.value ?? null))
    throw new AppError('analysis/result-differs', { quantity: 'storativity' })
}

/**
 * Repeats a stored analysis from its own snapshot. A reported value has nothing to repeat.
 * @throws AppError when another version of the method, or another number, comes out.
 */
export function checkRepeats({
  method,
  inputs,
  options,
  result,
}: Pick<AnalysisRow, 'method' | 'inputs' | 'options' | 'result'>): void {
  const stored = analysisResult.parse(result)
  if (method === 'reported') return
  const again = calculate(analysisInputs.parse(inputs), {
    method: fittedMethod.parse(method),
    options: analysisOptions.parse(options),
  })
  const { methodVersion, T, S } = stored
  checkExpected(again, { methodVersion, T: T?.value ?? null, S: S?.value ?? null })
}
