import { digestOf, type Digest, type Digested } from '../../api/analyses/digest.ts'
import { unpackJson } from '../../db/packed-json.ts'

export interface DigestInput extends Digested {
  packedInputs: Uint8Array
}

/** Takes from a packed snapshot what the view of its analysis shows, away from the main thread. */
export const digestAnalysisTask = async ({ packedInputs, ...analysis }: DigestInput): Promise<Digest> =>
  digestOf(analysis, await unpackJson(packedInputs))
