import type { Solution } from '#shared/hydraulics/solution.ts'
import { leaky } from '#shared/hydraulics/solutions/leaky.ts'
import { unconfined } from '#shared/hydraulics/solutions/unconfined.ts'
import { theis } from '#shared/hydraulics/theis.ts'
import type { AquiferCode } from '../fields/models.ts'
import type { Draws } from '../random.ts'
import type { Design } from './test-design.ts'

type Answer = Pick<Solution, 'respond' | 'unknowns'>

/** How the ground under a test answers to pumping. */
export interface Ground {
  /** What the readings are made with. */
  real: { solution: Answer; parameters: number[] }
  /** The confined curve that early or late readings follow: T and all storage that has come into play by then. */
  plain: { solution: Answer; parameters: number[] }
}

type Laid = Pick<Design, 'T' | 'storage'>

const logUniform = (stream: Draws, low: number, high: number) => low * (high / low) ** stream.uniform()

/** Elastic storage of the gravels, and how much tighter they are upwards than sideways. */
function gravels({ T, storage }: Laid, stream: Draws): Ground {
  const elastic = logUniform(stream, 3e-4, 2e-3)
  const anisotropy = stream.uniform(0.25, 0.7)
  return {
    real: { solution: unconfined, parameters: [T, elastic, storage, anisotropy] },
    plain: { solution: theis, parameters: [T, elastic + storage] },
  }
}

/** The clay over the limestone lets water through: 1e-8/s is 10 m of it at 1e-7 m/s. */
function limestone({ T, storage }: Laid, stream: Draws): Ground {
  const leakance = logUniform(stream, 2e-9, 1e-8)
  return {
    real: { solution: leaky, parameters: [T, storage, Math.sqrt(T / leakance)] },
    plain: { solution: theis, parameters: [T, storage] },
  }
}

function sandstone({ T, storage }: Laid): Ground {
  const plain = { solution: theis, parameters: [T, storage] }
  return { real: plain, plain }
}

const kinds: Record<AquiferCode, (laid: Laid, stream: Draws) => Ground> = {
  TG: gravels,
  FL: limestone,
  BS: sandstone,
}

export const groundUnder = (design: Pick<Design, 'unit' | 'T' | 'storage'>, stream: Draws): Ground =>
  kinds[design.unit](design, stream)
