import type { MapMarks } from '../../composables/useMap.ts'
import type { LayerId, WellFilter } from '../../stores/map.ts'
import type { OnMap } from './in-view.ts'
import { boundaryNames } from './paint-boundaries.ts'

export type LegendSymbolId =
  | 'firm'
  | 'fair'
  | 'slight'
  | 'none'
  | 'planned'
  | 'cluster'
  | 'cluster-none'
  | 'stream'
  | 'unit'
  | 'barrier'
  | 'coast'
  | 'constant-head'
  | 'place'
  | 'contribution'
  | 'radius'

export interface LegendEntry {
  id: string
  symbol: LegendSymbolId
  name: string
  /** What a click leaves of the wells; null for entries of a layer. */
  filter: WellFilter | null
  /** What a click takes away. */
  layer: LayerId | null
}

type Only = Extract<WellFilter, { kind: 'only' }>['only']

const wellEntries: readonly { only: Only; name: string; symbol: LegendSymbolId }[] = [
  { only: 'firm', name: 'firm', symbol: 'firm' },
  { only: 'fair', name: 'fair', symbol: 'fair' },
  { only: 'slight', name: 'slight', symbol: 'slight' },
  { only: 'none', name: 'no value yet', symbol: 'none' },
]
const clusterEntries: readonly { only: Only; name: string; symbol: LegendSymbolId }[] = [
  { only: 'valued', name: 'wells, arc: with a value', symbol: 'cluster' },
  { only: 'none', name: 'without a value', symbol: 'cluster-none' },
]

const filtering = ({ only, name, symbol }: (typeof wellEntries)[number]): LegendEntry => ({
  id: `well-${symbol}`,
  symbol,
  name,
  filter: { kind: 'only', only },
  layer: null,
})

/** Evidence that is on the map; while a filter hides the rest, all of it, so that one can go from one to the other. */
function singleWells({ wells }: OnMap, filter: WellFilter | null): LegendEntry[] {
  const present = new Set<Only>(wells.map(({ value, evidence }) => (value === null ? 'none' : (evidence ?? 'valued'))))
  const entries = wellEntries.filter(({ only }) => filter !== null || present.has(only)).map(filtering)
  const planned = wells.some(({ kind, value }) => kind === 'planned' && value === null)
  const diamond = { id: 'planned', symbol: 'planned', name: 'planned', filter: null, layer: 'wells' } as const
  return planned ? [...entries, diamond] : entries
}

const of = (layer: LayerId, symbol: LegendSymbolId, name: string): LegendEntry => ({
  id: `${layer}-${name}`,
  symbol,
  name,
  filter: null,
  layer,
})

function lines({ streams, units, boundaries }: OnMap): LegendEntry[] {
  const kinds = [...new Set(boundaries.map(({ kind }) => kind))]
  return [
    ...(streams.length > 0 ? [of('streams', 'stream', 'stream')] : []),
    ...(units.length > 0 ? [of('units', 'unit', 'unit outline')] : []),
    ...kinds.map((kind) => of('boundaries', kind === 'fault' ? 'barrier' : kind, boundaryNames[kind].toLowerCase())),
  ]
}

const mark = (symbol: LegendSymbolId, name: string): LegendEntry => ({
  id: symbol,
  symbol,
  name,
  filter: null,
  layer: null,
})

/** What the open sheet draws; it comes and goes with the sheet, so there is nothing to click. */
function markEntries(marks: MapMarks | null): LegendEntry[] {
  if (!marks?.place) return []
  return [
    mark('place', 'this place'),
    ...(marks.contributions.length > 0 ? [mark('contribution', 'carried the estimate, wider: more')] : []),
    ...(marks.radius ? [mark('radius', 'radius of tests nearby')] : []),
  ]
}

/** What the legend says: everything in view, and nothing else. */
export function legendEntries(visible: OnMap, filter: WellFilter | null, marks: MapMarks | null = null): LegendEntry[] {
  const grouped = visible.clusters.length > 0 ? clusterEntries.map(filtering) : []
  const single = visible.wells.length > 0 || (filter && grouped.length === 0) ? singleWells(visible, filter) : []
  return [...single, ...grouped, ...lines(visible), ...markEntries(marks)]
}
