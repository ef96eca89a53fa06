import type { AnalysisOptions, ChosenBoundary } from '#shared/hydraulics/analysis.ts'
import { methods } from '#shared/hydraulics/catalogue.ts'
import type { Unknown } from '#shared/hydraulics/method.ts'
import { rateFactorWell } from '#shared/hydraulics/other-wells.ts'
import type { Dimension } from '#shared/quantities/units.ts'

/** A quantity that an analysis found beside T and the storage it reports, as screens and reports name it. */
export interface FoundQuantity {
  symbol: string
  name: string
  dimension: Dimension
}

const symbols: Record<string, string> = { r_beta: 'r/β', Kz_Kr: 'Kz/Kr', anisotropy: 'Kz/Kr' }
const dimensions: Record<Unknown['dimension'], Dimension> = {
  transmissivity: 'transmissivity',
  conductivity: 'conductivity',
  length: 'length',
  time: 'time',
  dimensionless: 'storage',
}
const edges: Record<ChosenBoundary['kind'], Pick<FoundQuantity, 'symbol' | 'name'>> = {
  recharge: { symbol: 'stream', name: 'Distance to the stream' },
  barrier: { symbol: 'barrier', name: 'Distance to the barrier' },
}

/** @throws RangeError for a quantity that the method does not find */
export function foundQuantity(
  method: keyof typeof methods,
  id: string,
  { boundaries = [] }: Pick<AnalysisOptions, 'boundaries'>,
): FoundQuantity {
  const unknown = methods[method].unknowns.find((candidate) => candidate.id === id)
  if (unknown) return { symbol: symbols[id] ?? id, name: unknown.label, dimension: dimensions[unknown.dimension] }
  const other = rateFactorWell(id)
  if (other !== null) return { symbol: 'f', name: `Factor on the rates of ${other}`, dimension: 'storage' }
  const boundary = boundaries[Number(/^boundary_(\d+)$/.exec(id)?.[1]) - 1]
  if (!boundary) throw new RangeError(`${method} does not find ${id}`)
  return { ...edges[boundary.kind], dimension: 'length' }
}
