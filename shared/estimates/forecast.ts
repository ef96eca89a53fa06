import { krigeGeometry, krigingGeometry } from '#shared/geostatistics/kriging.ts'
import type { Component } from '#shared/geostatistics/mixture.ts'
import { crosses, distance, type Point, type Polyline } from '#shared/geostatistics/planar.ts'
import type { VariogramNode } from '#shared/geostatistics/posterior.ts'
import { deviationOf, meanOf } from '#shared/geostatistics/robust.ts'
import type { PreparedValues } from './prepared-values.ts'
import { SITE_SPACING_M } from './independent-sites.ts'
import type { UnitModel } from './types.ts'

/** Weight of one value, by its index among the used values. */
export interface Weighted {
  index: number
  weight: number
}

/** Distribution of the true log10 at a place and what it was made of. */
export interface Forecast {
  components: Component[]
  weighted: Weighted[]
}

export interface ForecastOptions {
  barriers?: readonly Polyline[]
  /** Values for which this says false are held back. */
  keep?: (index: number) => boolean
}

/** Up to this many values all are used; above, the octants around the place. */
const GLOBAL_UP_TO = 40
const NEIGHBOURS = { perOctant: 5, max: 40 }
const FEWEST = 4

/** Values a place may draw on: near first, none across a barrier. */
export function neighboursOf(values: PreparedValues, place: Point, options: ForecastOptions): number[] {
  const { barriers = [], keep = () => true } = options
  const open = (i: number): boolean => keep(i) && !crosses(place, values.used[i]!, barriers)
  return values.used.length <= GLOBAL_UP_TO
    ? values.neighbourhood.nearest(place, GLOBAL_UP_TO, open)
    : values.neighbourhood.around(place, { ...NEIGHBOURS, keep: open })
}

function kriged(values: PreparedValues, nodes: readonly VariogramNode[], place: Point, indices: number[]): Forecast {
  const near = indices.map((i) => values.used[i]!)
  const geometry = krigingGeometry(place, near.map((v) => v.x), near.map((v) => v.y)) // prettier-ignore
  const z = near.map((v) => v.log10)
  const errorVariance = near.map((v) => v.error ** 2)
  const weights = new Float64Array(near.length)
  const components = nodes.map(({ weight, variogram }) => {
    const result = krigeGeometry(geometry, z, errorVariance, variogram)
    result.weights.forEach((w, i) => (weights[i]! += weight * w))
    return { weight, mean: result.mean, sd: Math.sqrt(result.variance), df: null }
  })
  return { components, weighted: indices.map((index, i) => ({ index, weight: weights[i]! })) }
}

/** Members of each independent site: every kept value joins the nearest one. */
function siteGroups(values: PreparedValues, keep: (index: number) => boolean): number[][] {
  const sites = values.sites()
  const groups = sites.map((): number[] => [])
  values.used.forEach((value, index) => {
    if (!keep(index)) return
    const distances = sites.map((site) => distance(site, value))
    const nearest = Math.min(...distances)
    if (nearest <= SITE_SPACING_M) groups[distances.indexOf(nearest)]!.push(index)
  })
  return groups.filter((group) => group.length > 0)
}

/**
 * Too few for a variogram: Student's t around the mean of the independent sites. The scatter of the sites holds their
 * errors too; half of it at least is taken as true, because so few values cannot tell the two apart.
 */
function averaged(values: PreparedValues, keep: (index: number) => boolean): Forecast | null {
  const groups = siteGroups(values, keep)
  const count = groups.length
  if (count < FEWEST - 1) return null
  const means = groups.map((group) => meanOf(group.map((i) => values.used[i]!.log10)))
  const scatter = deviationOf(means) ** 2
  const errors = meanOf(groups.map((group) => meanOf(group.map((i) => values.used[i]!.error ** 2))))
  const sd = Math.sqrt(Math.max(scatter - errors, scatter / 2) + scatter / count)
  const weighted = groups.flatMap((group) => group.map((index) => ({ index, weight: 1 / (count * group.length) })))
  return { components: [{ weight: 1, mean: meanOf(means), sd, df: count - 1 }], weighted }
}

/** The true log10 at a place under the model's rule; null when the values do not allow any estimate. */
export function forecast(
  values: PreparedValues,
  model: Pick<UnitModel, 'rule' | 'nodes'>,
  place: Point,
  options: ForecastOptions = {},
): Forecast | null {
  const { barriers = [], keep = () => true } = options
  if (model.rule === 'none') return null
  if (model.rule === 'mean') return averaged(values, (i) => keep(i) && !crosses(place, values.used[i]!, barriers))
  const indices = neighboursOf(values, place, options)
  return indices.length < FEWEST ? null : kriged(values, model.nodes, place, indices)
}

/** Widens (or slightly narrows) a distribution by the factor that cross-validation asked for. */
export const spreadBy = (components: readonly Component[], factor: number): Component[] =>
  components.map((c) => ({ ...c, sd: c.sd * factor }))

/** Adds an independent error, such as that of a new test. */
export const withError = (components: readonly Component[], error: number): Component[] =>
  components.map((c) => ({ ...c, sd: Math.hypot(c.sd, error) }))
