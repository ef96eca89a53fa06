import type { AnalysisInput } from '#shared/contracts/analyses.ts'
import { analysisResult, type StoredResult } from '#shared/contracts/analysis-result.ts'
import type { AnyInputs, AnyResult } from '#shared/hydraulics/any-kind.ts'
import { defaultUnitSystemId, unitSystemById } from '#shared/quantities/systems.ts'
import { analysisErrorText } from '#shared/words/findings.ts'
import { AppError } from '../../errors.ts'
import type {
  Analysed,
  AnalysedAndPacked,
  AnalyseInput,
  AnalysisRefusal,
  RepeatInput,
} from '../../jobs/tasks/analyse.ts'
import { isOutOfMemory, type Workers } from '../../jobs/workers.ts'
import type { AnalysisRow } from './analyses.repository.ts'
import type { Setting } from './setting.ts'

/** Relative difference between browser and server beyond which nothing is stored. */
const tolerance = 1e-6

/** Ten times what the longest log that may be uploaded takes on a slow computer; with the time it waits for a thread. */
const mostSeconds = 120

/** @throws AppError where the calculation takes more time or memory than one request may have. */
async function onThread<Outcome>(
  workers: Workers,
  name: string,
  input: AnalyseInput | RepeatInput,
  seconds: number,
): Promise<Outcome> {
  const signal = AbortSignal.timeout(seconds * 1000)
  try {
    return await workers.run<Outcome>(name, input, signal)
  } catch (error) {
    if (signal.aborted) throw new AppError('analysis/too-long', { seconds })
    if (isOutOfMemory(error)) throw new AppError('analysis/too-much-memory')
    throw error
  }
}

const refusal = ({ code, params }: AnalysisRefusal) =>
  new AppError('analysis/refused', {
    reason: analysisErrorText(code, params, unitSystemById(defaultUnitSystemId)),
    code,
  })

/** Readings far from anything a well can do: numbers that overflow are no result, and could not be stored. */
function checkFinite(result: AnyResult): AnyResult {
  if (!analysisResult.safeParse(result).success) throw new AppError('analysis/not-finite')
  return result
}

/**
 * Calculates on a worker thread, never inside a transaction: a long log takes many seconds.
 * @returns the result, and the inputs with their setting, packed to be kept.
 * @throws AppError with the method's own sentence when it refuses the inputs.
 */
export async function calculate(
  workers: Workers,
  inputs: AnyInputs & { setting: Setting },
  { method, options }: Pick<AnalysisInput, 'method' | 'options'>,
  seconds = mostSeconds,
): Promise<{ result: AnyResult; packedInputs: Uint8Array }> {
  const outcome = await onThread<AnalysedAndPacked>(workers, 'analyse', { inputs, method, options }, seconds)
  if (!outcome.ok) throw refusal(outcome)
  return { result: checkFinite(outcome.result), packedInputs: outcome.packedInputs }
}

const differs = (a: number | null, b: number | null) =>
  a === null || b === null ? a !== b : !(Math.abs(a - b) <= tolerance * Math.abs(b))

/** What a page tells of a result, or a stored result of itself. */
const expectedOf = ({ methodVersion, T, S, K, others = [] }: StoredResult): AnalysisInput['expected'] => ({
  methodVersion,
  T: T?.value ?? null,
  S: S?.value ?? null,
  K: K?.value ?? null,
  others: Object.fromEntries(others.map(({ id, value }) => [id, value])),
})

/**
 * The server stores its own result only, and only when the page showed the same.
 * @throws AppError when the page calculated with another version of the method, or to another number.
 */
export function checkExpected(result: AnyResult, expected: AnalysisInput['expected']): void {
  if (expected.methodVersion !== result.methodVersion) throw new AppError('analysis/method-version')
  if (differs(expected.T, result.T?.value ?? null))
    throw new AppError('analysis/result-differs', { quantity: 'transmissivity' })
  if (differs(expected.S, result.S?.value ?? null))
    throw new AppError('analysis/result-differs', { quantity: 'storativity' })
  if (expected.K !== undefined && differs(expected.K, result.K?.value ?? null))
    throw new AppError('analysis/result-differs', { quantity: 'hydraulic conductivity' })
  const others = new Map(result.others?.map(({ id, value }) => [id, value]))
  for (const [id, value] of Object.entries(expected.others ?? {})) {
    if (differs(value, others.get(id) ?? null)) throw new AppError('analysis/result-differs', { quantity: id })
  }
}

/**
 * Repeats a stored analysis from its own snapshot, on a worker thread. A reported value has nothing to repeat.
 * @throws AppError when another version of the method, or another number, comes out.
 */
export async function checkRepeats(
  workers: Workers,
  { method, options, result }: Pick<AnalysisRow, 'method' | 'options' | 'result'>,
  packedInputs: Uint8Array,
  seconds = mostSeconds,
): Promise<void> {
  const before = analysisResult.parse(result)
  if (method === 'reported') return
  const again = await onThread<Analysed>(workers, 'repeat-analysis', { packedInputs, method, options }, seconds)
  if (!again.ok) throw refusal(again)
  checkExpected(checkFinite(again.result), expectedOf(before))
}
