import { experimentalVariogram, type ExperimentalOptions, type Lag } from '#shared/geostatistics/experimental.ts'
import type { KrigingData } from '#shared/geostatistics/kriging.ts'
import { fitLeastSquares } from '#shared/geostatistics/least-squares-fit.ts'
import { crosses, type Polyline } from '#shared/geostatistics/planar.ts'
import { variogramPosterior } from '#shared/geostatistics/posterior.ts'
import { deviationOf } from '#shared/geostatistics/robust.ts'
import { checkVariogram, type Variogram } from '#shared/geostatistics/variogram.ts'
import { crossValidate } from './cross-validate.ts'
import { prepareValues, type PreparedValues } from './prepared-values.ts'
import type { DataRule, Quantity, SiteValue, UnitModel } from './types.ts'

export interface FitOptions {
  quantity: Quantity
  /** Barriers of the unit, projected metres: pairs of values do not cross them. */
  barriers?: readonly Polyline[]
  /** A variogram that a steward takes over from elsewhere; used where the values are too few for a fit. */
  assumed?: { variogram: Variogram; from: string }
}

/** Fewest independent sites for any estimate, and for a fitted variogram. */
export const SITES_FOR_ESTIMATE = 4
export const SITES_FOR_FIT = 30

/** Values beyond this are thinned evenly for the fit: more add time, not knowledge of the variogram. */
const MOST_FOR_FIT = 2000

export function dataRule(sites: number, scatter: number, assumed: boolean): DataRule {
  if (sites < SITES_FOR_ESTIMATE) return 'none'
  if (sites >= SITES_FOR_FIT && scatter > 0) return 'isotropic'
  return assumed ? 'assumed' : 'mean'
}

function thinned(values: PreparedValues): KrigingData {
  const { used } = values
  const step = Math.max(1, used.length / MOST_FOR_FIT)
  const kept = Array.from({ length: Math.min(used.length, MOST_FOR_FIT) }, (_, i) => used[Math.floor(i * step)]!)
  return {
    x: kept.map((v) => v.x),
    y: kept.map((v) => v.y),
    z: kept.map((v) => v.log10),
    errorVariance: kept.map((v) => v.error ** 2),
  }
}

type PairTest = (i: number, j: number) => boolean

function pairTest(data: KrigingData, barriers: readonly Polyline[]): PairTest | null {
  const at = (i: number) => ({ x: data.x[i]!, y: data.y[i]! })
  return barriers.length === 0 ? null : (i, j) => !crosses(at(i), at(j), barriers)
}

type Fit = Pick<UnitModel, 'variogram' | 'nodes' | 'leastSquares' | 'experimental' | 'robust' | 'errorsExceedScatter'>

/** Values that all stand at one place, as nested wells do, tell nothing of distances. */
const allAtOnePlace = ({ x, y }: KrigingData): boolean =>
  Array.from(x).every((east, i) => east === x[0] && y[i] === y[0])

const lagsOf = (data: KrigingData, options: ExperimentalOptions): Lag[] =>
  allAtOnePlace(data) ? [] : experimentalVariogram(data, options)

function experimentalOf(data: KrigingData, pair: PairTest | null): Omit<Fit, 'variogram' | 'nodes'> {
  const options = pair ? { pair } : {}
  const experimental = lagsOf(data, options)
  const leastSquares = experimental.length < 3 ? null : (fitLeastSquares(experimental)[0] ?? null)
  return {
    experimental,
    robust: lagsOf(data, { ...options, estimator: 'cressie-hawkins' }),
    leastSquares,
    errorsExceedScatter: leastSquares?.nuggetBelowZero ?? false,
  }
}

function variogramsOf(
  rule: DataRule,
  data: KrigingData,
  pair: PairTest | null,
  options: FitOptions,
): Pick<Fit, 'variogram' | 'nodes'> {
  if (rule === 'isotropic') {
    const { mode, nodes } = variogramPosterior(data, pair ? { pair } : {})
    return { variogram: mode, nodes }
  }
  const assumed = rule === 'assumed' ? options.assumed?.variogram : undefined
  return assumed ? { variogram: assumed, nodes: [{ weight: 1, variogram: assumed }] } : { variogram: null, nodes: [] }
}

/**
 * Fits the model of one unit and quantity: how much the data allow, the variogram with its uncertainty by restricted
 * maximum likelihood, the weighted least-squares alternative, and cross-validation with the spread it asks for.
 * Deterministic. @throws GeostatisticsError for an impossible assumed variogram.
 */
export function fitUnitModel(values: readonly SiteValue[], options: FitOptions): UnitModel {
  if (options.assumed) checkVariogram(options.assumed.variogram)
  const prepared = prepareValues(values, options.quantity)
  const data = thinned(prepared)
  const sites = prepared.sites().length
  const rule = dataRule(sites, deviationOf(prepared.used.map((v) => v.log10)), options.assumed !== undefined)
  const barriers = options.barriers ?? []
  const pair = pairTest(data, barriers)
  const fitted = { ...experimentalOf(data, pair), ...variogramsOf(rule, data, pair, options) }
  const checked = rule === 'none' ? null : crossValidate(prepared, { rule, nodes: fitted.nodes }, barriers)
  return {
    version: 1,
    quantity: options.quantity,
    rule,
    n: prepared.used.length,
    sites,
    ...fitted,
    assumedFrom: rule === 'assumed' ? (options.assumed?.from ?? null) : null,
    spreadFactor: checked?.spreadFactor ?? 1,
    crossValidation: checked?.crossValidation ?? null,
  }
}
