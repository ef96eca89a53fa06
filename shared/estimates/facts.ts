import type { CrossValidation } from '#shared/geostatistics/coverage.ts'
import { closeRings, crosses, distance, distanceToLines, extent, insideRings } from '#shared/geostatistics/planar.ts'
import { totalSill } from '#shared/geostatistics/variogram.ts'
import type { PreparedValues } from './prepared-values.ts'
import type {
  Contribution,
  DataRule,
  EstimateContext,
  Evidence,
  Log10Distribution,
  NeighbourScatter,
  Point,
  SecondOpinion,
  StreamNearby,
  UnitModel,
  UsedValue,
} from './types.ts'

/** An estimate before anything has been said about it. */
export interface Draft {
  place: Point
  values: PreparedValues
  context: EstimateContext
  model: UnitModel | null
  rule: DataRule
  sites: number
  truth: Log10Distribution | null
  /** Values that carry weight, heaviest first, beside what is told of them. */
  carried: { value: UsedValue; contribution: Contribution }[]
  secondOpinion: SecondOpinion | null
  neighbours: NeighbourScatter | null
}

export interface Nearness {
  within: number
  firm: number
  range_m: number
  nearest_m: number
  bearing_deg: number
}

/** Everything the rules of the notes may ask, worked out once. */
export interface Facts {
  draft: Draft
  context: EstimateContext
  hasEstimate: boolean
  insideUnit: boolean
  /** To the outline of the unit; infinite without one. */
  edge_m: number
  /** Against the range; null when no variogram is in use. */
  nearness: Nearness | null
  /** Outside the hull of the values; 0 inside. */
  outsideHull_m: number
  /** Extent of the values over the extent of the unit. */
  clusterShare: number
  clusterExtent_m: number
  hidden: { count: number; nearest_m: number }
  /** Shares of weight, 0 to 1. */
  evidence: Record<Evidence, number>
  counts: Record<Evidence, number>
  slugShare: number
  compositeShare: number
  /** Share of the weight in tests of known year that are older than the limit. */
  oldShare: number
  heaviest: { label: string; weight: number } | null
  /** Upper over lower end of the 95 % interval. */
  factor95: number
  nuggetShare: number
  crossValidation: CrossValidation | null
  poorest: { label: string; accuracy_m: number; distance_m: number } | null
  screens: { top_m: number; bottom_m: number } | null
  stream: StreamNearby | null
}

export const OLD_AFTER_YEARS = 30

type Carried = Draft['carried']

function share(carried: Carried, has: (value: UsedValue) => boolean): number {
  const total = carried.reduce((sum, c) => sum + Math.abs(c.contribution.weight), 0)
  const part = carried.reduce((sum, c) => sum + (has(c.value) ? Math.abs(c.contribution.weight) : 0), 0)
  return total > 0 ? part / total : 0
}

function nearnessOf({ place, values, context, model, carried }: Draft): Nearness | null {
  const range_m = model?.variogram?.range
  if (range_m === undefined || carried.length === 0) return null
  const near = carried.reduce((a, b) => (b.contribution.distance_m < a.contribution.distance_m ? b : a)).contribution
  const within = values.neighbourhood
    .within(place, range_m)
    .map((i) => values.used[i]!)
    .filter((value) => !crosses(place, value, context.barriers))
  return {
    within: within.length,
    firm: within.filter((v) => v.evidence === 'firm').length,
    range_m,
    nearest_m: near.distance_m,
    bearing_deg: near.bearing_deg,
  }
}

/** Values no farther than the farthest neighbour that a barrier keeps out. */
function hiddenBehindBarriers({ place, values, context, carried }: Draft): Facts['hidden'] {
  if (context.barriers.length === 0 || carried.length === 0) return { count: 0, nearest_m: Infinity }
  const reach = Math.max(...carried.map((c) => c.contribution.distance_m)) * (1 + 1e-9)
  const hidden = values.neighbourhood
    .within(place, reach)
    .map((i) => values.used[i]!)
    .filter((value) => crosses(place, value, context.barriers))
  return { count: hidden.length, nearest_m: Math.min(Infinity, ...hidden.map((v) => distance(place, v))) }
}

function poorestPosition(carried: Carried): Facts['poorest'] {
  const weighty = carried.filter((c) => Math.abs(c.contribution.weight) >= 0.1)
  const doubt = (c: Carried[number]): number => c.value.positionAccuracy_m / Math.max(1, c.contribution.distance_m)
  const first = weighty[0]
  if (!first) return null
  const { value, contribution } = weighty.reduce((a, b) => (doubt(b) > doubt(a) ? b : a), first)
  return { label: value.label, accuracy_m: value.positionAccuracy_m, distance_m: contribution.distance_m }
}

function testedDepths(carried: Carried): Facts['screens'] {
  const known = carried.filter((c) => c.value.screenTop_m != null && c.value.screenBottom_m != null)
  if (known.length === 0) return null
  return {
    top_m: Math.min(...known.map((c) => c.value.screenTop_m as number)),
    bottom_m: Math.max(...known.map((c) => c.value.screenBottom_m as number)),
  }
}

function hullDistance({ place, values, carried }: Draft): number {
  if (carried.length === 0) return 0
  const hull = values.hull()
  return hull.length > 2 && insideRings(place, [hull]) ? 0 : distanceToLines(place, closeRings([hull]))
}

const counted = (carried: Carried): Facts['counts'] => ({
  firm: carried.filter((c) => c.value.evidence === 'firm').length,
  fair: carried.filter((c) => c.value.evidence === 'fair').length,
  slight: carried.filter((c) => c.value.evidence === 'slight').length,
})

const cornersOf = (context: EstimateContext): Point[] => context.unit.outline.flat().map(([x, y]) => ({ x, y }))

function spread(draft: Draft): Pick<Facts, 'clusterShare' | 'clusterExtent_m'> {
  const clusterExtent_m = draft.values.extent_m()
  const whole = extent(cornersOf(draft.context))
  return { clusterExtent_m, clusterShare: whole > 0 ? clusterExtent_m / whole : 1 }
}

const isOld = (value: UsedValue, context: EstimateContext): boolean =>
  value.year !== null && context.yearNow - value.year > OLD_AFTER_YEARS

const heaviestOf = (carried: Carried): Facts['heaviest'] => carried[0]?.contribution ?? null

const nuggetShareOf = (model: UnitModel | null): number =>
  model?.variogram && totalSill(model.variogram) > 0 ? model.variogram.nugget / totalSill(model.variogram) : 0

const nearestStream = (context: EstimateContext): StreamNearby | null =>
  context.streams.reduce<StreamNearby | null>((a, b) => (a && a.distance_m <= b.distance_m ? a : b), null)

export function factsOf(draft: Draft): Facts {
  const { context, carried, truth, model, place } = draft
  const { outline } = context.unit
  return {
    draft,
    context,
    hasEstimate: truth !== null,
    insideUnit: outline.length === 0 || insideRings(place, outline),
    edge_m: distanceToLines(place, closeRings(outline)),
    nearness: nearnessOf(draft),
    outsideHull_m: hullDistance(draft),
    ...spread(draft),
    hidden: hiddenBehindBarriers(draft),
    evidence: {
      firm: share(carried, (v) => v.evidence === 'firm'),
      fair: share(carried, (v) => v.evidence === 'fair'),
      slight: share(carried, (v) => v.evidence === 'slight'),
    },
    counts: counted(carried),
    slugShare: share(carried, (v) => v.origin === 'slug-test'),
    compositeShare: share(carried, (v) => v.composite),
    oldShare: share(carried.filter((c) => c.value.year !== null), (v) => isOld(v, context)), // prettier-ignore
    heaviest: heaviestOf(carried),
    factor95: truth ? 10 ** (truth.high95 - truth.low95) : 1,
    nuggetShare: nuggetShareOf(model),
    crossValidation: context.crossValidation ?? model?.crossValidation ?? null,
    poorest: poorestPosition(carried),
    screens: testedDepths(carried),
    stream: nearestStream(context),
  }
}
