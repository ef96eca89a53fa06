import { createHash } from 'node:crypto'
import { createCache } from '../../cache.ts'
import type { Executor } from '../../db/client.ts'
import { unpackJson } from '../../db/packed-json.ts'
import type { DigestInput } from '../../jobs/tasks/digest-analysis.ts'
import type { Workers } from '../../jobs/workers.ts'
import type { AnalysisRow } from './analyses.repository.ts'
import { digestOf, type Digest } from './digest.ts'
import { readPackedInputs } from './packed-inputs.repository.ts'

/** Some 10,000 readings: unpacking more would hold up other requests for longer than handing it to a thread costs. */
const longBytes = 100_000
const mostKept = 500

/** By everything that a digest is made from: a change that a transaction takes back leaves nothing wrong behind. */
function keyOf({ id, rowVersion, inputsSha256, method, options, result }: AnalysisRow): string {
  const made = JSON.stringify([id, rowVersion, inputsSha256, method, options, result])
  return createHash('sha256').update(made).digest('hex')
}

/** Digests of analyses, each made once for as long as its analysis stays as it is. */
export function createDigests(workers: Workers) {
  const keep = createCache<Digest>(mostKept)

  async function make(executor: Executor, { id, method, options, result }: AnalysisRow): Promise<Digest> {
    const packedInputs = await readPackedInputs(executor, id)
    const digested = { method, options, result }
    if (packedInputs.length < longBytes) return digestOf(digested, await unpackJson(packedInputs))
    return workers.run<Digest>('digest-analysis', { ...digested, packedInputs } satisfies DigestInput)
  }

  return (executor: Executor, row: AnalysisRow): Promise<Digest> => keep(keyOf(row), () => make(executor, row))
}
