import { createHash } from 'node:crypto'
import type { Analysed, AnalysedAndPacked, AnalyseInput, RepeatInput } from '../../../jobs/tasks/analyse.ts'
import type { Workers } from '../../../jobs/workers.ts'
import { packJson, unpackJson } from '../../packed-json.ts'

/** What the server keeps beside the inputs, and no method calculates with. */
const settingOf = 'setting'

/** The same calculation has the same key, whoever asks for it. */
function keyOf({ inputs, method, options }: AnalyseInput): string {
  const text = JSON.stringify([method, options, inputs], (key, value: unknown) =>
    key === settingOf ? undefined : value,
  )
  return createHash('sha256').update(text).digest('base64')
}

/**
 * Worker threads for whoever enters many tests. Each analysis is asked for three times, as the page, the server and the
 * reviewer calculate it; one calculation answers all of them.
 */
export function calculatingOnce(workers: Workers): Workers {
  const known = new Map<string, Promise<Analysed>>()

  function once(input: AnalyseInput, signal?: AbortSignal): Promise<Analysed> {
    const key = keyOf(input)
    const found = known.get(key) ?? workers.run<AnalysedAndPacked>('analyse', input, signal)
    known.set(key, found)
    return found
  }

  async function analyse(input: AnalyseInput, signal?: AbortSignal): Promise<AnalysedAndPacked> {
    const outcome = await once(input, signal)
    return outcome.ok ? { ...outcome, packedInputs: packJson(input.inputs) } : outcome
  }

  async function repeat({ packedInputs, method, options }: RepeatInput, signal?: AbortSignal): Promise<Analysed> {
    const inputs = (await unpackJson(packedInputs)) as AnalyseInput['inputs']
    return once({ inputs, method, options: options as AnalyseInput['options'] }, signal)
  }

  const own: Record<string, ((input: never, signal?: AbortSignal) => Promise<unknown>) | undefined> = {
    analyse,
    'repeat-analysis': repeat,
  }
  return {
    run: async <Output>(name: string, input: unknown, signal?: AbortSignal) =>
      (await (own[name]?.(input as never, signal) ?? workers.run(name, input, signal))) as Output,
    close: workers.close,
  }
}
