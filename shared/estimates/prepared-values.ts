import { convexHull } from '#shared/geostatistics/hull.ts'
import { createNeighbourhood, type Neighbourhood } from '#shared/geostatistics/neighbourhood.ts'
import { extent, type Polyline } from '#shared/geostatistics/planar.ts'
import { independentSites } from './independent-sites.ts'
import { selectValues } from './select-values.ts'
import type { Exclusion, Quantity, SiteValue, UsedValue } from './types.ts'

/** Values of one unit, quantity and scope, selected and indexed once for any number of places. */
export interface PreparedValues {
  readonly quantity: Quantity
  readonly used: readonly UsedValue[]
  readonly excluded: readonly Exclusion[]
  readonly neighbourhood: Neighbourhood
  /** Worked out when first asked for. */
  readonly sites: () => readonly UsedValue[]
  readonly hull: () => Polyline
  /** Diagonal of the rectangle around the values, metres. */
  readonly extent_m: () => number
}

function once<V>(make: () => V): () => V {
  let made: { value: V } | null = null
  return () => (made ??= { value: make() }).value
}

/** Selects by the data rules and builds the spatial index. Keep it as long as the values stay the same. */
export function prepareValues(values: readonly SiteValue[], quantity: Quantity): PreparedValues {
  const { used, excluded } = selectValues(values, quantity)
  return {
    quantity,
    used,
    excluded,
    neighbourhood: createNeighbourhood(used),
    sites: once(() => independentSites(used)),
    hull: once(() => convexHull(used)),
    extent_m: once(() => extent(used)),
  }
}
